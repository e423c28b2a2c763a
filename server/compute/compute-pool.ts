/** Threads for what would otherwise stall everyone: evaluation and compaction, each task under a time limit. */
import { createRequire } from "node:module";
import { extname, join } from "node:path";
import { pathToFileURL } from "node:url";
import { Piscina } from "piscina";
import type { ComputeAnswers, ComputeTask } from "./tasks.ts";

/** Not computed, for whatever reason. */
export class ComputeFailed extends Error {}
/** It would take more than any task may: the thread has been ended. */
export class ComputeTooLarge extends ComputeFailed {}
export class ComputeTimeout extends ComputeTooLarge {
  constructor(readonly limitMs: number) {
    super(`not computed within ${limitMs} ms`);
  }
}
export class ComputeOutOfMemory extends ComputeTooLarge {}
export class ComputeBusy extends ComputeFailed {}

export interface ComputePoolOptions {
  readonly threads: number;
  /** Threads kept while nothing is asked of them. */
  readonly idleThreads: number;
  /** What is above is `ComputeBusy`. */
  readonly longestQueue: number;
}
export interface ComputePool {
  /**
   * Rejects with `ComputeFailed`; after a `ComputeTimeout` the thread has been ended. The limit counts from when the
   * task has a thread: whoever waits behind a long one must not pay for it.
   */
  run<Task extends ComputeTask>(task: Task, limitMs: number): Promise<ComputeAnswers[Task["task"]]>;
  stop(): Promise<void>;
}

const MEMORY_MB = 512;

export function openComputePool({
  threads = 2,
  idleThreads = 1,
  longestQueue = 1_000,
}: Partial<ComputePoolOptions> = {}): ComputePool {
  const extension = extname(import.meta.filename);
  const pool = new Piscina({
    filename: join(import.meta.dirname, `compute-worker${extension}`),
    minThreads: idleThreads,
    maxThreads: threads,
    idleTimeout: 30_000,
    resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
    // Threads run from the same sources as the server does.
    execArgv: extension === ".ts" ? ["--import", loaderOfTypeScript()] : [],
  });
  // Each task's own promise carries its error; without a listener this event would end the process.
  pool.on("error", () => undefined);
  const waiting: (() => void)[] = [];
  let free = threads;
  async function takeTurn(): Promise<void> {
    if (free > 0) {
      free -= 1;
      return;
    }
    if (waiting.length >= longestQueue) throw new ComputeBusy("too much waits to be computed");
    await new Promise<void>((resolve) => waiting.push(resolve));
  }
  function giveTurn(): void {
    const next = waiting.shift();
    if (next === undefined) free += 1;
    else next();
  }
  return {
    async run(task, limitMs) {
      await takeTurn();
      const limit = new AbortController();
      const timer = setTimeout(() => limit.abort(), limitMs);
      try {
        // The worker answers each task with the type that `ComputeAnswers` names.
        return (await pool.run(task, { signal: limit.signal })) as ComputeAnswers[(typeof task)["task"]];
      } catch (error) {
        if (limit.signal.aborted) throw new ComputeTimeout(limitMs);
        if (isOutOfMemory(error))
          throw new ComputeOutOfMemory(`not computed within ${MEMORY_MB} MB`, { cause: error });
        throw new ComputeFailed("the compute thread failed", { cause: error });
      } finally {
        clearTimeout(timer);
        giveTurn();
      }
    },
    stop: () => pool.destroy(),
  };
}

function isOutOfMemory(error: unknown): boolean {
  return error instanceof Error && "code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY";
}

function loaderOfTypeScript(): string {
  return pathToFileURL(createRequire(import.meta.url).resolve("tsx")).href;
}
