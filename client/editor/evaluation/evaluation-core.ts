/** What the worker does, without the worker: keeps the blocks it was told of and answers what is new. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { KindName } from "#engine/kind.ts";
import {
  evaluateBlocks,
  type KindOf,
  type NotebookOutcome,
  type Postponed,
} from "#engine/notebook/evaluate-blocks.ts";
import type { EvaluationAnswer, EvaluationRequest, ProgressReport } from "./evaluation-messages.ts";

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
  /** The kinds of the blocks as last heard, for whoever has to fetch them first. */
  kindsNeeded(): ReadonlySet<KindName>;
  /** Evaluates the state as last heard. */
  answer(): EvaluationAnswer;
}

export interface EvaluationCoreOptions {
  readonly kindOf: KindOf;
  /** Told how far long work is, as often as the engine says it. */
  readonly onProgress: (report: ProgressReport) => void;
}

export function createEvaluationCore({ kindOf, onProgress }: EvaluationCoreOptions): EvaluationCore {
  const memo = createMemo();
  const known = new Map<string, BlockInstance>();
  const answered = new Map<string, NotebookOutcome>();
  let order: readonly string[] = [];
  let revision = 0;
  let everything = false;
  return {
    hear(request) {
      for (const [key, evaluation] of request.known) memo.set(key, evaluation);
      for (const block of request.changed) known.set(block.id, block);
      const present = new Set(request.order);
      for (const id of [...known.keys()]) {
        if (present.has(id)) continue;
        known.delete(id);
        answered.delete(id);
      }
      order = request.order;
      revision = request.revision;
      everything = request.everything === true;
    },
    kindsNeeded: () => new Set([...known.values()].map(({ kind }) => kind)),
    answer() {
      const blocks = order.flatMap((id) => known.get(id) ?? []);
      const mistakes: string[] = [];
      const postponed: Postponed[] = [];
      const outcomes = evaluateBlocks(blocks, kindOf, {
        memo,
        onInternalError: (error, block) =>
          mistakes.push(
            `${block.kind} ${block.id}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
          ),
        onProgress: (progress, block) => onProgress({ about: "progress", blockId: block.id, progress }),
        ...(everything ? {} : { onPostponed: (later: Postponed) => postponed.push(later) }),
      }).filter((outcome) => {
        if (everything) return true;
        const before = answered.get(outcome.blockId);
        answered.set(outcome.blockId, outcome);
        return before?.key !== outcome.key || before.standsOn !== outcome.standsOn;
      });
      // What will be computed elsewhere must be told again once it is known here.
      for (const { blockId } of postponed) answered.delete(blockId);
      return { about: "answer", revision, outcomes, postponed, mistakes };
    },
  };
}
