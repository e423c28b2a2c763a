/** Typing mathematics: `$…$` in a sentence, `$$` for a displayed equation; Enter on a formula opens it. */
import { Extension, InputRule, type AnyExtension, type Editor } from "@tiptap/core";
import { NodeSelection, Plugin, Selection, TextSelection } from "@tiptap/pm/state";
import type { NotebookHistory } from "../history.ts";
import { newId } from "../new-id.ts";
import { goBeside, isFormula, openFormulaAt } from "./formula-changes.ts";

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
      return {
        Enter: () => openSelectedFormula(this.editor),
        // From a selected formula or a gap the browser has no caret to move.
        "Ctrl-Home": () => goToEdge(this.editor, "start"),
        "Ctrl-End": () => goToEdge(this.editor, "end"),
      };
    },
    addProseMirrorPlugins() {
      const { editor } = this;
      return [
        new Plugin({
          props: {
            handleTextInput: (_view, _from, _to, text) => typeBesideFormula(editor, text),
          },
        }),
      ];
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

/** A letter typed on a selected formula goes after it: arrow keys select formulas in passing. */
function typeBesideFormula(editor: Editor, text: string): boolean {
  const { selection, tr } = editor.state;
  if (!(selection instanceof NodeSelection) || !isFormula(selection.node.type.name)) return false;
  if (selection.node.isInline) tr.setSelection(TextSelection.create(tr.doc, selection.to));
  else goBeside(tr, selection.from, selection.node, "after");
  editor.view.dispatch(tr.insertText(text).scrollIntoView());
  return true;
}

function goToEdge(editor: Editor, edge: "start" | "end"): boolean {
  const { selection, tr, doc } = editor.state;
  if (selection instanceof TextSelection) return false;
  tr.setSelection(edge === "start" ? Selection.atStart(doc) : Selection.atEnd(doc));
  editor.view.dispatch(tr.scrollIntoView());
  return true;
}

function openSoon(editor: Editor): void {
  // The node's view exists once the transaction of the input rule has been drawn.
  queueMicrotask(() => {
    if (!editor.isDestroyed) openFormulaAt(editor, editor.state.selection.from, "new");
  });
}
