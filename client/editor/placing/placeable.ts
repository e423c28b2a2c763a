/** What can be placed between two paragraphs, in the order of the index. */
import type { Editor } from "@tiptap/core";
import { kindDescriptions } from "#engine/descriptions.ts";
import { newId } from "../new-id.ts";
import { openFormulaAt } from "../mathematics/formula-changes.ts";
import { placeBlock, placeNode } from "./place.ts";

export interface Placeable {
  readonly id: string;
  readonly group: "Blocks" | "Numbers" | "Mathematics" | "Prose";
  readonly title: string;
  readonly purpose: string;
  place(editor: Editor, gap: number, open: Openers): void;
}

/** What a choice may open instead of placing something at once. */
export interface Openers {
  pinPicker(): void;
}

const blocks: readonly Placeable[] = Object.values(kindDescriptions).map(({ kind, title, purpose }) => ({
  id: kind,
  group: "Blocks",
  title,
  purpose,
  place: (editor, gap) => {
    placeBlock(editor, kind, gap);
  },
}));

function prose(id: string, title: string, purpose: string, json: object): Placeable {
  return {
    id,
    group: "Prose",
    title,
    purpose,
    place(editor, gap) {
      placeNode(editor, editor.schema.nodeFromJSON(json), gap);
      editor.commands.focus();
    },
  };
}
const paragraph = { type: "paragraph" };
const item = { type: "listItem", content: [paragraph] };
const row = (type: string) => ({
  type: "tableRow",
  content: Array.from({ length: 3 }, () => ({ type, content: [paragraph] })),
});

export const placeables: readonly Placeable[] = [
  ...blocks,
  {
    id: "pin",
    group: "Numbers",
    title: "Pin",
    purpose: "A number of a result, put into the sentence where the caret stands; it says when it has moved.",
    place: (_editor, _gap, open) => {
      open.pinPicker();
    },
  },
  {
    id: "displayMath",
    group: "Mathematics",
    title: "Displayed equation",
    purpose: "An equation on a line of its own, numbered. Typing $$ does the same.",
    place(editor, gap) {
      const node = editor.schema.nodeFromJSON({
        type: "displayMath",
        attrs: { latex: "", label: "", id: newId() },
      });
      openFormulaAt(editor, placeNode(editor, node, gap), "new");
    },
  },
  prose("paragraph", "Paragraph", "Plain prose.", paragraph),
  prose("heading-1", "Section", "A heading of the first level, numbered 1.", {
    type: "heading",
    attrs: { level: 1 },
  }),
  prose("heading-2", "Subsection", "A heading of the second level, numbered 1.1.", {
    type: "heading",
    attrs: { level: 2 },
  }),
  prose("heading-3", "Part of a subsection", "A heading of the third level, numbered 1.1.1.", {
    type: "heading",
    attrs: { level: 3 },
  }),
  prose("bulletList", "List", "Items with marks.", { type: "bulletList", content: [item] }),
  prose("orderedList", "Numbered list", "Items in an order.", { type: "orderedList", content: [item] }),
  prose("blockquote", "Quotation", "Someone else's words, set apart.", {
    type: "blockquote",
    content: [paragraph],
  }),
  prose("codeBlock", "Code", "Lines exactly as typed, in the notation face.", { type: "codeBlock" }),
  prose("table", "Table of text", "Three columns with a heading row; rows and columns can be added.", {
    type: "table",
    content: [row("tableHeader"), row("tableCell"), row("tableCell")],
  }),
  prose("horizontalRule", "Rule", "A hairline between two thoughts.", { type: "horizontalRule" }),
];

/** Those whose title or purpose has every word that was typed; titles first. */
export function findPlaceables(typed: string, all: readonly Placeable[] = placeables): readonly Placeable[] {
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  const matches = (text: string) => words.every((word) => text.toLowerCase().includes(word));
  const inTitle = all.filter(({ title }) => matches(title));
  return [
    ...inTitle,
    ...all.filter((one) => !inTitle.includes(one) && matches(`${one.title} ${one.purpose}`)),
  ];
}
