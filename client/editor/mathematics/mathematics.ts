/** Typing mathematics: `$…$` in a sentence, `$$` for a displayed equation; Enter on a formula opens it. */
import { Extension, InputRule, type AnyExtension, type Editor } from "@tiptap/core";
import { NodeSelection, TextSelection } from "@tiptap/pm/state";
import type { NotebookHistory } from "../history.ts";
import { newId } from "../new-id.ts";
import { OPEN_FORMULA } from "./math-node-view.ts";

/**
 * The closing dollar of `$…$`: no white space just inside, so that "between $5 and $7" stays as typed, as in the
 * usual reading of dollar signs; `\$` is a dollar sign.
 */
export const inlineMathTyped = /(?<![\\$])\$(?![\s$])((?:[^$\\]|\\.)*?[^\s$\\]|\\[^\s$])\$$/;
/** The second of two dollars. */
export const displayMathTyped = /(?<![\\$])\$\$$/;

export function mathematicsTyping(history: NotebookHistory): AnyExtension {
  return Extension.create({
    name: "mathematicsTyping",
    addInputRules() {
      const { editor } = this;
      return [
        new InputRule({
          find: inlineMathTyped,
          handler({ state, range, match }) {
            const type = state.schema.nodes["inlineMath"];
            if (!type || !state.selection.$from.parent.type.contentMatch.matchType(type)) return null;
            history.startNewStep();
            state.tr.replaceWith(range.from, range.to, type.create({ latex: match[1] ?? "" }));
            return undefined;
          },
        }),
        new InputRule({
          find: displayMathTyped,
          handler({ state, range }) {
            if (!insertDisplayed(state, range)) return null;
            history.startNewStep();
            openSoon(editor);
            return undefined;
          },
        }),
      ];
    },
    addKeyboardShortcuts() {
      return { Enter: () => openSelectedFormula(this.editor) };
    },
  });
}

type RuleState = Parameters<InputRule["handler"]>[0]["state"];

function insertDisplayed(state: RuleState, range: { from: number; to: number }): boolean {
  const type = state.schema.nodes["displayMath"];
  const $from = state.doc.resolve(range.from);
  if (!type || !$from.parent.isTextblock || $from.parent.type.spec.code || $from.depth === 0) return false;
  const { tr } = state;
  tr.delete(range.from, range.to);
  const $at = tr.doc.resolve(range.from);
  const container = $at.node(-1);
  const index = $at.index(-1);
  if (!container.canReplaceWith(index + 1, index + 1, type)) return false;
  const node = type.create({ latex: "", label: "", id: newId() });
  if ($at.parent.content.size === 0 && container.canReplaceWith(index, index + 1, type)) {
    tr.replaceWith($at.before(), $at.after(), node);
  } else if ($at.parentOffset === $at.parent.content.size) {
    tr.insert($at.after(), node);
  } else {
    tr.split($at.pos);
    tr.insert($at.pos + 1, node);
  }
  let position = -1;
  tr.doc.descendants((candidate, at) => {
    if (candidate === node) position = at;
    return position === -1;
  });
  if (position === -1) return false;
  tr.setSelection(NodeSelection.create(tr.doc, position));
  return true;
}

/** Enter on a selected formula opens it, as a click does. */
function openSelectedFormula(editor: Editor): boolean {
  const { selection } = editor.state;
  if (!(selection instanceof NodeSelection) || !isFormula(selection.node.type.name)) return false;
  return openFormulaAt(editor, selection.from, "kept");
}

function openSoon(editor: Editor): void {
  // The node's view exists once the transaction of the input rule has been drawn.
  queueMicrotask(() => {
    if (!editor.isDestroyed) openFormulaAt(editor, editor.state.selection.from, "new");
  });
}

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
      tr.setSelection(NodeSelection.create(tr.doc, position));
    }
  }
  editor.view.dispatch(tr.scrollIntoView());
}

function isFormula(name: string): boolean {
  return name === "inlineMath" || name === "displayMath";
}
