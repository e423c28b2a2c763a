/** The blocks of a ProseMirror document, and which of them an edit takes from their place. */
import type { Node } from "@tiptap/pm/model";
import type { Transaction } from "@tiptap/pm/state";
import { isKindName } from "./block-elements.ts";

export interface PlacedBlock {
  readonly node: Node;
  /** Nesting depth: a block that is wrapped or lifted is another element in Y. */
  readonly depth: number;
}

const blocksWithin = new WeakMap<Node, readonly PlacedBlock[]>();

/** The blocks below a node in order; remembered per node, so a keystroke looks only at the paragraph it changed. */
export function placedBlocks(parent: Node): readonly PlacedBlock[] {
  const known = blocksWithin.get(parent);
  if (known) return known;
  const found: PlacedBlock[] = [];
  if (!parent.isTextblock) {
    parent.forEach((child) => {
      if (isKindName(child.type.name)) found.push({ node: child, depth: 0 });
      else for (const { node, depth } of placedBlocks(child)) found.push({ node, depth: depth + 1 });
    });
  }
  blocksWithin.set(parent, found);
  return found;
}

export function sameBlocks(before: readonly PlacedBlock[], after: readonly PlacedBlock[]): boolean {
  return (
    before.length === after.length &&
    before.every((block, index) => block.node === after[index]?.node && block.depth === after[index].depth)
  );
}

const none: ReadonlySet<Node> = new Set();

/** Top-level blocks whose place an edit deletes; if they are still in the document, they were moved. */
export function takenFrom(transaction: Transaction): ReadonlySet<Node> {
  const taken = new Set<Node>();
  transaction.before.forEach((child, offset) => {
    if (isKindName(child.type.name) && transaction.mapping.mapResult(offset).deletedAfter) taken.add(child);
  });
  return taken.size === 0 ? none : taken;
}
