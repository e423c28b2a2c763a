/** A block in the editor: one element that React draws into and ProseMirror leaves alone. */
import type { NodeViewRendererProps } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import type { NodeView } from "@tiptap/pm/view";
import { ReactRenderer } from "@tiptap/react";
import { BlockInEditor, type BlockInEditorProps } from "./block-in-editor.tsx";

/** Where the block stands, for drawing: the position is asked anew each time, since prose above moves it. */
export function blockNodeView({ editor, node, getPos }: NodeViewRendererProps): NodeView {
  const renderer = new ReactRenderer<unknown, BlockInEditorProps>(BlockInEditor, {
    editor,
    as: "div",
    className: "block-view",
    props: {
      editor,
      ownId: String(node.attrs["blockId"]),
      kind: node.type.name,
      selected: false,
      getPosition: getPos,
    },
  });
  const element = renderer.element;
  element.contentEditable = "false";
  return {
    dom: element,
    update(next: Node) {
      if (next.type !== node.type) return false;
      // Inputs are read from the shared document; all this view needs to know is which block it is.
      renderer.updateProps({ ownId: String(next.attrs["blockId"]) });
      return true;
    },
    selectNode() {
      element.classList.add("block-selected");
      renderer.updateProps({ selected: true });
    },
    deselectNode() {
      element.classList.remove("block-selected");
      renderer.updateProps({ selected: false });
    },
    stopEvent: (event) => isOwnEvent(event, element),
    ignoreMutation: () => true,
    destroy: () => renderer.destroy(),
  };
}

/** What happens in a control or in text that can be selected is the block's own; the frame around is the editor's. */
function isOwnEvent(event: Event, element: HTMLElement): boolean {
  if (event.type.startsWith("drag") || event.type === "drop") return false;
  if (!(event.target instanceof Element) || event.target === element) return false;
  return (
    event.target.closest(
      "input, select, textarea, button, a, summary, label, [data-block-body], [data-block-question]",
    ) !== null
  );
}
