/** One node per block kind, made from the kind's shape, and the rows and cells of its tables. */
import { Node, type AnyExtension } from "@tiptap/core";
import type { BlockDescription } from "#engine/kind.ts";
import { cellNode, rowNode } from "./block-structure.ts";
import { carried, textAttributes } from "./text-attributes.ts";

/** The node of a kind: `row*` is the only content, so no merge of two people's edits can make it invalid. */
export function blockNodeOf(kind: BlockDescription): AnyExtension {
  const initial: Record<string, string> = { blockId: "", standsOn: "" };
  for (const [name, field] of Object.entries(kind.shape.fields)) {
    if (name in initial)
      throw new Error(`the field ${name} of ${kind.kind} has the name of an attribute every block has`);
    initial[name] = field.initial;
  }
  return Node.create({
    name: kind.kind,
    group: "block",
    content: `${rowNode}*`,
    atom: true,
    isolating: true,
    defining: true,
    addAttributes: () => textAttributes(initial),
    parseHTML: () => [{ tag: `div[data-block="${kind.kind}"]` }],
    renderHTML: ({ node }) => ["div", { "data-block": kind.kind, ...carried(node.attrs) }, 0],
    renderText: ({ node }) => `[${kind.title}${nameOf(node.attrs)}]`,
  });
}

function nameOf(attributes: Readonly<Record<string, unknown>>): string {
  const name = attributes["name"] ?? attributes["title"];
  return typeof name === "string" && name !== "" ? `: ${name}` : "";
}

export const Row = Node.create({
  name: rowNode,
  content: `${cellNode}*`,
  selectable: false,
  addAttributes: () => textAttributes({ table: "", rowId: "", order: "" }),
  parseHTML: () => [{ tag: "div[data-row]" }],
  renderHTML: ({ node }) => ["div", { "data-row": "", ...carried(node.attrs) }, 0],
});

export const Cell = Node.create({
  name: cellNode,
  selectable: false,
  addAttributes: () => textAttributes({ field: "", value: "" }),
  parseHTML: () => [{ tag: "div[data-cell]" }],
  renderHTML: ({ node }) => ["div", { "data-cell": "", ...carried(node.attrs) }],
});
