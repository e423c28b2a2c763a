import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { kindNames } from "#engine/kind.ts";
import { findPlaceables, placeables } from "../../../client/editor/placing/placeable.ts";
import { gapAtCaret, placeBlock } from "../../../client/editor/placing/place.ts";
import { onePerson, type, type Person } from "./two-people.ts";

let person: Person;
beforeEach(() => {
  person = onePerson();
});
afterEach(() => {
  person.editor.destroy();
});
const kindsOfNodes = () => person.editor.state.doc.content.content.map((node) => node.type.name);
const open = { pinPicker: () => undefined };

describe("placing a block", () => {
  it("gives it an id of its own and leaves a paragraph to write on in", () => {
    type(person.editor, "words");
    const first = placeBlock(person.editor, "premises");
    const second = placeBlock(person.editor, "scaling");
    expect(kindsOfNodes()).toEqual(["paragraph", "premises", "scaling", "paragraph"]);
    expect(first).not.toBe(second);
    expect(person.editor.state.doc.child(1).attrs["blockId"]).toBe(first);
    expect(person.editor.state.selection).toBeInstanceOf(NodeSelection);
  });

  it("takes the place of an empty paragraph", () => {
    placeBlock(person.editor, "premises");
    expect(kindsOfNodes()).toEqual(["premises", "paragraph"]);
  });

  it("goes between the paragraphs it is placed between", () => {
    type(person.editor, "first");
    person.editor.commands.splitBlock();
    type(person.editor, "second");
    placeBlock(person.editor, "premises", 1);
    expect(kindsOfNodes()).toEqual(["paragraph", "premises", "paragraph"]);
  });

  it("from the caret goes after the paragraph the caret is in", () => {
    type(person.editor, "first");
    person.editor.commands.splitBlock();
    type(person.editor, "second");
    person.editor.commands.setTextSelection(2);
    expect(gapAtCaret(person.editor)).toBe(1);
  });

  it("is one step to undo", () => {
    type(person.editor, "words");
    placeBlock(person.editor, "premises");
    person.history.undoOnce();
    expect(kindsOfNodes()).toEqual(["paragraph"]);
    expect(person.text()).toBe("words");
  });
});

describe("the index of what can be placed", () => {
  it("has every block kind, first", () => {
    expect(placeables.slice(0, kindNames.length).map(({ id }) => id)).toEqual([...kindNames]);
  });

  it.each([
    ["prem", "premises"],
    ["numbered", "orderedList"],
    ["Order plan", "orderPlan"],
    ["table", "table"],
    ["$$", "displayMath"],
    ["irrelevant", "scaling"],
  ])("%s finds %s first", (typed, id) => expect(findPlaceables(typed)[0]?.id).toBe(id));

  it("finds nothing for a name that nothing has", () => {
    expect(findPlaceables("xyzzy")).toEqual([]);
  });

  it("places each of its entries so that one can go on: text is typed inside, nothing is replaced", () => {
    for (const placeable of placeables.filter(({ group }) => group === "Prose")) {
      const one = onePerson();
      placeable.place(one.editor, gapAtCaret(one.editor), open);
      const before = one.editor.state.doc.childCount;
      type(one.editor, "typed");
      expect(one.editor.state.doc.childCount, placeable.id).toBe(before);
      expect(one.editor.getText(), placeable.id).toContain("typed");
      one.editor.destroy();
    }
  });
});
