/** Keys on a selected pin: Enter accepts a value that moved, or opens the pin; nothing typed replaces it unseen. */
import { Extension } from "@tiptap/core";
import { NodeSelection, Plugin, PluginKey } from "@tiptap/pm/state";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import type { BlockWorld } from "../blocks/block-world.ts";
import { acceptPin } from "./place-pin.ts";
import { pinStateOf } from "./pin-view-state.ts";

export const PinKeyboard = Extension.create<{ readonly world: BlockWorld | null }>({
  name: "pinKeyboard",
  priority: 1050,
  addOptions: () => ({ world: null }),
  addProseMirrorPlugins() {
    const { editor } = this;
    const { world } = this.options;
    return [
      new Plugin({
        key: new PluginKey("pinKeyboard"),
        props: {
          handleKeyDown(view, event) {
            const { selection } = view.state;
            if (!world || !(selection instanceof NodeSelection) || selection.node.type.name !== pinNode)
              return false;
            if (event.key !== "Enter" || event.isComposing || event.ctrlKey || event.metaKey || event.altKey)
              return false;
            const pin = selection.node.attrs as PinAttributes; // the schema gives a pin these
            const state = pinStateOf(
              pin,
              world.directory.block(pin.blockId) !== null,
              world.results.result(pin.blockId),
            );
            if (state.status === "moved" && view.editable) acceptPin(world, editor, selection.from);
            else openPin(view.nodeDOM(selection.from));
            return true;
          },
        },
      }),
    ];
  },
});

function openPin(element: globalThis.Node | null): void {
  if (element instanceof HTMLElement) element.querySelector<HTMLElement>(".pin-figure")?.click();
}
