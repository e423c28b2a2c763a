/**
 * The results that the page shows: the worker's where it has answered, the server's stored ones before. One object per
 * block, replaced only when something about that block changes, so that only its readers draw again.
 */
import type { StoredResult } from "#contract/api.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { choosePremises } from "#engine/notebook/choose-premises.ts";
import type { NotebookOutcome, Postponed } from "#engine/notebook/evaluate-blocks.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { isLong, referencesOf } from "#engine/notebook/references.ts";
import type { LongWorkState } from "../../blocks/block-handle.ts";
import type { BlockDirectory } from "../blocks/block-directory.ts";
import { createEvaluationClient, type EvaluatorState, type WorkerLike } from "./evaluation-client.ts";
import type { EvaluationAnswer } from "./evaluation-messages.ts";
import { inTurns } from "./in-turns.ts";
import { createLongWork } from "./long-work.ts";

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
}

const nothingYet: BlockResult = { evaluation: null, key: null, standsOn: null, lastGood: null };

export interface ResultsStore {
  result(blockId: string): BlockResult;
  /** Whether the inputs, or those they stand on, are newer than the evaluation. */
  isPending(blockId: string): boolean;
  /** Who changed what led to this very result, once the server has stored it. */
  settled(blockId: string): Settled | null;
  /** All blocks, in document order. */
  blocks(): readonly BlockInstance[];
  evaluator(): EvaluatorState;
  /** How long work on a block stands; null for a block that is not long, or has its result. */
  longWork(blockId: string): LongWorkState | null;
  stopLongWork(blockId: string): void;
  resumeLongWork(blockId: string): void;
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
  const settled = new Map<string, Settled>();
  /** Blocks whose results come later: long work, and what uses it. */
  let postponed: readonly Postponed[] = [];
  let revisionShown = 0;
  let waiting: ReturnType<typeof setTimeout> | null = null;

  let version = 0;
  const publish = () => {
    version += 1;
    for (const listener of listeners) listener();
  };
  const change = (blockId: string, next: BlockResult) => {
    const before = results.get(blockId);
    if (!before || !isSame(before, next)) results.set(blockId, next);
    settle(blockId);
  };
  const lastGood = (blockId: string) => results.get(blockId)?.lastGood ?? null;
  /** Keeps the object as long as it says the same. */
  const settle = (blockId: string) => {
    const known = stored.get(blockId);
    if (!known || known.key !== results.get(blockId)?.key) {
      settled.delete(blockId);
      return;
    }
    const before = settled.get(blockId);
    if (before?.by === known.changedBy && before.at === known.settledAt) return;
    settled.set(blockId, { by: known.changedBy, at: known.settledAt });
  };
  // Each outcome is drawn in a task of its own: a block may take some milliseconds, and there may be a hundred.
  const turns = inTurns<NotebookOutcome>(show, () => {
    for (const [blockId, since] of awaited) if (since <= revisionShown) awaited.delete(blockId);
    publish();
  });

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

  const work = createLongWork({
    startWorker,
    onMistake: sayMistake,
    onChange: publish,
    onOutcome(outcome) {
      show(outcome);
      // The other worker has waited for it with whatever uses it.
      remember(outcome.key, outcome.evaluation);
    },
  });

  /** Lets the worker take a result of long work as computed. */
  function remember(key: string, evaluation: Evaluation) {
    client.remember(key, evaluation);
    if (postponed.some((later) => later.key === key)) send();
  }
  function sayMistake(mistake: string) {
    console.error(`A block could not be computed: ${mistake}`);
  }
  /** Several updates of one moment, as when a colleague's paste arrives, are one request. */
  function send() {
    waiting ??= setTimeout(() => {
      waiting = null;
      const revision = client.send(blocks);
      for (const [id, since] of awaited) if (since === Number.POSITIVE_INFINITY) awaited.set(id, revision);
    }, 0);
  }

