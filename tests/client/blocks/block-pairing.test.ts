import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { JSONContent } from "@tiptap/core";
import { attributeOf, blockElements } from "../../../client/editor/blocks/block-elements.ts";
import { longestRising } from "../../../client/editor/blocks/block-pairing.ts";
import { placedBlocks } from "../../../client/editor/blocks/placed-blocks.ts";
import { leave, notebookState, paragraph, person, type Person } from "./two-editors.ts";

const block = (index: number): JSONContent => ({
  type: "scaling",
  attrs: { blockId: `b${index}`, title: `title ${index}` },
});

/** Children of the document by what they are: "p" or a block's id. */
const names = (who: Person) =>
  who.editor.state.doc.content.content.map((node) =>
    node.type.name === "scaling" ? String(node.attrs["blockId"]) : "p",
  );

function range(who: Person, from: number, to: number) {
  const { doc } = who.editor.state;
  let position = 0;
  const starts = doc.content.content.map((node) => {
    const start = position;
    position += node.nodeSize;
    return start;
  });
  return { from: starts[from] ?? doc.content.size, to: starts[to] ?? doc.content.size };
}

describe("blocks in an edited document", () => {
  it("keep their own element of the shared document as long as they stay in place, whatever happens around them", () => {
    const edit = fc.record({
      what: fc.constantFrom("delete", "insert block", "insert prose", "type", "move"),
      at: fc.nat(20),
      to: fc.nat(20),
    });
    fc.assert(
      fc.property(
        fc.array(fc.boolean(), { minLength: 1, maxLength: 8 }),
        fc.array(edit, { maxLength: 8 }),
        (layout, edits) => {
          const who = person(
            10,
            notebookState(layout.map((isBlock, index) => (isBlock ? block(index) : paragraph(`p${index}`)))),
          );
          let fresh = 100;
          for (const { what, at, to } of edits) {
            const count = who.editor.state.doc.childCount;
            const before = new Map(
              blockElements(who.fragment).map((element) => [attributeOf(element, "blockId"), element]),
            );
            const [from, until] = [at % (count + 1), to % (count + 1)].sort((a, b) => a - b) as [
              number,
              number,
            ];
            let moved: string | undefined;
            if (what === "delete" && from < until) who.editor.commands.deleteRange(range(who, from, until));
            if (what === "insert block")
              who.editor.commands.insertContentAt(range(who, from, from).from, block(fresh++));
            if (what === "insert prose")
              who.editor.commands.insertContentAt(range(who, from, from).from, paragraph("new"));
            if (what === "type") {
              const { tr } = who.editor.state;
              // Two places at once: the binding then has no run of equal children at either end.
              const places: number[] = [];
              who.editor.state.doc.forEach((node, offset) => {
                if (node.isTextblock) places.push(offset + 1);
              });
              for (const place of [...places].reverse()) tr.insertText("x", place);
              if (places.length > 0) who.editor.view.dispatch(tr);
            }
            if (what === "move" && from < count && until !== from && until !== from + 1) {
              const node = who.editor.state.doc.child(from);
              moved = node.type.name === "scaling" ? String(node.attrs["blockId"]) : undefined;
              const own = range(who, from, from + 1);
              const target = range(who, until, until).from;
              who.editor.view.dispatch(who.editor.state.tr.insert(target, node).delete(own.from, own.to));
            }
            const after = blockElements(who.fragment);
            const present = names(who).filter((name) => name !== "p");
            expect(after.map((element) => attributeOf(element, "blockId"))).toEqual(present);
            for (const element of after) {
              const id = attributeOf(element, "blockId");
              if (before.has(id) && id !== moved) expect(element, `${what}: ${id}`).toBe(before.get(id));
              expect(attributeOf(element, "title")).toBe(`title ${id.slice(1)}`);
            }
            expect(placedBlocks(who.editor.state.doc)).toHaveLength(present.length);
          }
          leave(who);
        },
      ),
      {
        numRuns: 60,
        examples: [
          // Found by a random run: prose moved past a block took the block with it.
          [
            [false, false, false, false, true],
            [
              { what: "insert prose", at: 0, to: 0 },
              { what: "delete", at: 18, to: 0 },
              { what: "move", at: 0, to: 11 },
            ],
          ],
        ],
      },
    );
  });

  it("give up as few as can be when their order changes", () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.nat(50), { maxLength: 9 }), (values) => {
        const kept = longestRising(values).map((index) => values[index] ?? 0);
        expect(kept).toEqual([...kept].sort((a, b) => a - b));
        // All subsets, by brute force: none that rises is longer.
        let best = 0;
        for (let mask = 0; mask < 2 ** values.length; mask++) {
          const chosen = values.filter((_, index) => (mask >> index) & 1);
          if (chosen.every((value, index) => index === 0 || value > (chosen[index - 1] ?? 0)))
            best = Math.max(best, chosen.length);
        }
        expect(kept).toHaveLength(best);
      }),
      { numRuns: 50 },
    );
  });
});
