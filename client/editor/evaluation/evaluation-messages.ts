/** What the page and its evaluating worker say to each other. */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome } from "#engine/notebook/evaluate-notebook.ts";

/** Page to worker: what changed since the last message; the worker keeps the rest. */
export interface EvaluationRequest {
  /** Rising; an answer names the newest one it has heard of. */
  readonly revision: number;
  /** Ids in document order: blocks no longer named are gone. */
  readonly order: readonly string[];
  readonly changed: readonly BlockInstance[];
}

/** Worker to page: outcomes whose key or premises differ from what was answered before. */
export interface EvaluationAnswer {
  readonly revision: number;
  readonly outcomes: readonly NotebookOutcome[];
  /** Mistakes of ours, for the console; the blocks concerned carry the problem "internal". */
  readonly mistakes: readonly string[];
}
