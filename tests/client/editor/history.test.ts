import { afterEach, beforeEach, describe, expect, it } from "vitest";
import * as Y from "yjs";
import { FIELD_ORIGIN, UNDOABLE_BY_NOBODY } from "../../../client/editor/history.ts";
import { placeBlock } from "../../../client/editor/placing/place.ts";
import { onePerson, twoPeople, type as typeText, type Person, type TwoPeople } from "./two-people.ts";

let people: TwoPeople;
let wren: Person;
let otto: Person;
beforeEach(() => {
  people = twoPeople();
  ({ wren, otto } = people);
});
afterEach(() => {
  people.leave();
});

function blockOf(person: Person): Y.XmlElement {
  const found = person.fragment
    .toArray()
    .find((node) => node instanceof Y.XmlElement && node.nodeName === "premises");
  if (!(found instanceof Y.XmlElement)) throw new Error("there is no premises block");
  return found;
}
function write(person: Person, field: string, value: string): void {
  person.doc.transact(() => {
    blockOf(person).setAttribute(field, value);
  }, FIELD_ORIGIN);
}
const field = (person: Person, name: string) => blockOf(person).getAttribute(name);

describe("the history of one person", () => {
  it("undoes only what that person did", () => {
    typeText(wren.editor, "ours");
    otto.editor.commands.setTextSelection(5);
    typeText(otto.editor, " and theirs");
    expect(wren.history.undoOnce()).toBe("done");
    expect(otto.text()).toBe(" and theirs");
    expect(wren.history.undoOnce()).toBe("nothing");
    expect(wren.text()).toBe(" and theirs");
  });

  it("has no step for seeding, loading or a colleague's work", () => {
    wren.doc.transact(() => {
      const paragraph = new Y.XmlElement("paragraph");
      paragraph.insert(0, [new Y.XmlText("seeded")]);
      wren.fragment.insert(0, [paragraph]);
    }, UNDOABLE_BY_NOBODY);
    expect(wren.history.undoOnce()).toBe("nothing");
    expect(otto.history.undoOnce()).toBe("nothing");
    expect(otto.text()).toContain("seeded");
  });

  it("holds prose and fields in one order, each write of a field a step of its own", () => {
    typeText(wren.editor, "before");
    placeBlock(wren.editor, "premises");
    write(wren, "d", "3");
    write(wren, "d", "5");
    write(wren, "name", "Lantern");
    expect(wren.history.undoOnce()).toBe("done");
    expect([field(wren, "name"), field(wren, "d")]).toEqual(["", "5"]);
    expect(wren.history.undoOnce()).toBe("done");
    expect(field(wren, "d")).toBe("3");
    expect(wren.history.undoOnce()).toBe("done");
    expect(field(wren, "d")).toBe("4");
    expect(wren.history.redoOnce()).toBe("done");
    expect(wren.history.redoOnce()).toBe("done");
    expect(wren.history.redoOnce()).toBe("done");
    expect([field(otto, "name"), field(otto, "d")]).toEqual(["Lantern", "5"]);
  });

  it("says so, and goes no further, when a colleague has overwritten the newest step", () => {
    placeBlock(wren.editor, "premises");
    write(wren, "note", "kept");
    write(wren, "d", "3");
    write(otto, "d", "6");
    expect(wren.history.undoOnce()).toBe("overwritten");
    expect([field(wren, "d"), field(wren, "note")]).toEqual(["6", "kept"]);
    expect(wren.history.state().message?.text).toMatch(/colleague/);
    // The step is gone: the next undo is the older one, and meant.
    expect(wren.history.undoOnce()).toBe("done");
    expect([field(wren, "d"), field(wren, "note")]).toEqual(["6", ""]);
    expect(wren.history.state().message).toBeNull();
  });

  it("says so when a colleague has deleted what was typed", () => {
    typeText(wren.editor, "first");
    wren.history.startNewStep();
    wren.editor.commands.splitBlock();
    wren.history.startNewStep();
    typeText(wren.editor, "second");
    otto.editor.commands.command(({ tr, state }) => {
      let at = -1;
      state.doc.descendants((node, position) => {
        if (node.text === "second") at = position;
      });
      tr.delete(at, at + "second".length);
      return true;
    });
    expect(wren.history.undoOnce()).toBe("overwritten");
    expect(wren.text()).toContain("first");
  });

  it("says so for redo as well", () => {
    placeBlock(wren.editor, "premises");
    write(wren, "d", "3");
    wren.history.undoOnce();
    write(otto, "d", "6");
    const outcome = wren.history.redoOnce();
    expect([outcome, field(wren, "d")]).toEqual(["overwritten", "6"]);
  });

  it("brings a deleted block back with every field, row and value", () => {
    placeBlock(wren.editor, "premises");
    write(wren, "name", "Lantern");
    write(wren, "d", "3");
    wren.doc.transact(() => {
      const row = new Y.XmlElement("row");
      const cell = new Y.XmlElement("cell");
      for (const [name, value] of [
        ["table", "scales"],
        ["rowId", "r1"],
        ["order", "a"],
      ] as const)
        row.setAttribute(name, value);
      for (const [name, value] of [
        ["field", "symbol"],
        ["value", "Lambda"],
      ] as const)
        cell.setAttribute(name, value);
      row.insert(0, [cell]);
      blockOf(wren).insert(0, [row]);
    }, FIELD_ORIGIN);
    write(otto, "note", "from Otto");
    const before = wren.editor.getJSON();
    wren.history.startNewStep();
    let position = -1;
    wren.editor.state.doc.forEach((node, offset) => {
      if (node.type.name === "premises") position = offset;
    });
    wren.editor.commands.deleteRange({
      from: position,
      to: position + (wren.editor.state.doc.nodeAt(position)?.nodeSize ?? 0),
    });
    expect(() => blockOf(otto)).toThrow();
    expect(wren.history.undoOnce()).toBe("done");
    expect(wren.editor.getJSON()).toEqual(before);
    expect(otto.editor.getJSON()).toEqual(before);
  });

  it("leaves a block that a colleague has written in, and says so", () => {
    placeBlock(wren.editor, "premises");
    otto.doc.transact(() => {
      blockOf(otto).setAttribute("name", "Otto's");
    }, FIELD_ORIGIN);
    wren.history.undoOnce();
    expect(wren.history.state().message?.text).toContain("so it stays");
    expect(field(wren, "name")).toBe("Otto's");
    expect(field(otto, "name")).toBe("Otto's");
  });

  it("leaves a row that a colleague has written in, with the block it is in", () => {
    placeBlock(wren.editor, "premises");
    const row = new Y.XmlElement("row");
    wren.doc.transact(() => {
      blockOf(wren).push([row]);
      row.push([new Y.XmlElement("cell")]);
    }, FIELD_ORIGIN);
    otto.doc.transact(() => {
      const theirs = blockOf(otto).get(0);
      if (theirs instanceof Y.XmlElement) theirs.get(0).setAttribute("value", "chi");
    }, FIELD_ORIGIN);
    wren.history.undoOnce();
    expect(wren.history.state().message?.text).toContain("so it stays");
    wren.history.undoOnce();
    expect(wren.history.state().message?.text).toContain("so it stays");
    expect(blockOf(otto).toJSON()).toContain('value="chi"');
    expect(blockOf(wren).toJSON()).toBe(blockOf(otto).toJSON());
  });

  it("outlives the view of an editor", () => {
    const spare = onePerson(wren.doc, wren.history);
    spare.editor.destroy();
    typeText(wren.editor, "typed");
    expect(wren.history.state().canUndo).toBe(true);
    expect(wren.history.undoOnce()).toBe("done");
    expect(otto.text()).toBe("");
  });

  it("works from the editor's keys and commands too", () => {
    typeText(wren.editor, "typed");
    expect(wren.editor.commands.undo()).toBe(true);
    expect(wren.text()).toBe("");
    expect(wren.editor.commands.redo()).toBe(true);
    expect(otto.text()).toBe("typed");
  });
});
