import type { JSONContent } from "@tiptap/core";
import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, describe, expect, it } from "vitest";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance, BlockRow } from "#engine/notebook/block-instance.ts";
import { blockPlaces } from "../../../client/editor/blocks/block-places.ts";
import {
  changeInputs,
  insertRows,
  moveRow,
  removeRow,
  writeCell,
  writeField,
} from "../../../client/editor/blocks/block-writes.ts";
import { leave, meet, notebookState, paragraph, person, row, type Person } from "./two-editors.ts";

/** The table of what two people may do at once to one block; neighbours are of the same kind, which is the hard case. */
const target = "target";

function premises(blockId: string, rowCount: number): JSONContent {
  return {
    type: "premises",
    attrs: { blockId, name: `name of ${blockId}`, d: "4" },
    content: Array.from({ length: rowCount }, (_, index) =>
      row("scales", `${blockId}-r${index}`, `K${index + 1}`, {
        symbol: `s${index}`,
        value: `${index} GeV`,
        role: "other",
        meaning: "",
      }),
    ),
  };
}

interface Surroundings {
  readonly third?: true;
  readonly alone?: true;
}
/** The block ends the document unless a third one is needed: with nothing around it, pairing is hardest. */
function notebook(rowCount: number, { third, alone }: Surroundings = {}): JSONContent[] {
  const two = [premises("first", rowCount), premises(target, rowCount)];
  const withProse = alone ? two : [paragraph("before"), ...two];
  return third ? [...withProse, premises("last", rowCount)] : withProse;
}

function place(who: Person, blockId: string): { from: number; to: number } {
  const found = blockPlaces(who.editor.state.doc).get(blockId) ?? expect.fail(`no block ${blockId}`);
  return { from: found.position, to: found.position + found.node.nodeSize };
}

function element(who: Person, blockId = target) {
  const found = who.directory.element(blockId);
  if (!found) throw new Error(`no element ${blockId}`);
  return found;
}

function scales(block: BlockInstance | null): readonly BlockRow[] {
  const rows = block?.inputs["scales"];
  return typeof rows === "object" ? rows : [];
}

function typeProse(who: Person, text: string): void {
  const inParagraph = who.editor.state.doc.firstChild?.isTextblock === true;
  who.editor.commands.insertContentAt(inParagraph ? 1 : 0, inParagraph ? text : paragraph(text));
}

/** What the first person does. `keepsElement`: a colleague's edit at the same time survives it. */
const structural: Record<
  string,
  { act(who: Person, rows: number): void; keepsElement: boolean; prepare?(who: Person): void } & Surroundings
> = {
  "insert before": {
    keepsElement: true,
    act: (who) => void who.editor.commands.insertContentAt(place(who, target).from, premises("new", 1)),
  },
  "insert after": {
    keepsElement: true,
    act: (who) => void who.editor.commands.insertContentAt(place(who, target).to, premises("new", 1)),
  },
  "delete it": {
    keepsElement: false,
    act: (who) => void who.editor.commands.deleteRange(place(who, target)),
  },
  "delete the one before": {
    keepsElement: true,
    act: (who) => void who.editor.commands.deleteRange(place(who, "first")),
  },
  "delete the only other thing, the block before": {
    keepsElement: true,
    alone: true,
    act: (who) => void who.editor.commands.deleteRange(place(who, "first")),
  },
  "insert before, with nothing else around": {
    keepsElement: true,
    alone: true,
    act: (who) => void who.editor.commands.insertContentAt(place(who, target).from, premises("new", 1)),
  },
  "delete the one after": {
    keepsElement: true,
    third: true,
    act: (who) => void who.editor.commands.deleteRange(place(who, "last")),
  },
  "delete paragraph and block before": {
    keepsElement: true,
    act: (who) => void who.editor.commands.deleteRange({ from: 0, to: place(who, "first").to }),
  },
  reorder: {
    keepsElement: true,
    act: (who, rows) => {
      if (rows > 1) changeInputs(element(who), () => moveRow(element(who), "scales", `${target}-r0`, null));
    },
  },
  "delete a row": {
    keepsElement: true,
    act: (who, rows) => {
      if (rows > 0)
        changeInputs(element(who), () => removeRow(element(who), "scales", `${target}-r${rows - 1}`));
    },
  },
  "move it": {
    keepsElement: false,
    act: (who) => {
      const { from, to } = place(who, target);
      const node = who.editor.state.doc.nodeAt(from);
      if (!node) throw new Error("nothing to move");
      const { tr } = who.editor.state;
      who.editor.view.dispatch(tr.delete(from, to).insert(place(who, "first").from, node));
    },
  },
  "move its neighbour": {
    keepsElement: true,
    act: (who) => {
      const { from, to } = place(who, "first");
      const node = who.editor.state.doc.nodeAt(from);
      if (!node) throw new Error("nothing to move");
      const { tr } = who.editor.state;
      who.editor.view.dispatch(tr.insert(place(who, target).to, node).delete(from, to));
    },
  },
  "wrap it": {
    keepsElement: false,
    act: (who) => {
      const { from } = place(who, target);
      who.editor.view.dispatch(
        who.editor.state.tr.setSelection(NodeSelection.create(who.editor.state.doc, from)),
      );
      expect(who.editor.commands.setBlockquote()).toBe(true);
    },
  },
  "edit prose on both sides": {
    keepsElement: true,
    act: (who) => {
      const { tr } = who.editor.state;
      const end = who.editor.state.doc.content.size;
      const { schema } = who.editor;
      who.editor.view.dispatch(
        tr
          .insert(end, schema.node("paragraph", null, schema.text("after")))
          .insertText("X", 2)
          .insertText("Y", 4),
      );
    },
  },
  undo: {
    keepsElement: true,
    prepare: (who) =>
      changeInputs(element(who), () => writeField(element(who), "note", "typed and regretted")),
    act: (who) => void who.history.undoOnce(),
  },
};

