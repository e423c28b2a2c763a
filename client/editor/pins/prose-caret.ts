/** Where the caret last stood in a sentence, kept while the focus is in a block or a list. */
import { Extension } from "@tiptap/core";
import { Plugin, PluginKey, TextSelection, type EditorState } from "@tiptap/pm/state";
import {
  absolutePositionToRelativePosition,
  relativePositionToAbsolutePosition,
  ySyncPluginKey,
  type ProsemirrorBinding,
} from "@tiptap/y-tiptap";
import type * as Y from "yjs";

interface Caret {
  readonly position: number;
  /** The same place in the shared document, taken when the caret left the prose. */
  readonly relative: Y.RelativePosition | null;
}
const caretKey = new PluginKey<Caret | null>("proseCaret");

/**
 * A change of the shared document, a block's own field included, reaches ProseMirror as a new document, through which
 * no position can be mapped. The place in the shared document survives it.
 */
export const ProseCaret = Extension.create({
  name: "proseCaret",
  addProseMirrorPlugins: () => [
    new Plugin<Caret | null>({
      key: caretKey,
      state: {
        // A fresh editor's selection is nowhere a person has been.
        init: () => null,
        apply(transaction, last, before, after) {
          const { selection } = after;
          // The plugin's own mark of a transaction that comes from the shared document.
          const change = transaction.getMeta(ySyncPluginKey) as { isChangeOrigin?: boolean } | undefined;
          const shared = change?.isChangeOrigin === true;
          if (last === null && (shared || !transaction.selectionSet)) return null;
          if (selection instanceof TextSelection) return { position: selection.to, relative: null };
          if (last === null) return null;
          const relative = last.relative ?? relativeTo(before, last.position);
          if (!transaction.docChanged) return { position: last.position, relative };
          if (!shared) return { position: transaction.mapping.map(last.position), relative };
          const position = relative && absoluteOf(after, relative);
          return position === null ? null : { position, relative };
        },
      },
    }),
  ],
});

/** Null before anyone has been in the prose, or when the place is no longer in a sentence. */
export function lastProsePosition(state: EditorState): number | null {
  const position = caretKey.getState(state)?.position ?? null;
  if (position === null || position > state.doc.content.size) return null;
  const { parent } = state.doc.resolve(position);
  return parent.inlineContent && !parent.type.spec.code ? position : null;
}

interface SyncState {
  readonly doc: Y.Doc;
  readonly type: Y.XmlFragment;
  readonly binding: ProsemirrorBinding;
}
function syncOf(state: EditorState): SyncState | null {
  // The plugin's state is not typed by the package; these are the members it documents and we read.
  return (ySyncPluginKey.getState(state) as SyncState | undefined) ?? null;
}

function relativeTo(state: EditorState, position: number): Y.RelativePosition | null {
  const sync = syncOf(state);
  if (!sync) return null;
  // Typed any by the package; it is a relative position of Yjs.
  return absolutePositionToRelativePosition(position, sync.type, sync.binding.mapping) as Y.RelativePosition;
}

function absoluteOf(state: EditorState, relative: Y.RelativePosition): number | null {
  const sync = syncOf(state);
  return sync && relativePositionToAbsolutePosition(sync.doc, sync.type, relative, sync.binding.mapping);
}
