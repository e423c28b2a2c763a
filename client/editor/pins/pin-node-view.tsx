/** A pin in a sentence. What it shows comes from its own attributes, so it reads the same with nothing fetched. */
import type { NodeViewRendererProps } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import type { NodeView } from "@tiptap/pm/view";
import { ReactRenderer } from "@tiptap/react";
import { PinInProse, type PinInProseProps } from "./pin-in-prose.tsx";

export function pinNodeView({ editor, node, getPos }: NodeViewRendererProps): NodeView {
  const renderer = new ReactRenderer<unknown, PinInProseProps>(PinInProse, {
    editor,
    as: "span",
    className: "pin-view",
    props: { editor, node, selected: false, getPosition: getPos },
  });
  const element = renderer.element;
  element.contentEditable = "false";
  return {
    dom: element,
    update(next: Node) {
      if (next.type !== node.type) return false;
      renderer.updateProps({ node: next });
      return true;
    },
    selectNode: () => renderer.updateProps({ selected: true }),
    deselectNode: () => renderer.updateProps({ selected: false }),
    stopEvent: (event) =>
      event.target instanceof Element && event.target.closest("button, [data-pin-panel]") !== null,
    ignoreMutation: () => true,
    destroy: () => renderer.destroy(),
  };
}