  function hearAnswer({ revision, outcomes, postponed: later, mistakes }: EvaluationAnswer) {
    mistakes.forEach(sayMistake);
    revisionShown = revision;
    postponed = later;
    const known = [...results.values()].flatMap(({ key, evaluation }) =>
      key !== null && evaluation ? [[key, evaluation] as const] : [],
    );
    work.want(later, blocks, later.length > 0 ? known : []);
    turns.add(outcomes.map((outcome) => [outcome.blockId, outcome]));
  }

  function show({ blockId, key, standsOn, evaluation }: NotebookOutcome) {
    // The block may have gone since.
    if (!directory.block(blockId)) return;
    answered.add(blockId);
    // The same key is the same result: what the server had stored stays as it is, and so does its drawing.
    const known = results.get(blockId);
    const same = known?.key === key && known.evaluation?.value != null ? known.evaluation : evaluation;
    change(blockId, {
      evaluation: same,
      key,
      standsOn,
      lastGood: same.value === null ? lastGood(blockId) : same,
    });
    publish();
  }

  /** Marks what a change reaches: the blocks that changed, those that stand on them, and those that use either's result. */
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
      settled.delete(id);
    }
    const gone = [...before.keys()].filter((id) => !directory.block(id));
    const reached = new Set([...changed, ...gone]);
    for (const block of blocks) {
      const choice = choosePremises(block, blocks);
      const standsOnChanged = "found" in choice && choice.found !== null && changed.has(choice.found.id);
      if (premisesCame || standsOnChanged) reached.add(block.id);
    }
    spreadThroughReferences(reached, blocks);
    for (const { id } of blocks) {
      if (!reached.has(id)) continue;
      awaited.set(id, Number.POSITIVE_INFINITY);
      useStored(id);
    }
    send();
    publish();
  }

  function useStored(blockId: string) {
    const known = stored.get(blockId);
    const block = directory.block(blockId);
    if (!known || !block || answered.has(blockId)) return;
    const { evaluation, key } = known;
    if (results.get(blockId)?.key === key) return;
    const choice = choosePremises(block, blocks);
    const standsOn = "found" in choice ? (choice.found?.id ?? null) : null;
    change(blockId, {
      evaluation,
      key,
      standsOn,
      lastGood: evaluation.value === null ? lastGood(blockId) : evaluation,
    });
  }

  follow();
  const unfollow = directory.subscribe(follow);
  return {
    result: (blockId) => results.get(blockId) ?? nothingYet,
    isPending: (blockId) => awaited.has(blockId) || postponed.some((later) => later.blockId === blockId),
    settled: (blockId) => settled.get(blockId) ?? null,
    blocks: () => blocks,
    evaluator: () => state,
    longWork: work.stateOf,
    stopLongWork: work.stop,
    resumeLongWork: work.resume,
    version: () => version,
    setStored(fresh) {
      stored.clear();
      for (const result of fresh) {
        stored.set(result.blockId, result);
        const block = directory.block(result.blockId);
        if (block && isLong(block)) remember(result.key, result.evaluation);
      }
      for (const { id } of blocks) {
        useStored(id);
        settle(id);
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
      work.destroy();
      turns.destroy();
      listeners.clear();
    },
  };
}

/** Adds every block that uses the result of one in the set, however many blocks lie between. */
function spreadThroughReferences(reached: Set<string>, blocks: readonly BlockInstance[]): void {
  let size = -1;
  while (size !== reached.size) {
    size = reached.size;
    for (const block of blocks)
      if (referencesOf(block).some(({ blockId }) => reached.has(blockId))) reached.add(block.id);
  }
}

const isPremises = ({ kind }: BlockInstance) => kind === "premises";

function isSame(a: BlockResult, b: BlockResult): boolean {
  return (
    a.evaluation === b.evaluation && a.key === b.key && a.standsOn === b.standsOn && a.lastGood === b.lastGood
  );
}
