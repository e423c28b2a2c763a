/** Views of the document's blocks and pins, and what keeps them whole while one edits around them. */
import type { AnyExtension, NodeViewRenderer } from "@tiptap/core";
import { kindNames } from "#engine/kind.ts";
import { pinNode } from "#schema/block-structure.ts";
import { pinNodeView } from "../pins/pin-node-view.tsx";
import { PinShortcut } from "../pins/open-pin-picker.ts";
import { PinKeyboard } from "../pins/pin-keyboard.ts";
import { ProseCaret } from "../pins/prose-caret.ts";
import { BlockCare } from "./block-care.ts";
import { BlockKeyboard } from "./block-keyboard.ts";
import { blockNodeView } from "./block-node-view.tsx";
import { BlockPairing } from "./block-pairing.ts";
import type { BlockWorld } from "./block-world.ts";

/** Views by node name. */
export const blockViews: Readonly<Record<string, NodeViewRenderer>> = {
  ...Object.fromEntries(kindNames.map((kind) => [kind, blockNodeView])),
  [pinNode]: pinNodeView,
};

/** Behaviour that goes with the views. */
export function blockExtensions(world: BlockWorld): readonly AnyExtension[] {
  return [
    BlockPairing,
    BlockCare.configure({ world }),
    BlockKeyboard.configure({ world }),
    PinKeyboard.configure({ world }),
    PinShortcut,
    ProseCaret,
  ];
}
