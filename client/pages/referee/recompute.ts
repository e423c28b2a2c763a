/** Evaluates one block afresh: in a worker of its own that has never seen a result, from the typed inputs alone. */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome } from "#engine/notebook/evaluate-notebook.ts";
import {
  createEvaluationClient,
  startEvaluationWorker,
  type WorkerLike,
} from "../../editor/evaluation/evaluation-client.ts";

export type Recomputation =
  | { readonly done: true; readonly outcome: NotebookOutcome }
  /** The worker gave up; `words` says why. */
  | { readonly done: false; readonly words: string };

/** The block, and every block that its choice of premises looks at. */
export function blocksNeeded(blockId: string, blocks: readonly BlockInstance[]): readonly BlockInstance[] {
  const standsOn = blocks.find(({ id }) => id === blockId)?.standsOn ?? null;
  return blocks.filter(({ id, kind }) => id === blockId || kind === "premises" || id === standsOn);
}

export function recompute(
  blockId: string,
  blocks: readonly BlockInstance[],
  startWorker: () => WorkerLike = startEvaluationWorker,
): Promise<Recomputation> {
  return new Promise((resolve) => {
    const settle = (recomputation: Recomputation) => {
      client.destroy();
      resolve(recomputation);
    };
    const client = createEvaluationClient({
      startWorker,
      onAnswer({ outcomes, mistakes }) {
        for (const mistake of mistakes) console.error(`A block could not be recomputed: ${mistake}`);
        const outcome = outcomes.find((answered) => answered.blockId === blockId);
        settle(outcome ? { done: true, outcome } : { done: false, words: "the block is gone" });
      },
      onState(state) {
        if (state.state === "timed-out")
          settle({ done: false, words: `it took longer than ${state.seconds} seconds` });
        if (state.state === "crashed") settle({ done: false, words: "this browser could not compute it" });
      },
    });
    client.send(blocksNeeded(blockId, blocks));
  });
}
