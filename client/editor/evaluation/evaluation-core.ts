/** What the worker does, without the worker: keeps the blocks it was told of and answers what is new. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { evaluateNotebook, type NotebookOutcome } from "#engine/notebook/evaluate-notebook.ts";
import type { EvaluationAnswer, EvaluationRequest } from "./evaluation-messages.ts";

const MOST_REMEMBERED = 2000;

/** A memo that forgets what was used longest ago. */
export function createMemo(most = MOST_REMEMBERED) {
  const known = new Map<string, Evaluation>();
  return {
    get(key: string): Evaluation | undefined {
      const evaluation = known.get(key);
      if (evaluation) {
        known.delete(key);
        known.set(key, evaluation);
      }
      return evaluation;
    },
    set(key: string, evaluation: Evaluation): void {
      known.delete(key);
      known.set(key, evaluation);
      const [oldest] = known.keys();
      if (known.size > most && oldest !== undefined) known.delete(oldest);
    },
  };
}

export interface EvaluationCore {
  /** Takes note of changes; computes nothing yet, so that a newer request supersedes an older one. */
  hear(request: EvaluationRequest): void;
  /** Evaluates the state as last heard. */
  answer(): EvaluationAnswer;
}

export function createEvaluationCore(): EvaluationCore {
  const memo = createMemo();
  const known = new Map<string, BlockInstance>();
  const answered = new Map<string, NotebookOutcome>();
  let order: readonly string[] = [];
  let revision = 0;
  return {
    hear(request) {
      for (const block of request.changed) known.set(block.id, block);
      const present = new Set(request.order);
      for (const id of [...known.keys()]) {
        if (present.has(id)) continue;
        known.delete(id);
        answered.delete(id);
      }
      order = request.order;
      revision = request.revision;
    },
    answer() {
      const blocks = order.flatMap((id) => known.get(id) ?? []);
      const mistakes: string[] = [];
      const onInternalError = (error: unknown, block: BlockInstance) =>
        mistakes.push(
          `${block.kind} ${block.id}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
        );
      const outcomes = evaluateNotebook(blocks, { memo, onInternalError }).filter((outcome) => {
        const before = answered.get(outcome.blockId);
        answered.set(outcome.blockId, outcome);
        return before?.key !== outcome.key || before.standsOn !== outcome.standsOn;
      });
      return { revision, outcomes, mistakes };
    },
  };
}
