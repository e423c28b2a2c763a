/**
 * The results that the page shows: the worker's where it has answered, the server's stored ones before. One object per
 * block, replaced only when something about that block changes, so that only its readers draw again.
 */
import type { StoredResult } from "#contract/api.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { choosePremises } from "#engine/notebook/choose-premises.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { BlockDirectory } from "../blocks/block-directory.ts";
import { createEvaluationClient, type EvaluatorState, type WorkerLike } from "./evaluation-client.ts";
import type { EvaluationAnswer } from "./evaluation-messages.ts";

export interface Settled {
  /** Null when unknown, or when authors are hidden. */
  readonly by: string | null;
  readonly at: string;
}

export interface BlockResult {
  /** Of the inputs as last evaluated; null until there is any. */
  readonly evaluation: Evaluation | null;
  readonly key: string | null;
  /** Id of the premises it was computed from. */
  readonly standsOn: string | null;
  /** The newest evaluation that had a value. */
  readonly lastGood: Evaluation | null;
  /** The inputs, or those it stands on, are newer than the evaluation. */
  readonly pending: boolean;
  /** Who changed what led to this very result, once the server has stored it. */
  readonly settled: Settled | null;
}

const nothingYet: BlockResult = {
  evaluation: null,
  key: null,
  standsOn: null,
  lastGood: null,
  pending: true,
  settled: null,
};

export interface ResultsStore {
  result(blockId: string): BlockResult;
  /** Ids of all blocks, in document order. */
  blocks(): readonly BlockInstance[];
  evaluator(): EvaluatorState;
  /** Rises with every change of any result or block. */
  version(): number;
  setStored(results: readonly StoredResult[]): void;
  subscribe(listener: () => void): () => void;
  destroy(): void;
}

export interface ResultsStoreOptions {
  readonly directory: BlockDirectory;
  readonly startWorker: () => WorkerLike;
  readonly timeLimitMs?: number;
}

export function createResultsStore({
  directory,
  startWorker,
  timeLimitMs,
}: ResultsStoreOptions): ResultsStore {
  const results = new Map<string, BlockResult>();
  const stored = new Map<string, StoredResult>();
  /** Blocks that the worker has answered at least once; the server's result no longer stands in for them. */
  const answered = new Set<string>();
  const awaited = new Map<string, number>();
  const listeners = new Set<() => void>();
  let blocks: readonly BlockInstance[] = [];
  let state: EvaluatorState = { state: "working" };
  let version = 0;
  let waiting: ReturnType<typeof setTimeout> | null = null;

  const publish = () => {
    version += 1;
    for (const listener of listeners) listener();
  };
  const change = (blockId: string, next: Partial<BlockResult>) => {
    const before = results.get(blockId) ?? nothingYet;
    const merged = { ...before, ...next };
    const settled = settledFor(merged.key, stored.get(blockId));
    results.set(blockId, {
      ...merged,
      settled: sameSettled(before.settled, settled) ? before.settled : settled,
    });
  };

  const client = createEvaluationClient({
    startWorker,
    ...(timeLimitMs === undefined ? {} : { timeLimitMs }),
    onAnswer: hearAnswer,
    onState(next) {
      if (next.state === state.state) return;
      state = next;
      publish();
    },
  });

  function hearAnswer({ revision, outcomes, mistakes }: EvaluationAnswer) {
    for (const mistake of mistakes) console.error(`A block could not be computed: ${mistake}`);
    for (const { blockId, key, standsOn, evaluation } of outcomes) {
      if (!awaited.has(blockId) && !results.has(blockId)) continue;
      answered.add(blockId);
      const good = evaluation.value === null ? {} : { lastGood: evaluation };
      change(blockId, { evaluation, key, standsOn, ...good });
    }
    for (const [blockId, since] of awaited) {
      if (since > revision) continue;
      awaited.delete(blockId);
      if (results.get(blockId)?.pending) change(blockId, { pending: false });
    }
    publish();
  }

  /** Marks what a change reaches: the blocks that changed and those that stand on them. */
  function follow() {
    const before = new Map(blocks.map((block) => [block.id, block]));
    const next = directory.blocks();
    const changed = new Set(next.filter((block) => before.get(block.id) !== block).map(({ id }) => id));
    const premisesCame = next.filter(isPremises).length !== blocks.filter(isPremises).length;
    blocks = next;
    for (const id of [...results.keys()]) {
      if (directory.block(id)) continue;
      results.delete(id);
      answered.delete(id);
      awaited.delete(id);
    }
    for (const block of blocks) {
      const choice = changed.has(block.id) ? null : choosePremises(block, blocks);
      const reached =
        choice === null ||
        premisesCame ||
        ("found" in choice && choice.found !== null && changed.has(choice.found.id));
      if (!reached) continue;
      awaited.set(block.id, Number.POSITIVE_INFINITY);
      change(block.id, { pending: true });
      useStored(block.id);
    }
    // Several updates of one moment, as when a colleague's paste arrives, are one request.
    waiting ??= setTimeout(() => {
      waiting = null;
      const revision = client.send(blocks);
      for (const [id, since] of awaited) if (since === Number.POSITIVE_INFINITY) awaited.set(id, revision);
    }, 0);
    publish();
  }

  function useStored(blockId: string) {
    const known = stored.get(blockId);
    if (!known || answered.has(blockId)) return;
    const { evaluation, key } = known;
    change(blockId, { evaluation, key, ...(evaluation.value === null ? {} : { lastGood: evaluation }) });
  }

  follow();
  const unfollow = directory.subscribe(follow);
  return {
    result: (blockId) => results.get(blockId) ?? nothingYet,
    blocks: () => blocks,
    evaluator: () => state,
    version: () => version,
    setStored(fresh) {
      stored.clear();
      for (const result of fresh) stored.set(result.blockId, result);
      for (const { id } of blocks) {
        useStored(id);
        if (results.has(id)) change(id, {});
      }
      publish();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy() {
      unfollow();
      if (waiting !== null) clearTimeout(waiting);
      client.destroy();
      listeners.clear();
    },
  };
}

const isPremises = ({ kind }: BlockInstance) => kind === "premises";

function settledFor(key: string | null, stored: StoredResult | undefined): Settled | null {
  return stored && stored.key === key ? { by: stored.changedBy, at: stored.settledAt } : null;
}
function sameSettled(a: Settled | null, b: Settled | null): boolean {
  return a === b || (a !== null && b !== null && a.by === b.by && a.at === b.at);
}
