/** Evaluates the blocks of a notebook with every kind of this version. */
import { kinds } from "../kinds.ts";
import type { BlockInstance } from "./block-instance.ts";
import { evaluateBlocks, type EvaluateOptions, type NotebookOutcome } from "./evaluate-blocks.ts";

export type { EvaluateOptions, KindOf, Memo, NotebookOutcome, Postponed } from "./evaluate-blocks.ts";

/** Blocks in, outcomes out in the same order, but for those postponed. */
export function evaluateNotebook(
  blocks: readonly BlockInstance[],
  options: EvaluateOptions,
): NotebookOutcome[] {
  return evaluateBlocks(blocks, (kind) => kinds[kind], options);
}
