/** All that computes on the server, opened together and stopped together. */
import type { Logger } from "pino";
import type { Compacted } from "../collab/compaction.ts";
import type { RoomObserver } from "../collab/room-state.ts";
import type { Database } from "../data/database.ts";
import { openComputePool } from "./compute-pool.ts";
import { LongResults } from "./long-results.ts";
import { createSettling, type SettlingTimes } from "./settling.ts";
import type { CompactTask, FileAnswer } from "./tasks.ts";

export interface Compute {
  /** To be handed to `attachCollab`. */
  readonly observer: RoomObserver;
  /** To be handed to `attachCollab`. */
  compact(task: Omit<CompactTask, "task">): Promise<Compacted>;
  /** Rejects with `ComputeTooLarge` or `ComputeBusy`. */
  evaluateFile(body: unknown): Promise<FileAnswer>;
  stop(): Promise<void>;
}

const COMPACT_LIMIT_MS = 60_000;
const FILE_LIMIT_MS = 10_000;

export function openCompute(options: {
  readonly database: Database;
  readonly log: Logger;
  readonly times?: Partial<SettlingTimes>;
}): Compute {
  const pool = openComputePool();
  // Anyone may send a file, signed in or not: however many they send, notebooks keep their threads.
  const filePool = openComputePool({ threads: 1, longestQueue: 50 });
  const longPool = openComputePool({ threads: 1, idleThreads: 0 });
  const long = new LongResults({ database: options.database, log: options.log, pool: longPool });
  return {
    observer: createSettling({ ...options, pool, long }),
    compact: (task) => pool.run({ task: "compact", ...task }, COMPACT_LIMIT_MS),
    evaluateFile: (body) => filePool.run({ task: "file", body }, FILE_LIMIT_MS),
    stop: async () => {
      await Promise.all([pool.stop(), filePool.stop(), longPool.stop()]);
    },
  };
}
