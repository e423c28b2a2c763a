/** Placing something new into the document. */
import type { Editor } from "@tiptap/core";
import { Fragment, type Node } from "@tiptap/pm/model";
import { NodeSelection, TextSelection, type Transaction } from "@tiptap/pm/state";
import type { KindName } from "#engine/kind.ts";
import { newId } from "../new-id.ts";

/** The gap a new top-level node goes into: before the child at this index of the document. */
export function gapAtCaret(editor: Editor): number {
  const { $to, to } = editor.state.selection;
  if ($to.depth === 0) return editor.state.doc.resolve(to).index(0);
  return $to.indexAfter(0) === $to.index(0) ? $to.index(0) + 1 : $to.indexAfter(0);
}

/** Puts a node into the gap, in place of an empty paragraph just before it, and selects it. Returns its position. */
export function placeNode(editor: Editor, node: Node, gap: number): number {
  editor.commands.startNewStep();
  const { doc, tr } = editor.state;
  const index = Math.min(Math.max(gap, 0), doc.childCount);
  const before = index > 0 ? doc.child(index - 1) : null;
  let position = 0;
  for (let child = 0; child < index; child += 1) position += doc.child(child).nodeSize;
  if (before?.type.name === "paragraph" && before.content.size === 0) {
    position -= before.nodeSize;
    tr.replaceWith(position, position + before.nodeSize, node);
  } else {
    tr.insert(position, node);
  }
  leaveRoomAfter(tr, position + node.nodeSize);
  const inside = position + (node.isAtom ? node.nodeSize : 1);
  tr.setSelection(
    node.isAtom && node.type.name !== "horizontalRule"
      ? NodeSelection.create(tr.doc, position)
      : TextSelection.near(tr.doc.resolve(inside)),
  );
  editor.view.dispatch(tr.scrollIntoView());
  return position;
}

/** A block at the very end would leave no place to go on writing. */
function leaveRoomAfter(tr: Transaction, position: number): void {
  const paragraph = tr.doc.type.schema.nodes["paragraph"];
  if (position === tr.doc.content.size && paragraph && !tr.doc.lastChild?.isTextblock) {
    tr.insert(position, Fragment.from(paragraph.create()));
  }
}

/** A new block of a kind with ids of its own, in the gap or after the caret. Returns its block id. */
export function placeBlock(editor: Editor, kind: KindName, gap = gapAtCaret(editor), standsOn = ""): string {
  const type = editor.schema.nodes[kind];
  if (!type) throw new Error(`the schema has no node for ${kind}`);
  const blockId = newId();
  const position = placeNode(editor, type.create({ blockId, standsOn }), gap);
  focusInside(editor, position);
  return blockId;
}

/** A form's first field takes the focus once the block is drawn. */
function focusInside(editor: Editor, position: number): void {
  requestAnimationFrame(() => {
    if (editor.isDestroyed) return;
    const element = editor.view.nodeDOM(position);
    if (!(element instanceof HTMLElement)) return;
    element.scrollIntoView({ block: "nearest" });
    element.querySelector<HTMLElement>("input, textarea, select, [contenteditable=true], button")?.focus();
  });
}
