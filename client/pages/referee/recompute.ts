/** Evaluates one block afresh: in a worker of its own that has never seen a result, from the typed inputs alone. */
import type { Progress } from "#engine/kind.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome } from "#engine/notebook/evaluate-blocks.ts";
import { startEvaluationWorker, type WorkerLike } from "../../editor/evaluation/evaluation-client.ts";
import { createLongWork } from "../../editor/evaluation/long-work.ts";

export type Recomputation =
  | { readonly done: true; readonly outcome: NotebookOutcome }
  /** The worker gave up; `words` says why. */
  | { readonly done: false; readonly words: string };

export interface RecomputeOptions {
  readonly startWorker?: () => WorkerLike;
  readonly onProgress?: (progress: Progress) => void;
  /** Ends the worker; the answer then says that it was stopped. */
  readonly signal?: AbortSignal;
}

export function recompute(
  blockId: string,
  blocks: readonly BlockInstance[],
  { startWorker = startEvaluationWorker, onProgress, signal }: RecomputeOptions = {},
): Promise<Recomputation> {
  if (!blocks.some(({ id }) => id === blockId))
    return Promise.resolve({ done: false, words: "the block is gone" });
  return new Promise((resolve) => {
    const settle = (recomputation: Recomputation) => {
      work.destroy();
      resolve(recomputation);
    };
    const work = createLongWork({
      startWorker,
      onOutcome: (outcome) => settle({ done: true, outcome }),
      onMistake: (mistake) => console.error(`A block could not be recomputed: ${mistake}`),
      onChange() {
        const now = work.stateOf(blockId);
        if (now?.state === "computing" && now.progress) onProgress?.(now.progress);
        if (now?.state === "failed") settle({ done: false, words: "this browser could not compute it" });
      },
    });
    signal?.addEventListener("abort", () => settle({ done: false, words: "it was stopped" }), { once: true });
    // The key names the work, and there is only this one.
    work.want([{ blockId, key: "afresh" }], blocks, []);
  });
}
