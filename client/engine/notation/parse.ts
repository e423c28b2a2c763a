/**
 * Typed notation to a tree, in three steps: what was meant is made explicit, with placeholders for all operands; mathjs
 * says how explicit operators group; the placeholders become what was typed. Juxtaposition, `*` and `/` so have one
 * precedence and group from the left: `lambda/4! phi^4` is (λ/4!)φ⁴.
 */
import { read, type Read } from "./failure.ts";
import { growTree } from "./grow-tree.ts";
import { makeExplicit, type ParseOptions } from "./make-explicit.ts";
import { group } from "./mathjs-parser.ts";
import { remembering } from "./remembering.ts";
import { tokenise } from "./tokens.ts";
import type { Tree } from "./tree.ts";

export type { ParseOptions };

// A change in the premises reads all their rows again, and nearly all of them are what they were.
const memory = { most: 1000, longest: 200 };
const readers = {
  terms: remembering((text) => readAfresh(text, { quantities: false }), memory),
  quantities: remembering((text) => readAfresh(text, { quantities: true }), memory),
};

/**
 * Reads text into a tree. Failures: those of the tokeniser, `empty-text`, `unbalanced-bracket`, `missing-operand`,
 * `misplaced-mark`, `double-power`, `nested-too-deep`, `number-too-large`; each with `offset` and `text`.
 */
export function parse(text: string, { quantities }: ParseOptions): Read<Tree> {
  return quantities ? readers.quantities(text) : readers.terms(text);
}

function readAfresh(text: string, options: ParseOptions): Read<Tree> {
  const tokens = tokenise(text, { measuredLiterals: options.quantities });
  if (!tokens.ok) return tokens;
  const explicit = makeExplicit(text, tokens.value, options);
  if (!explicit.ok) return explicit;
  return read(growTree(group(explicit.value.text), explicit.value));
}
