/**
 * Asks before an edit of the prose takes away a block that a colleague is in: cutting, pasting over, dragging, quoting
 * and listing make a block anew, and what is typed in it at that moment is lost.
 */
import { Extension, type Editor } from "@tiptap/core";
import { Plugin, type Transaction } from "@tiptap/pm/state";
import { ySyncPluginKey } from "@tiptap/y-tiptap";
import { say } from "../../ui/notices.ts";
import { blockPlaces } from "./block-places.ts";
import type { BlockWorld } from "./block-world.ts";
import { agreed, careKey, isAgreed, occupiedQuestion } from "./occupied.ts";
import { placedBlocks, sameBlocks, takenFrom } from "./placed-blocks.ts";

export const BlockCare = Extension.create<{ readonly world: BlockWorld | null }>({
  name: "blockCare",
  addOptions: () => ({ world: null }),
  addProseMirrorPlugins() {
    const { world } = this.options;
    return world ? [carePlugin(world, this.editor)] : [];
  },
});

export function carePlugin(world: BlockWorld, editor: Editor): Plugin {
  return new Plugin({
    key: careKey,
    filterTransaction(transaction) {
      if (!transaction.docChanged || isAgreed(transaction)) return true;
      if (transaction.getMeta(ySyncPluginKey) !== undefined) return true;
      const question = occupiedQuestion(world, disturbedBlocks(transaction), "changes place or goes");
      if (!question) return true;
      world.ask({
        ...question,
        yes: "Go on",
        act() {
          if (editor.state.doc.eq(transaction.before)) editor.view.dispatch(agreed(transaction));
          else say("The text has changed in the meantime. Please do it once more.", "refused");
        },
      });
      return false;
    },
  });
}

/** Ids of blocks that a transaction deletes, moves or nests otherwise. */
export function disturbedBlocks(transaction: Transaction): string[] {
  const [before, after] = [placedBlocks(transaction.before), placedBlocks(transaction.doc)];
  if (sameBlocks(before, after)) return [];
  const taken = takenFrom(transaction);
  const kept = new Map(after.map(({ node, depth }) => [node, depth]));
  const depths = new Map(before.map(({ node, depth }) => [node, depth]));
  return [...blockPlaces(transaction.before)]
    .filter(([, { node }]) => taken.has(node) || kept.get(node) !== depths.get(node))
    .map(([blockId]) => blockId);
}
