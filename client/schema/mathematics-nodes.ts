/** Mathematics in the document: LaTeX source in an attribute, drawn by a view on the client. */
import { Node } from "@tiptap/core";

/** `$…$` within a sentence. */
export const InlineMath = Node.create({
  name: "inlineMath",
  group: "inline",
  inline: true,
  atom: true,
  addAttributes: () => ({
    latex: {
      default: "",
      parseHTML: (element: HTMLElement) => element.getAttribute("data-latex") ?? "",
      rendered: false,
    },
  }),
  parseHTML: () => [{ tag: 'span[data-mathematics="inline"]' }],
  renderHTML({ node }) {
    const latex = String(node.attrs["latex"]);
    return ["span", { "data-mathematics": "inline", "data-latex": latex }, `$${latex}$`];
  },
  renderText({ node }) {
    return `$${String(node.attrs["latex"])}$`;
  },
});

/** `$$…$$`, displayed and numbered in document order. `label` is what a writer calls it; `id` never changes. */
export const DisplayMath = Node.create({
  name: "displayMath",
  group: "block",
  atom: true,
  isolating: true,
  addAttributes: () => ({
    latex: {
      default: "",
      parseHTML: (element: HTMLElement) => element.getAttribute("data-latex") ?? "",
      rendered: false,
    },
    label: {
      default: "",
      parseHTML: (element: HTMLElement) => element.getAttribute("data-label") ?? "",
      rendered: false,
    },
    id: {
      default: "",
      parseHTML: (element: HTMLElement) => element.getAttribute("data-id") ?? "",
      rendered: false,
    },
  }),
  parseHTML: () => [{ tag: 'div[data-mathematics="display"]' }],
  renderHTML({ node }) {
    const latex = String(node.attrs["latex"]);
    const { label, id } = node.attrs;
    return [
      "div",
      {
        "data-mathematics": "display",
        "data-latex": latex,
        "data-label": String(label),
        "data-id": String(id),
      },
      `$$${latex}$$`,
    ];
  },
  renderText({ node }) {
    return `$$${String(node.attrs["latex"])}$$`;
  },
});
