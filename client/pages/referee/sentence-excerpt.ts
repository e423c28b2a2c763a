/** The sentence that a pinned number stands in, short enough for a line or two. */
import type { Node } from "@tiptap/pm/model";
import { pinNode } from "#schema/block-structure.ts";

export type ExcerptPart =
  | { readonly part: "text"; readonly text: string }
  | { readonly part: "math"; readonly latex: string }
  /** Another pinned number of the same sentence. */
  | { readonly part: "number"; readonly text: string };

export interface Excerpt {
  readonly before: readonly ExcerptPart[];
  readonly after: readonly ExcerptPart[];
}

const MOST_BEFORE = 120;
const MOST_AFTER = 80;
/** The end of a sentence, and the beginning of the next: a mark, a space, and no small letter. */
const sentenceEnd = /[.!?…][)\]”’"']*\s+(?=[^\s\p{Ll}]|$)/gu;

/** @param offset where the pin stands among the children of its paragraph */
export function excerptOf(paragraph: Node, offset: number): Excerpt {
  const before: ExcerptPart[] = [];
  const after: ExcerptPart[] = [];
  paragraph.forEach((child, at) => {
    if (at === offset) return;
    const part = partOf(child);
    if (part) (at < offset ? before : after).push(part);
  });
  return { before: lastSentence(before), after: firstSentence(after) };
}

function partOf(child: Node): ExcerptPart | null {
  if (child.isText) return { part: "text", text: child.text ?? "" };
  if (child.type.name === "inlineMath") return { part: "math", latex: String(child.attrs["latex"]) };
  if (child.type.name === pinNode) return { part: "number", text: String(child.attrs["text"]) };
  return child.type.name === "hardBreak" ? { part: "text", text: " " } : null;
}

function lastSentence(parts: readonly ExcerptPart[]): ExcerptPart[] {
  const kept: ExcerptPart[] = [];
  let room = MOST_BEFORE;
  for (const part of parts.toReversed()) {
    if (part.part === "text") {
      const start = [...part.text.matchAll(sentenceEnd)].at(-1);
      const text = start ? part.text.slice(start.index + start[0].length) : part.text;
      if (text.length > room) {
        const cut = text.slice(text.length - room);
        return [{ part: "text", text: `…${cut.slice(Math.max(0, cut.indexOf(" ")))}` }, ...kept];
      }
      if (text !== "") kept.unshift({ part: "text", text });
      if (start) return kept;
    } else kept.unshift(part);
    room -= lengthOf(part);
    if (room <= 0) return [{ part: "text", text: "… " }, ...kept];
  }
  return kept;
}

function firstSentence(parts: readonly ExcerptPart[]): ExcerptPart[] {
  const kept: ExcerptPart[] = [];
  let room = MOST_AFTER;
  for (const part of parts) {
    if (part.part === "text") {
      const [end] = part.text.matchAll(sentenceEnd);
      const text = end ? part.text.slice(0, end.index + end[0].length).trimEnd() : part.text;
      if (text.length > room) {
        const cut = text.slice(0, room);
        const word = cut.lastIndexOf(" ");
        return [...kept, { part: "text", text: `${word > 0 ? cut.slice(0, word) : cut} …` }];
      }
      if (text !== "") kept.push({ part: "text", text });
      if (end) return kept;
    } else kept.push(part);
    room -= lengthOf(part);
    if (room <= 0) return [...kept, { part: "text", text: " …" }];
  }
  return kept;
}

/** As it takes room on the line, roughly: the source of a formula is longer than the formula. */
function lengthOf(part: ExcerptPart): number {
  return part.part === "math" ? Math.ceil(part.latex.length / 2) : part.text.length;
}
