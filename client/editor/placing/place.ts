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
  placeNode(editor, type.create({ blockId, standsOn }), gap);
  focusInside(editor, blockId);
  return blockId;
}

/** Two seconds at the usual rate: a block that is not drawn by then is left alone. */
const MOST_FRAMES = 120;

/** A form's first field takes the focus once the block is drawn: React takes its frames, most in a long notebook. */
function focusInside(editor: Editor, blockId: string, framesLeft = MOST_FRAMES): void {
  requestAnimationFrame(() => {
    if (editor.isDestroyed) return;
    const element = elementOfBlock(editor, blockId);
    const field = element?.querySelector<HTMLElement>(
      "input, textarea, select, [contenteditable=true], button",
    );
    if (element && field) {
      element.scrollIntoView({ block: "nearest" });
      field.focus();
    } else if (framesLeft > 0) {
      focusInside(editor, blockId, framesLeft - 1);
    }
  });
}

/** Looked for by its id: a colleague may have written above it since. */
function elementOfBlock(editor: Editor, blockId: string): HTMLElement | null {
  let found: HTMLElement | null = null;
  editor.state.doc.forEach((node, offset) => {
    if (node.attrs["blockId"] !== blockId) return;
    const element = editor.view.nodeDOM(offset);
    if (element instanceof HTMLElement) found = element;
  });
  return found;
}
