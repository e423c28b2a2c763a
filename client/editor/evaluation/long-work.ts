/**
 * Long work of a notebook, one block after the other in a worker of its own, so that what is quick never waits for it.
 * Stopping ends the worker: the engine computes without looking up.
 */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome, Postponed } from "#engine/notebook/evaluate-blocks.ts";
import { neededFor } from "#engine/notebook/references.ts";
import type { LongWorkState } from "../../blocks/block-handle.ts";
import type { WorkerLike } from "./evaluation-client.ts";
import type { KnownResult } from "./evaluation-messages.ts";

export interface LongWork {
  /** What is to be computed now, in this order; whatever else is under way is given up. */
  want(jobs: readonly Postponed[], blocks: readonly BlockInstance[], known: readonly KnownResult[]): void;
  /** Null for a block that is not long, or has its result. */
  stateOf(blockId: string): LongWorkState | null;
  /** Stays stopped until its inputs change or it is resumed. */
  stop(blockId: string): void;
  resume(blockId: string): void;
  destroy(): void;
}

export interface LongWorkOptions {
  readonly startWorker: () => WorkerLike;
  readonly onOutcome: (outcome: NotebookOutcome) => void;
  readonly onMistake: (mistake: string) => void;
  readonly onChange: () => void;
}

interface Job {
  readonly blockId: string;
  readonly key: string;
}
const waiting: LongWorkState = { state: "waiting" };
const stopped: LongWorkState = { state: "stopped" };

export function createLongWork({ startWorker, onOutcome, onMistake, onChange }: LongWorkOptions): LongWork {
  /** By the key of the result: other inputs are other work. */
  const heldUp = new Map<string, LongWorkState>();
  let jobs: readonly Job[] = [];
  let blocks: readonly BlockInstance[] = [];
  let known: readonly KnownResult[] = [];
  let running: Job | null = null;
  let progress: LongWorkState = { state: "computing", progress: null };
  let worker: WorkerLike | null = null;

  function end() {
    worker?.terminate();
    worker = null;
    running = null;
  }

  function hold(job: Job, state: LongWorkState) {
    heldUp.set(job.key, state);
    if (running?.key === job.key) end();
    startNext();
    onChange();
  }

  function startNext() {
    if (running) return;
    const next = jobs.find(({ key }) => !heldUp.has(key));
    if (!next) return;
    running = next;
    progress = { state: "computing", progress: null };
    worker ??= startWorker();
    worker.onmessage = ({ data }) => {
      if (running !== next) return;
      if (data.about === "progress") {
        progress = { state: "computing", progress: data.progress };
        onChange();
        return;
      }
      data.mistakes.forEach(onMistake);
      const outcome = data.outcomes.find(({ blockId }) => blockId === next.blockId);
      running = null;
      jobs = jobs.filter(({ key }) => key !== next.key);
      if (outcome) onOutcome(outcome);
      startNext();
      onChange();
    };
    worker.onerror = (event) => {
      event.preventDefault();
      hold(next, { state: "failed", reason: event.message });
    };
    const needed = neededFor(next.blockId, blocks);
    worker.postMessage({
      revision: 1,
      order: needed.map(({ id }) => id),
      changed: needed,
      known,
      everything: true,
    });
  }

  return {
    want(postponed, allBlocks, knownResults) {
      blocks = allBlocks;
      known = knownResults;
      // A block that waits for another one's result has no key yet, and is named again when it has.
      jobs = postponed.flatMap(({ blockId, key }) => (key === null ? [] : [{ blockId, key }]));
      for (const key of [...heldUp.keys()]) if (!jobs.some((job) => job.key === key)) heldUp.delete(key);
      const isWanted = jobs.some(({ blockId, key }) => blockId === running?.blockId && key === running.key);
      if (running && !isWanted) end();
      startNext();
      onChange();
    },
    stateOf(blockId) {
      if (running?.blockId === blockId) return progress;
      const job = jobs.find((candidate) => candidate.blockId === blockId);
      return job ? (heldUp.get(job.key) ?? waiting) : null;
    },
    stop(blockId) {
      const job = jobs.find((candidate) => candidate.blockId === blockId);
      if (job) hold(job, stopped);
    },
    resume(blockId) {
      const job = jobs.find((candidate) => candidate.blockId === blockId);
      if (!job) return;
      heldUp.delete(job.key);
      startNext();
      onChange();
    },
    destroy() {
      jobs = [];
      end();
    },
  };
}
