/** Opening, placing and writing formulas of the document. */
import type { Editor } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { TextSelection, type Transaction } from "@tiptap/pm/state";
import { newId } from "../new-id.ts";
import { OPEN_FORMULA } from "./math-node-view.ts";

export function openFormulaAt(editor: Editor, position: number, how: "new" | "kept"): boolean {
  const element = editor.view.nodeDOM(position);
  if (!(element instanceof HTMLElement)) return false;
  element.dispatchEvent(new CustomEvent(OPEN_FORMULA, { detail: how }));
  return true;
}

/** Puts a formula at the caret and opens it. */
export function insertFormula(editor: Editor): void {
  if (!placeFormula(editor, false, { latex: "" })) return;
  openFormulaAt(editor, editor.state.selection.from - 1, "new");
}

export function placeFormula(
  editor: Editor,
  display: boolean,
  attributes: Readonly<Record<string, string>>,
): boolean {
  const attrs = display ? { ...attributes, id: newId() } : attributes;
  editor.commands.startNewStep();
  return editor
    .chain()
    .insertContent({ type: display ? "displayMath" : "inlineMath", attrs })
    .run();
}

/** Writes what was typed; an empty formula is removed. The caret is left behind (or before) it. */
export function writeFormula(
  editor: Editor,
  position: number,
  attributes: Readonly<Record<string, string>>,
  leave: "before" | "after" = "after",
): void {
  const { state } = editor;
  const node = state.doc.nodeAt(position);
  if (!node || !isFormula(node.type.name)) return;
  editor.commands.startNewStep();
  const { tr } = state;
  if ((attributes["latex"] ?? "").trim() === "") {
    if (node.isInline) tr.delete(position, position + node.nodeSize);
    else tr.replaceWith(position, position + node.nodeSize, state.schema.nodes["paragraph"]?.create() ?? []);
    tr.setSelection(
      TextSelection.near(tr.doc.resolve(Math.min(position + (node.isInline ? 0 : 1), tr.doc.content.size))),
    );
  } else {
    for (const [name, value] of Object.entries(attributes)) {
      if (node.attrs[name] !== value) tr.setNodeAttribute(position, name, value);
    }
    if (node.isInline) {
      tr.setSelection(TextSelection.create(tr.doc, leave === "after" ? position + node.nodeSize : position));
    } else {
      // One goes on writing after the equation; left selected, it would be replaced by the next letter.
      goBeside(tr, position, node, leave);
    }
  }
  editor.view.dispatch(tr.scrollIntoView());
}

/** Puts the caret into the text before or after a displayed equation, making a paragraph where there is none. */
export function goBeside(tr: Transaction, position: number, node: Node, side: "before" | "after"): void {
  const gap = side === "after" ? position + node.nodeSize : position;
  const $gap = tr.doc.resolve(gap);
  const neighbour = side === "after" ? $gap.nodeAfter : $gap.nodeBefore;
  if (neighbour?.isTextblock) {
    tr.setSelection(TextSelection.create(tr.doc, side === "after" ? gap + 1 : gap - 1));
    return;
  }
  const paragraph = tr.doc.type.schema.nodes["paragraph"];
  if (!paragraph) return;
  tr.insert(gap, paragraph.create());
  tr.setSelection(TextSelection.create(tr.doc, gap + 1));
}

export function isFormula(name: string): boolean {
  return name === "inlineMath" || name === "displayMath";
}
