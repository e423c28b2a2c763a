/** Threads for what would otherwise stall everyone: evaluation and compaction, each task under a time limit. */
import { createRequire } from "node:module";
import { extname, join } from "node:path";
import { pathToFileURL } from "node:url";
import { Piscina } from "piscina";
import type { ComputeAnswers, ComputeTask } from "./tasks.ts";

/** Not computed, for whatever reason. */
export class ComputeFailed extends Error {}
export class ComputeTimeout extends ComputeFailed {
  constructor(readonly limitMs: number) {
    super(`not computed within ${limitMs} ms`);
  }
}
export class ComputeBusy extends ComputeFailed {}

export interface ComputePool {
  /** Rejects with `ComputeFailed`; after a `ComputeTimeout` the thread has been ended. */
  run<Task extends ComputeTask>(task: Task, limitMs: number): Promise<ComputeAnswers[Task["task"]]>;
  stop(): Promise<void>;
}

const THREADS = 2;
const LONGEST_QUEUE = 1_000;
const MEMORY_MB = 512;

export function openComputePool(): ComputePool {
  const extension = extname(import.meta.filename);
  const pool = new Piscina({
    filename: join(import.meta.dirname, `compute-worker${extension}`),
    minThreads: 1,
    maxThreads: THREADS,
    idleTimeout: 30_000,
    maxQueue: LONGEST_QUEUE,
    resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
    // Threads run from the same sources as the server does.
    execArgv: extension === ".ts" ? ["--import", loaderOfTypeScript()] : [],
  });
  // Each task's own promise carries its error; without a listener this event would end the process.
  pool.on("error", () => undefined);
  return {
    async run(task, limitMs) {
      const limit = new AbortController();
      const timer = setTimeout(() => limit.abort(), limitMs);
      try {
        // The worker answers each task with the type that `ComputeAnswers` names.
        return (await pool.run(task, { signal: limit.signal })) as ComputeAnswers[(typeof task)["task"]];
      } catch (error) {
        if (limit.signal.aborted) throw new ComputeTimeout(limitMs);
        if (pool.queueSize >= LONGEST_QUEUE) throw new ComputeBusy("too much waits to be computed");
        throw new ComputeFailed("the compute thread failed", { cause: error });
      } finally {
        clearTimeout(timer);
      }
    },
    stop: () => pool.destroy(),
  };
}

function loaderOfTypeScript(): string {
  return pathToFileURL(createRequire(import.meta.url).resolve("tsx")).href;
}
