/** Addresses written out in a text, such as "see https://example.org/a." */
import { isSafeLink } from "./safe-link.ts";

export interface WrittenAddress {
  readonly index: number;
  readonly text: string;
}

/** Every address with its scheme. The full stop or bracket that ends the sentence is not part of it. */
export function addressesIn(text: string): readonly WrittenAddress[] {
  const found: WrittenAddress[] = [];
  for (const { 0: written, index } of text.matchAll(/(?<![\p{L}\p{N}])(?:https?:\/\/|mailto:)[^\s<>"]+/giu)) {
    const address = withoutSentenceEnd(written);
    if (isSafeLink(address)) found.push({ index, text: address });
  }
  return found;
}

function withoutSentenceEnd(written: string): string {
  let end = written.length;
  for (; end > 0; end -= 1) {
    const last = written.charAt(end - 1);
    if (".,;:!?'*_”’»…".includes(last)) continue;
    // "(https://example.org/a_(b))" ends in a bracket of its own and in one of the sentence.
    const opening = { ")": "(", "]": "[", "}": "{" }[last];
    if (opening === undefined) break;
    const kept = written.slice(0, end);
    if (kept.split(opening).length >= kept.split(last).length) break;
  }
  return written.slice(0, end);
}
