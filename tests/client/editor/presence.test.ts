import { describe, expect, it } from "vitest";
import { Awareness } from "y-protocols/awareness";
import * as Y from "yjs";
import { hasReadableCursor } from "../../../client/editor/collaboration.ts";
import { initials, personColor } from "../../../client/editor/person-color.ts";
import { presentPeople, userOf } from "../../../client/editor/presence.ts";

function awarenessWith(...states: readonly object[]): Awareness {
  const awareness = new Awareness(new Y.Doc());
  for (const [index, state] of states.entries()) awareness.states.set(1000 + index, state);
  return awareness;
}

describe("who is here", () => {
  it("is one entry per person, oneself first, whatever the number of tabs", () => {
    const awareness = awarenessWith(
      { user: { id: "o", name: "Otto" } },
      { user: { id: "w", name: "Wren" } },
      { user: { id: "o", name: "Otto" } },
    );
    awareness.setLocalState({ user: { id: "w", name: "Wren" } });
    expect(presentPeople(awareness).map(({ name, isSelf }) => [name, isSelf])).toEqual([
      ["Wren", true],
      ["Otto", false],
    ]);
  });

  it.each([
    [{}],
    [{ user: null }],
    [{ user: { id: 1, name: "x" } }],
    [{ user: { id: "", name: "x" } }],
    [{ user: "Wren" }],
    [7],
    [null],
  ])("leaves out %j", (state) => expect(userOf(state)).toBeNull());

  it("cuts names that are too long", () => {
    expect(userOf({ user: { id: "a", name: "x".repeat(500) } })?.name).toHaveLength(80);
  });
});

describe("a colleague's caret", () => {
  const position = Y.createRelativePositionFromTypeIndex(new Y.Doc().getXmlFragment("prose"), 0);
  // As it arrives: JSON.
  const json: unknown = JSON.parse(JSON.stringify(position));
  it("is drawn where it is readable", () => {
    expect(hasReadableCursor({ cursor: { anchor: json, head: json } })).toBe(true);
    expect(hasReadableCursor({ cursor: null })).toBe(true);
  });
  it.each([
    [{ cursor: 3 }],
    [{ cursor: { anchor: json } }],
    [{ cursor: { anchor: json, head: { item: { client: "x", clock: 0 } } } }],
    [{ cursor: { anchor: json, head: { item: { client: 1, clock: -1 } } } }],
    [{ cursor: { anchor: json, head: { tname: "another root" } } }],
  ])("is not drawn from %j", (state) => expect(hasReadableCursor(state)).toBe(false));
});

describe("colours and initials", () => {
  it("stay with a person and differ between eight people", () => {
    // Wren and Otto have met above.
    const ids = ["w", "o", ...Array.from({ length: 6 }, (_, index) => `person ${String(index)}`)];
    const colors = ids.map(personColor);
    expect(new Set(colors).size).toBe(8);
    expect(ids.map(personColor)).toEqual(colors);
    expect(colors.every((color) => /^var\(--person-[1-8]\)$/.test(color))).toBe(true);
  });
  it.each([
    ["Wren Vale", "WV"],
    ["Otto", "Ot"],
    ["x", "x"],
    ["  Ada  von  Q ", "AQ"],
  ])("%s is %s", (name, letters) => expect(initials(name)).toBe(letters));
});
