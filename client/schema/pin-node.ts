/** A computed value in prose: an inline atom that reads, prints and exports with no request. */
import { Node } from "@tiptap/core";
import { pinNode, type PinAttributes } from "./block-structure.ts";
import { carried, textAttributes } from "./text-attributes.ts";

const emptyPin: Readonly<Record<keyof PinAttributes, string>> = {
  pinId: "",
  blockId: "",
  scalar: "",
  resultKey: "",
  value: "",
  text: "",
  format: "",
};

export const Pin = Node.create({
  name: pinNode,
  group: "inline",
  inline: true,
  atom: true,
  addAttributes: () => textAttributes(emptyPin),
  parseHTML: () => [{ tag: "span[data-pin]" }],
  renderHTML({ node }) {
    return ["span", { "data-pin": "", ...carried(node.attrs) }, String(node.attrs["text"])];
  },
  renderText({ node }) {
    return String(node.attrs["text"]);
  },
});
