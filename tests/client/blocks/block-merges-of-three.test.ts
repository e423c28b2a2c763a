/** Two or three people do several things each without hearing of each other; what they did arrives in any order. */
import fc from "fast-check";
import { afterEach, expect, it } from "vitest";
import * as Y from "yjs";
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
import { leave, notebookState, paragraph, person, row, type Person } from "./two-editors.ts";

const RUNS = Number(process.env["MERGE_RUNS"] ?? "12");
const ids = ["one", "two", "three"] as const;
const actions = [
  ...["edit a field", "edit another field", "edit a row", "add a row", "delete a row", "reorder"],
  ...["insert a block", "delete the block", "type prose", "undo"],
] as const;

interface Deed {
  readonly what: (typeof actions)[number];
  readonly block: (typeof ids)[number];
  readonly row: number;
}
const deed = fc.record({
  what: fc.constantFrom(...actions),
  block: fc.constantFrom(...ids),
  row: fc.nat(2),
});
const scene = fc.record({
  rows: fc.nat(3),
  deeds: fc.array(fc.array(deed, { minLength: 1, maxLength: 4 }), { minLength: 2, maxLength: 3 }),
  /** Whose turn it is to hear the next thing that they have not heard yet. */
  turns: fc.array(fc.nat(2), { minLength: 20, maxLength: 20 }),
});

function premises(blockId: string, rows: number) {
  return {
    type: "premises",
    attrs: { blockId, name: `name of ${blockId}`, d: "4" },
    content: Array.from({ length: rows }, (_, index) =>
      row("scales", `${blockId}-r${index}`, `K${index + 1}`, { symbol: `s${index}`, role: "other" }),
    ),
  };
}
function scales(block: BlockInstance): readonly BlockRow[] {
  const rows = block.inputs["scales"];
  return typeof rows === "object" ? rows : [];
}

/** What anyone has taken away, and every value that anyone has written. */
class Ledger {
  readonly gone = new Set<string>();
  readonly written = new Set(["", "4", "isotropic", "3", "2", "other", "s0", "s1", "s2"]);
}

function perform(who: Person, name: string, { what, block, row: index }: Deed, ledger: Ledger): void {
  const element = who.directory.element(block);
  const at = blockPlaces(who.editor.state.doc).get(block);
  if (!element || at === undefined) return;
  const present = scales(who.directory.block(block) ?? expect.fail(`no block ${block}`));
  const rowId = present[index]?.id;
  const value = `${name} at ${block}`;
  switch (what) {
    case "edit a field":
    case "edit another field":
      ledger.written.add(value);
      return changeInputs(element, () => writeField(element, what === "edit a field" ? "note" : "d", value));
    case "edit a row":
      ledger.written.add(value);
      if (rowId !== undefined)
        changeInputs(element, () => writeCell(element, "scales", rowId, "value", value));
      return;
    case "add a row": {
      ledger.written.add(value);
      const added = [
        { id: `${block}-by-${name}-${present.length}-${ledger.written.size}`, values: { symbol: value } },
      ];
      return changeInputs(element, () =>
        insertRows(element, kindDescriptions.premises, "scales", added, null),
      );
    }
    case "delete a row":
      if (rowId === undefined) return;
      ledger.gone.add(rowId);
      return changeInputs(element, () => removeRow(element, "scales", rowId));
    case "reorder":
      if (rowId !== undefined && present.length > 1)
        changeInputs(element, () => moveRow(element, "scales", rowId, null));
      return;
    case "insert a block": {
      const id = `new-${name}-${ledger.written.size}`;
      ledger.written.add(`name of ${id}`);
      who.editor.commands.insertContentAt(at.position, premises(id, 1));
      return;
    }
    case "delete the block":
      ledger.gone.add(block);
      who.editor.commands.deleteRange({ from: at.position, to: at.position + at.node.nodeSize });
      return;
    case "type prose":
      who.editor.commands.insertContentAt(0, paragraph(value));
      return;
    case "undo":
      who.history.undoOnce();
  }
}

let people: Person[] = [];
afterEach(() => {
  leave(...people);
  people = [];
});

it(
  "all have the same in the end: no row in the wrong block, none lost or doubled, no value that nobody wrote",
  () => {
    fc.assert(
      fc.property(scene, ({ rows, deeds, turns }) => {
        leave(...people);
        const state = notebookState([paragraph("before"), ...ids.map((id) => premises(id, rows))]);
        people = deeds.map((_, index) => person(10 * (index + 1), state));
        const ledger = new Ledger();
        for (const id of ids) ledger.written.add(`name of ${id}`);
        const heard = people.map((): Uint8Array[] => []);
        const posts = people.map((who, sender) => {
          const post = (update: Uint8Array, origin: unknown) => {
            if (origin === "network") return;
            for (const [reader, queue] of heard.entries()) if (reader !== sender) queue.push(update);
          };
          who.doc.on("update", post);
          return () => who.doc.off("update", post);
        });
        const hear = (reader: number) => {
          const update = heard[reader]?.shift();
          const who = people[reader];
          if (update !== undefined && who !== undefined) Y.applyUpdate(who.doc, update, "network");
          return update !== undefined;
        };
        for (const [index, who] of people.entries())
          for (const each of deeds[index] ?? []) perform(who, `p${index}`, each, ledger);
        for (const turn of turns) hear(turn % people.length);
        while (people.map((_, reader) => hear(reader)).some(Boolean));
        for (const stop of posts) stop();

        const [first, ...others] = people;
        if (first === undefined) throw new Error("nobody is there");
        for (const other of others) {
          expect(other.editor.getJSON()).toEqual(first.editor.getJSON());
          expect(other.fragment.toJSON()).toBe(first.fragment.toJSON());
          expect(other.directory.blocks()).toEqual(first.directory.blocks());
        }
        const blocks = first.directory.blocks();
        for (const id of ids) {
          if (ledger.gone.has(id)) continue;
          const block = blocks.find((each) => each.id === id) ?? expect.fail(`${id} was lost`);
          const kept = scales(block).map((each) => each.id);
          for (let index = 0; index < rows; index += 1)
            if (!ledger.gone.has(`${id}-r${index}`)) expect(kept).toContain(`${id}-r${index}`);
        }
        for (const block of blocks) {
          const rowIds = scales(block).map((each) => each.id);
          expect(new Set(rowIds).size).toBe(rowIds.length);
          expect(block.inputs["name"]).toBe(`name of ${block.id}`);
          for (const rowId of rowIds) expect(rowId.startsWith(`${block.id}-`)).toBe(true);
          const values = [
            ...Object.values(block.inputs).filter((value) => typeof value === "string"),
            ...scales(block).flatMap(({ id: _, ...cells }) => Object.values(cells)),
          ];
          expect(values.filter((value) => !ledger.written.has(value))).toEqual([]);
        }
      }),
      { numRuns: RUNS },
    );
  },
  30_000 + RUNS * 500,
);
