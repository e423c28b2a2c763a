/**
 * Results that take long: looked up by key, since anyone may have asked the same before, or computed one at a time in
 * the background. A result that comes when its block has changed already is kept all the same: it is right for its key.
 */
import type { Logger } from "pino";
import type { Evaluation, Postponed } from "#engine/index.ts";
import { rows, type Database } from "../data/database.ts";
import { ComputeTooLarge, type ComputePool } from "./compute-pool.ts";
import { storeResults } from "./store-settled.ts";
import type { KnownResult } from "./tasks.ts";

const LIMIT_MS = 5 * 60_000;
/** What one notebook may have waiting, and all together. */
const MOST_OF_A_NOTEBOOK = 20;
const MOST_WAITING = 500;
/** Keys that took too long; another process, or a later one, may try again. */
const MOST_GIVEN_UP = 10_000;

interface Job {
  readonly notebookId: string;
  readonly blockId: string;
  readonly key: string;
  readonly document: Uint8Array;
  readonly known: readonly KnownResult[];
  /** Called once the result is stored. */
  readonly onStored: () => void;
}

export interface LongResultsOptions {
  readonly database: Database;
  readonly pool: ComputePool;
  readonly log: Logger;
  readonly limitMs?: number;
}

export class LongResults {
  #waiting: Job[] = [];
  #running: Job | null = null;
  readonly #givenUp = new Set<string>();

  constructor(private readonly options: LongResultsOptions) {}

  /** Those that are stored already. */
  async stored(postponed: readonly Postponed[]): Promise<readonly KnownResult[]> {
    const keys = postponed.flatMap(({ key }) => (key === null ? [] : [key]));
    if (keys.length === 0) return [];
    const found = await rows<{ key: string; value: Evaluation }>(
      this.options.database,
      "select key, value from results where key = any(?::text[])",
      [keys],
    );
    return found.map(({ key, value }) => [key, value]);
  }

  /** Replaces what the notebook had waiting; what is under way goes on. */
  want(
    notebookId: string,
    postponed: readonly Postponed[],
    rest: Pick<Job, "document" | "known" | "onStored">,
  ): void {
    this.#waiting = this.#waiting.filter((job) => job.notebookId !== notebookId);
    const room = Math.max(0, Math.min(MOST_OF_A_NOTEBOOK, MOST_WAITING - this.#waiting.length));
    const jobs = postponed.flatMap(({ blockId, key }) =>
      key === null || this.#givenUp.has(key) || this.#running?.key === key
        ? []
        : [{ notebookId, blockId, key, ...rest }],
    );
    this.#waiting.push(...jobs.slice(0, room));
    this.#startNext();
  }

  forget(notebookId: string): void {
    this.#waiting = this.#waiting.filter((job) => job.notebookId !== notebookId);
  }

  #startNext(): void {
    if (this.#running !== null) return;
    const next = this.#waiting.shift();
    if (next === undefined) return;
    this.#running = next;
    void this.#compute(next).finally(() => {
      this.#running = null;
      this.#startNext();
    });
  }

  async #compute(job: Job): Promise<void> {
    const { database, pool, log, limitMs = LIMIT_MS } = this.options;
    const { notebookId, blockId, key, document, known } = job;
    try {
      const { block, mistakes } = await pool.run({ task: "long", document, blockId, known }, limitMs);
      for (const mistake of mistakes) log.error({ notebookId, mistake }, "a block kind threw");
      if (mistakes.length > 0) this.#giveUp(key);
      else if (block !== null) {
        await storeResults(database, [block]);
        job.onStored();
      }
    } catch (error) {
      if (error instanceof ComputeTooLarge) this.#giveUp(key);
      log.error({ err: error, notebookId, blockId }, "long work was not computed");
    }
  }

  #giveUp(key: string): void {
    this.#givenUp.add(key);
    const [oldest] = this.#givenUp;
    if (this.#givenUp.size > MOST_GIVEN_UP && oldest !== undefined) this.#givenUp.delete(oldest);
  }
}