/** What the second person does meanwhile. */
const edits: Record<
  string,
  { act(who: Person, rows: number): void; survives(who: Person, rows: number): boolean }
> = {
  "edits the field": {
    act: (who) => changeInputs(element(who), () => writeField(element(who), "note", "second's note")),
    survives: (who) => who.directory.block(target)?.inputs["note"] === "second's note",
  },
  "edits another field": {
    act: (who) => changeInputs(element(who), () => writeField(element(who), "d", "6")),
    survives: (who) => who.directory.block(target)?.inputs["d"] === "6",
  },
  "edits a row": {
    act: (who, rows) => {
      if (rows > 0)
        changeInputs(element(who), () => writeCell(element(who), "scales", `${target}-r0`, "value", "7 TeV"));
    },
    survives: (who, rows) =>
      rows === 0 ||
      scales(who.directory.block(target)).find((r) => r.id === `${target}-r0`)?.["value"] === "7 TeV",
  },
  "adds a row": {
    act: (who) =>
      changeInputs(element(who), () =>
        insertRows(
          element(who),
          kindDescriptions.premises,
          "scales",
          [{ id: "added", values: { symbol: "q" } }],
          null,
        ),
      ),
    survives: (who) =>
      scales(who.directory.block(target)).some((r) => r.id === "added" && r["symbol"] === "q"),
  },
};

const typed = new Set([
  "",
  "4",
  "6",
  "isotropic",
  "3",
  "2",
  "other",
  "q",
  "7 TeV",
  "typed and regretted",
  "second's note",
  ...["first", target, "last", "new"].map((id) => `name of ${id}`),
  ...[0, 1, 2].flatMap((index) => [`s${index}`, `${index} GeV`]),
]);

let people: Person[] = [];
afterEach(() => {
  leave(...people);
  people = [];
});

describe.each(Object.entries(structural))(
  "while one person would %s",
  (name, { act, keepsElement, prepare, ...surroundings }) => {
    describe.each(Object.entries(edits))("and another %s", (editName, edit) => {
      const cases = [0, 1, 2, 3].flatMap((rows) =>
        (["first", "second"] as const).map((later) => ({ rows, later })),
      );
      it.each(cases)("with $rows rows, first to hear: $later", ({ rows, later }) => {
        const state = notebookState(notebook(rows, surroundings));
        const first = person(10, state);
        const second = person(20, state);
        people = [first, second];
        if (prepare) meet(first, second, { first: () => prepare(first), second: () => undefined }, "first");

        meet(first, second, { first: () => act(first, rows), second: () => edit.act(second, rows) }, later);

        // All clients equal, in Y, in ProseMirror and as read.
        expect(second.editor.getJSON()).toEqual(first.editor.getJSON());
        expect(second.fragment.toJSON()).toBe(first.fragment.toJSON());
        expect(second.directory.blocks()).toEqual(first.directory.blocks());

        // No row lost or doubled, in any block; none in the wrong one.
        const deletedRow = name === "delete a row" && rows > 0 ? `${target}-r${rows - 1}` : null;
        for (const block of first.directory.blocks()) {
          const ids = scales(block)
            .map(({ id }) => id)
            .filter((id) => id !== "added");
          const own = Array.from(
            { length: block.id === "new" ? 1 : rows },
            (_, index) => `${block.id}-r${index}`,
          );
          expect([...ids].sort()).toEqual(own.filter((id) => id !== deletedRow));
          expect(block.inputs["name"]).toBe(`name of ${block.id}`);
        }
        const added = first.directory
          .blocks()
          .flatMap((block) => scales(block).filter(({ id }) => id === "added"));
        expect(added.length).toBeLessThanOrEqual(1);

        // No value that nobody typed.
        for (const block of first.directory.blocks()) {
          const values = [
            ...Object.values(block.inputs).filter((value) => typeof value === "string"),
            ...scales(block).flatMap(({ id: _, ...cells }) => Object.values(cells)),
          ];
          expect(values.filter((value) => !typed.has(value))).toEqual([]);
        }

        const sameRow = name === "delete a row" && editName === "edits a row" && rows === 1;
        const sameField = name === "undo" && editName === "edits the field";
        if (keepsElement && !sameRow && !sameField) expect(edit.survives(first, rows)).toBe(true);

        // The next sentence typed by either touches no block.
        const untouched = first.directory.blocks();
        meet(
          first,
          second,
          { first: () => typeProse(first, "more "), second: () => typeProse(second, "words ") },
          later,
        );
        expect(first.directory.blocks()).toEqual(untouched);
        expect(second.directory.blocks()).toEqual(untouched);
      });
    });
  },
);

describe("deleting a block", () => {
  it.each([0, 1, 2, 3])("with %i rows is undone with every field and row", (rows) => {
    const who = person(10, notebookState(notebook(rows, { third: true })));
    people = [who];
    changeInputs(element(who), () => writeField(element(who), "d", "6"));
    if (rows > 0)
      changeInputs(element(who), () => writeCell(element(who), "scales", `${target}-r0`, "value", "7 TeV"));
    const before = who.directory.block(target);
    who.editor.commands.deleteRange(place(who, target));
    expect(who.directory.block(target)).toBeNull();
    who.history.undoOnce();
    expect(who.directory.block(target)).toEqual(before);
    expect(who.directory.blocks().map(({ id }) => id)).toEqual(["first", target, "last"]);
  });
});
