/** Keys on a selected block. Arrow keys select it like any node; what one types there must not replace it. */
import { Extension, type Editor } from "@tiptap/core";
import { NodeSelection, Plugin, PluginKey, TextSelection, type EditorState } from "@tiptap/pm/state";
import type { EditorView } from "@tiptap/pm/view";
import { isKindName } from "./block-elements.ts";
import { blockIdAt, deleteBlock, moveBlock } from "./block-places.ts";
import type { BlockWorld } from "./block-world.ts";

export interface BlockKeyboardOptions {
  readonly world: BlockWorld | null;
}

export const BlockKeyboard = Extension.create<BlockKeyboardOptions>({
  name: "blockKeyboard",
  // Before the keys of prose, for which Enter on a selected node would begin a paragraph.
  priority: 1050,
  addOptions: () => ({ world: null }),
  addProseMirrorPlugins() {
    const { world } = this.options;
    return world ? [keyboardPlugin(world, this.editor)] : [];
  },
});

export function keyboardPlugin(world: BlockWorld, editor: Editor): Plugin {
  return new Plugin({
    key: new PluginKey("blockKeyboard"),
    props: {
      handleKeyDown(view, event) {
        const position = selectedBlock(view.state);
        if (position === null || event.isComposing) return false;
        const blockId = blockIdAt(view.state.doc, position);
        const plain = !event.ctrlKey && !event.metaKey && !event.altKey;
        if (event.key === "Enter" && plain) return enterBlock(view, position);
        if (!view.editable || blockId === null) return false;
        if (plain && (event.key === "Backspace" || event.key === "Delete")) {
          deleteBlock(world, editor, blockId);
          return true;
        }
        if (event.altKey && (event.key === "ArrowUp" || event.key === "ArrowDown")) {
          moveBlock(world, editor, blockId, event.key === "ArrowUp" ? -1 : 1);
          return true;
        }
        return false;
      },
      // A letter typed on a selected block would take its place, inputs and all.
      handleTextInput: (view) => selectedBlock(view.state) !== null,
      handlePaste(view, _event, slice) {
        const position = selectedBlock(view.state);
        if (position === null) return false;
        const node = view.state.doc.nodeAt(position);
        const after = position + (node?.nodeSize ?? 0);
        const { tr } = view.state;
        tr.replaceRange(after, after, slice);
        tr.setSelection(
          TextSelection.near(tr.doc.resolve(Math.min(after + slice.size, tr.doc.content.size)), -1),
        );
        view.dispatch(tr.scrollIntoView());
        return true;
      },
    },
  });
}

export function selectedBlock(state: EditorState): number | null {
  const { selection } = state;
  return selection instanceof NodeSelection && isKindName(selection.node.type.name) ? selection.from : null;
}

/** Puts the focus on the first thing to type or press inside. */
function enterBlock(view: EditorView, position: number): boolean {
  const element = view.nodeDOM(position);
  if (!(element instanceof HTMLElement)) return true;
  const first =
    element.querySelector<HTMLElement>("[data-block-body] :is(input, select, textarea)") ??
    element.querySelector<HTMLElement>("button, summary, a[href]");
  first?.focus();
  return true;
}
