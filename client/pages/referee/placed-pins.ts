/** The pinned numbers of a document in its order, each with its sentence. */
import type { Node } from "@tiptap/pm/model";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import { excerptOf, type Excerpt } from "./sentence-excerpt.ts";

export interface PlacedPin {
  /** Among equal pin ids, which a paste may leave for a moment, the place tells them apart. */
  readonly key: string;
  readonly position: number;
  readonly pin: PinAttributes;
  readonly excerpt: Excerpt;
}

export function placedPins(doc: Node): readonly PlacedPin[] {
  const pins: PlacedPin[] = [];
  const met = new Map<string, number>();
  doc.descendants((node, position) => {
    if (!node.isTextblock) return true;
    node.forEach((child, offset) => {
      if (child.type.name !== pinNode) return;
      const pin = child.attrs as PinAttributes; // the schema gives a pin these
      const copies = met.get(pin.pinId) ?? 0;
      met.set(pin.pinId, copies + 1);
      pins.push({
        key: `${pin.pinId}/${copies}`,
        position: position + 1 + offset,
        pin,
        excerpt: excerptOf(node, offset),
      });
    });
    return false;
  });
  return pins;
}
