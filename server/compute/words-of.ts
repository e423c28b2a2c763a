/** The words of a shared document, for the search of the shelf: prose, formulas, pins and what blocks were given. */
import * as Y from "yjs";

/** A long paper has half as much. */
const MOST_CHARACTERS = 200_000;
/** What is written into attributes by people, whatever the node. */
const ownAttributes = new Set([
  "blockId",
  "standsOn",
  "rowId",
  "order",
  "table",
  "field",
  "pinId",
  "resultKey",
]);

/** Total, and without recursion: a document may be nested deeper than the call stack. */
export function wordsOf(fragment: Y.XmlFragment): string {
  const words: string[] = [];
  let length = 0;
  const waiting: unknown[] = [fragment];
  while (waiting.length > 0 && length < MOST_CHARACTERS) {
    const node = waiting.pop();
    const text =
      node instanceof Y.XmlFragment ? shownOf(node) : node instanceof Y.XmlText ? textOf(node) : "";
    if (text !== "") {
      words.push(text);
      length += text.length + 1;
    }
    if (node instanceof Y.XmlFragment) waiting.push(...node.toArray().reverse());
  }
  return words.join(" ").replace(/\s+/g, " ").slice(0, MOST_CHARACTERS).trim();
}

function textOf(node: Y.XmlText): string {
  // What is embedded in a text (a formula, a pin) is no string; it is an element of its own beside it.
  return (node.toDelta() as readonly { readonly insert?: unknown }[])
    .map(({ insert }) => (typeof insert === "string" ? insert : ""))
    .join("");
}

function shownOf(node: Y.XmlFragment): string {
  if (!(node instanceof Y.XmlElement)) return "";
  return Object.entries<unknown>(node.getAttributes())
    .flatMap(([name, value]) =>
      typeof value === "string" && value.length > 1 && !ownAttributes.has(name) && !isId(value)
        ? [value]
        : [],
    )
    .join(" ");
}

function isId(value: string): boolean {
  return /^[0-9a-f]{8}-[0-9a-f]{4}-|^[{[]/.test(value);
}
