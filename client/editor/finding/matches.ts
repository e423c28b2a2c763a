/** Where a text stands in a notebook: in its prose, formulas, pins and the entries of its blocks. */
import type { Node } from "@tiptap/pm/model";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { blockPlaces } from "../blocks/block-places.ts";

interface Span {
  readonly from: number;
  readonly to: number;
}
export type Match = Span &
  (
    | { readonly in: "text" }
    /** A formula or a pin, found by its source or by what it shows. */
    | { readonly in: "atom" }
    /** An entry of a block; `place` is the key of its field. The span is the block's. */
    | { readonly in: "block"; readonly blockId: string; readonly place: string }
  );

/** Stands for what is no text, so that offsets in the text of a paragraph are offsets in the paragraph. */
const ATOM = "\ufffc";

/** In document order. Upper and lower case are the same; an empty text is nowhere. */
export function findMatches(
  doc: Node,
  blocks: ReadonlyMap<string, BlockInstance>,
  wanted: string,
): readonly Match[] {
  const text = fold(wanted.trim());
  if (text === "") return [];
  const blockIds = new Map([...blockPlaces(doc)].map(([blockId, { position }]) => [position, blockId]));
  const found: Match[] = [];
  doc.descendants((node, position) => {
    const blockId = blockIds.get(position);
    if (blockId !== undefined) {
      const block = blocks.get(blockId);
      if (block) found.push(...entriesWith(block, text, position, position + node.nodeSize));
      return false;
    }
    if (node.isAtom && !node.isText) {
      const shown = node.attrs as Readonly<Record<string, unknown>>;
      if (
        [shown["latex"], shown["text"]].some((part) => typeof part === "string" && fold(part).includes(text))
      )
        found.push({ in: "atom", from: position, to: position + node.nodeSize });
      return false;
    }
    if (node.isTextblock) found.push(...spansIn(node, position + 1, text));
    return true;
  });
  return found.sort((a, b) => a.from - b.from);
}

function spansIn(paragraph: Node, start: number, wanted: string): Match[] {
  const text = fold(paragraph.textBetween(0, paragraph.content.size, ATOM, ATOM));
  const found: Match[] = [];
  for (let at = text.indexOf(wanted); at !== -1; at = text.indexOf(wanted, at + wanted.length))
    found.push({ in: "text", from: start + at, to: start + at + wanted.length });
  return found;
}

function entriesWith(block: BlockInstance, wanted: string, from: number, to: number): Match[] {
  const found: Match[] = [];
  const look = (value: string, place: string) => {
    if (fold(value).includes(wanted)) found.push({ in: "block", from, to, blockId: block.id, place });
  };
  for (const [name, value] of Object.entries(block.inputs)) {
    if (typeof value === "string") look(value, name);
    else
      for (const { id, ...columns } of value)
        for (const [column, typed] of Object.entries(columns)) look(typed, `${name}/${id}/${column}`);
  }
  return found;
}

/** Lower case letter by letter, so that the text keeps its length. */
export function fold(text: string): string {
  return Array.from({ length: text.length }, (_, index) => {
    const letter = text.charAt(index);
    const lower = letter.toLocaleLowerCase("en");
    return lower.length === 1 ? lower : letter;
  }).join("");
}
