/** What the page and its evaluating workers say to each other. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { Progress } from "#engine/kind.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome, Postponed } from "#engine/notebook/evaluate-blocks.ts";

export type KnownResult = readonly [key: string, evaluation: Evaluation];

/** Page to worker: what changed since the last message; the worker keeps the rest. */
export interface EvaluationRequest {
  /** Rising; an answer names the newest one it has heard of. */
  readonly revision: number;
  /** Ids in document order: blocks no longer named are gone. */
  readonly order: readonly string[];
  readonly changed: readonly BlockInstance[];
  /** Results of long work that need not be computed again. */
  readonly known: readonly KnownResult[];
  /** Computes and answers every block, however long it takes; without it, long work is postponed. */
  readonly everything?: true;
}

/** Worker to page: outcomes whose key or premises differ from what was answered before. */
export interface EvaluationAnswer {
  readonly about: "answer";
  readonly revision: number;
  readonly outcomes: readonly NotebookOutcome[];
  readonly postponed: readonly Postponed[];
  /** Mistakes of ours, for the console; the blocks concerned carry the problem "internal". */
  readonly mistakes: readonly string[];
}

/** Worker to page, while it is at long work. */
export interface ProgressReport {
  readonly about: "progress";
  readonly blockId: string;
  readonly progress: Progress;
}
export type WorkerMessage = EvaluationAnswer | ProgressReport;
