import { afterEach, describe, expect, it } from "vitest";
import { readDocument } from "#engine/notebook/read-document.ts";
import {
  changeInputs,
  insertRows,
  moveRow,
  removeRow,
  writeCell,
  writeField,
} from "../../../client/editor/blocks/block-writes.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import { leave, notebookState, paragraph, person, row, type Person } from "./two-editors.ts";

let who: Person;
afterEach(() => leave(who));

function open() {
  who = person(
    10,
    notebookState([
      paragraph("words"),
      {
        type: "premises",
        attrs: { blockId: "p", name: "Lantern", d: "d" },
        content: [
          row("scales", "r1", "M", { symbol: "p", value: "350 GeV" }),
          row("scales", "r2", "B", { symbol: "L" }),
        ],
      },
      {
        type: "blockquote",
        content: [
          paragraph("quoted"),
          { type: "scaling", attrs: { blockId: "p", standsOn: "p", title: "copy" } },
        ],
      },
      { type: "scaling", attrs: { blockId: "s" }, content: [] },
    ]),
  );
  return who;
}
const premises = () => who.directory.element("p") ?? expect.fail("premises are gone");

describe("the directory of blocks", () => {
  it("reads what the engine reads from the same document, nested blocks and doubled ids included", () => {
    open();
    expect(who.directory.blocks()).toEqual(readDocument(who.editor.getJSON()).blocks);
    expect(who.directory.blocks().map(({ id }) => id)).toEqual(["p", "p~2", "s"]);
  });

  it("stays the engine's reading through every kind of change", () => {
    open();
    const changes = [
      () => writeField(premises(), "d", "6"),
      () => writeCell(premises(), "scales", "r1", "value", "400 GeV"),
      () => writeCell(premises(), "scales", "r2", "meaning", "threshold"),
      () =>
        insertRows(
          premises(),
          kindDescriptions.premises,
          "scales",
          [
            { id: "a", values: { symbol: "a" } },
            { id: "b", values: {} },
          ],
          "r2",
        ),
      () => insertRows(premises(), kindDescriptions.premises, "scales", [{ id: "c", values: {} }], null),
      () => moveRow(premises(), "scales", "c", "r2"),
      () => moveRow(premises(), "scales", "r2", null),
      () => removeRow(premises(), "scales", "a"),
    ];
    for (const change of changes) {
      changeInputs(premises(), change);
      expect(who.directory.blocks()).toEqual(readDocument(who.editor.getJSON()).blocks);
    }
    const rows = who.directory.block("p")?.inputs["scales"];
    expect(typeof rows === "object" && rows.map(({ id }) => id)).toEqual(["c", "b", "r1", "r2"]);
  });

  it("hears nothing of prose", () => {
    open();
    let heard = 0;
    who.directory.subscribe(() => (heard += 1));
    const before = who.directory.blocks();
    who.editor.commands.insertContentAt(1, "more ");
    who.editor.commands.insertContentAt(0, { type: "paragraph" });
    expect(heard).toBe(0);
    expect(who.directory.blocks()).toBe(before);
  });

  it("gives new inputs for the block that changed and the old ones for the others", () => {
    open();
    const [first, copy, last] = who.directory.blocks();
    changeInputs(premises(), () => writeField(premises(), "d", "6"));
    const [first2, copy2, last2] = who.directory.blocks();
    expect(first2).not.toBe(first);
    expect([copy2, last2]).toEqual([copy, last]);
    expect(copy2).toBe(copy);
    expect(last2).toBe(last);
  });

  it("writes nothing for a value that is already there", () => {
    open();
    let updates = 0;
    who.doc.on("update", () => (updates += 1));
    changeInputs(premises(), () => {
      writeField(premises(), "d", "d");
      writeCell(premises(), "scales", "r1", "value", "350 GeV");
    });
    expect(updates).toBe(0);
  });

  it("gives the whole table new keys when there is no room between two rows", () => {
    open();
    const element = premises();
    who.doc.transact(() => {
      for (const child of element.toArray()) if ("setAttribute" in child) child.setAttribute("order", "same");
    });
    changeInputs(element, () => moveRow(element, "scales", "r2", "r1"));
    const rows = who.directory.block("p")?.inputs["scales"];
    expect(typeof rows === "object" && rows.map(({ id }) => id)).toEqual(["r2", "r1"]);
  });
});
