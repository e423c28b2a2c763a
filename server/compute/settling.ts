/** Evaluates a notebook once its document has settled, and stores what is new. */
import type { Logger } from "pino";
import type { OpenRoom, RoomObserver } from "../collab/room-state.ts";
import { isPassing } from "../collab/store-errors.ts";
import type { Evaluation } from "#engine/index.ts";
import type { Database } from "../data/database.ts";
import { ComputeFailed, ComputeTooLarge, type ComputePool } from "./compute-pool.ts";
import type { LongResults } from "./long-results.ts";
import { Rest } from "./rest.ts";
import { storeLastChange, storeSettled } from "./store-settled.ts";
import { TouchedBlocks, type Touched } from "./touched-blocks.ts";

export interface SettlingOptions {
  readonly database: Database;
  readonly pool: ComputePool;
  readonly long: LongResults;
  readonly log: Logger;
  readonly times?: Partial<SettlingTimes>;
}
export interface SettlingTimes {
  /** After the last change. */
  readonly quietMs: number;
  /** After the first change, however long the typing goes on. */
  readonly longestMs: number;
  readonly limitMs: number;
  /** Between two readings of the prose. */
  readonly wordsMs: number;
  readonly retryMs: number;
}
const usualTimes: SettlingTimes = {
  quietMs: 300,
  longestMs: 2_000,
  limitMs: 10_000,
  wordsMs: 20_000,
  retryMs: 2_000,
};

export function createSettling(options: SettlingOptions): RoomObserver {
  const rooms = new Map<OpenRoom, RoomSettling>();
  const rest = new Rest();
  return {
    opened(room) {
      const settling = new RoomSettling(room, options, rest);
      rooms.set(room, settling);
      // Results may be missing: the engine has a new version, or the last process ended before it stored them.
      settling.checkAll();
    },
    committed: (room) => rooms.get(room)?.schedule(),
    draining: async (room) => rooms.get(room)?.finish(),
    ended(room) {
      options.long.forget(room.notebookId);
      rooms.get(room)?.stop();
      rooms.delete(room);
    },
  };
}

class RoomSettling {
  readonly #touched: TouchedBlocks;
  readonly #times: SettlingTimes;
  #timer: NodeJS.Timeout | null = null;
  #wordsTimer: NodeJS.Timeout | null = null;
  #firstChangeAt: number | null = null;
  #everything = false;
  #owed: ReadonlyMap<string, string | null> = new Map();
  #running: Promise<void> | null = null;
  #stopped = false;

  constructor(
    private readonly room: OpenRoom,
    private readonly options: SettlingOptions,
    private readonly rest: Rest,
  ) {
    this.#touched = new TouchedBlocks(room.content.document, (error) =>
      options.log.error({ err: error, notebookId: room.notebookId }, "a change could not be looked at"),
    );
    this.#times = { ...usualTimes, ...options.times };
  }

  checkAll(): void {
    this.#everything = true;
    this.schedule();
  }

  schedule(): void {
    if (this.#isStopped()) return;
    const now = Date.now();
    this.#firstChangeAt ??= now;
    const latest = this.#firstChangeAt + this.#times.longestMs;
    const wait = Math.max(0, Math.min(this.#times.quietMs, latest - now));
    this.#runIn(Math.max(wait, this.rest.remaining(this.room.notebookId)));
  }

  /** Before the room closes: what waits is done now. */
  async finish(): Promise<void> {
    if (this.#wordsTimer !== null) {
      clearTimeout(this.#wordsTimer);
      this.#wordsTimer = null;
      this.checkAll();
    }
    if (this.#timer !== null && this.rest.remaining(this.room.notebookId) === 0) this.#runIn(null);
    await this.#running;
  }

  stop(): void {
    this.#stopped = true;
    if (this.#wordsTimer !== null) clearTimeout(this.#wordsTimer);
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
  }

  /** One run at a time; null means now. */
  #runIn(wait: number | null): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
    const run = () => {
      this.#timer = null;
      this.#running = (this.#running ?? Promise.resolve())
        .then(() => this.#settle())
        .finally(() => (this.#running = null));
    };
    if (wait === null) run();
    else this.#timer = setTimeout(run, wait);
  }

  async #settle(): Promise<void> {
    if (this.#isStopped()) return;
    const { log } = this.options;
    const touched = this.#touched.take();
    const everything = this.#everything;
    this.#everything = false;
    this.#firstChangeAt = null;
    try {
      if (everything || touched.mayChangeResults) await this.#evaluate(touched);
      else if (touched.anything) this.#readWordsLater();
      if (touched.anything) await storeLastChange(this.options.database, this.room.notebookId, touched.last);
    } catch (error) {
      log.error({ err: error, notebookId: this.room.notebookId }, "a notebook could not be settled");
      if (error instanceof ComputeTooLarge) this.rest.begin(this.room.notebookId);
      // What cannot be computed, or is refused as it is, would fare no better; the next change is tried afresh.
      if (error instanceof ComputeFailed || !isPassing(error)) return;
      this.#touched.giveBack(touched);
      this.#everything ||= everything;
      if (!this.#isStopped() && this.#timer === null) this.#runIn(this.#times.retryMs);
    }
  }

  /** Prose alone changes no result; for the search of the shelf it is read now and then, and before the room closes. */
  #readWordsLater(): void {
    this.#wordsTimer ??= setTimeout(() => {
      this.#wordsTimer = null;
      this.checkAll();
    }, this.#times.wordsMs);
  }

  #isStopped(): boolean {
    return this.#stopped;
  }

  async #evaluate(touched: Touched): Promise<void> {
    const { database, log, long } = this.options;
    const { notebookId } = this.room;
    const document = this.room.content.encoded();
    const { settled, known } = await this.#settleDocument(document);
    this.rest.end(notebookId);
    for (const mistake of settled.mistakes) log.error({ notebookId, mistake }, "a block kind threw");
    // Whose edit asked for long work is named when its result comes.
    const blocks = new Map([...this.#owed, ...touched.blocks]);
    this.#owed = settled.postponed.length > 0 ? blocks : new Map();
    const changed = await database.transaction((transaction) =>
      storeSettled(transaction, notebookId, settled, { blocks, structure: touched.structure }),
    );
    if (changed) this.room.notify({ about: "results" });
    // Another pass takes the result in, with whatever uses it.
    long.want(notebookId, settled.postponed, { document, known, onStored: () => this.checkAll() });
  }

  /** Long work that is stored already counts as computed; what stands on it may be long work that is stored too. */
  async #settleDocument(document: Uint8Array) {
    const { pool, long } = this.options;
    const known = new Map<string, Evaluation>();
    for (;;) {
      const settled = await pool.run({ task: "settle", document, known: [...known] }, this.#times.limitMs);
      const before = known.size;
      for (const [key, evaluation] of await long.stored(settled.postponed)) known.set(key, evaluation);
      if (known.size === before) return { settled, known: [...known] };
    }
  }
}
