/** Where the caret last stood in a sentence, kept while the focus is in a block or a list. */
import { Extension } from "@tiptap/core";
import { Plugin, PluginKey, TextSelection, type EditorState } from "@tiptap/pm/state";

const caretKey = new PluginKey<number | null>("proseCaret");

export const ProseCaret = Extension.create({
  name: "proseCaret",
  addProseMirrorPlugins: () => [
    new Plugin<number | null>({
      key: caretKey,
      state: {
        // A fresh editor's selection is nowhere a person has been.
        init: () => null,
        apply(transaction, last, _before, state) {
          const { selection } = state;
          if (transaction.selectionSet && selection instanceof TextSelection) return selection.to;
          return last === null ? null : transaction.mapping.map(last);
        },
      },
    }),
  ],
});

/** Null before anyone has been in the prose, or when the place is no longer in a sentence. */
export function lastProsePosition(state: EditorState): number | null {
  const last = caretKey.getState(state) ?? null;
  if (last === null || last > state.doc.content.size) return null;
  const { parent } = state.doc.resolve(last);
  return parent.inlineContent && !parent.type.spec.code ? last : null;
}
