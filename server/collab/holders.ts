/**
 * Who holds which notebook open, written down in PostgreSQL for the other processes. A process that was killed is
 * forgotten by the others once it has not been seen for a while; until then it costs them an announcement too many.
 */
import type { Logger } from "pino";
import { rows, type Database } from "../data/database.ts";

const BEAT_EVERY_MS = 10_000;
const FORGOTTEN_AFTER_S = 60;

export interface HoldersOptions {
  readonly database: Database;
  readonly processId: string;
  readonly log: Logger;
  /** Now and then for a notebook that others hold too: an announcement may have been missed. */
  readonly onShared: (notebookId: string) => void;
}

export class Holders {
  /** Notebooks held here, and the other processes that hold them too. */
  readonly #held = new Map<string, Set<string>>();
  /** The last change that was asked for, by notebook: they are made in turn. */
  readonly #turns = new Map<string, Promise<void>>();
  readonly #beat: NodeJS.Timeout;
  #beating: Promise<void> = Promise.resolve();

  constructor(private readonly options: HoldersOptions) {
    this.#beat = setInterval(() => {
      this.#beating = this.refresh().then(() => {
        for (const [notebookId, others] of this.#held) if (others.size > 0) this.options.onShared(notebookId);
      });
    }, BEAT_EVERY_MS);
  }

  othersOf(notebookId: string): ReadonlySet<string> {
    return this.#held.get(notebookId) ?? new Set();
  }

  isHeld(notebookId: string): boolean {
    return this.#held.has(notebookId);
  }

  heldNotebooks(): string[] {
    return [...this.#held.keys()];
  }

  came(notebookId: string, processId: string): void {
    this.#held.get(notebookId)?.add(processId);
  }

  went(notebookId: string, processId: string): void {
    this.#held.get(notebookId)?.delete(processId);
  }

  /** Before the notebook is read: whoever commits a row afterwards announces it to us. */
  hold(notebookId: string): Promise<void> {
    const others = new Set<string>();
    this.#held.set(notebookId, others);
    return this.#inTurn(notebookId, async () => {
      if (this.#held.get(notebookId) !== others) return;
      for (const other of await this.#writeDown([notebookId])) others.add(other.processId);
    });
  }

  letGo(notebookId: string): Promise<void> {
    this.#held.delete(notebookId);
    return this.#inTurn(notebookId, async () => {
      if (this.#held.has(notebookId)) return;
      await this.options.database.raw(
        "delete from notebook_holders where notebook_id = ? and process_id = ?",
        [notebookId, this.options.processId],
      );
    });
  }

  /** Says that this process is alive, forgets those that are not, and looks who holds what. */
  async refresh(): Promise<void> {
    try {
      await this.options.database.raw(
        "delete from server_processes where seen_at < now() - make_interval(secs => ?)",
        [FORGOTTEN_AFTER_S],
      );
      await this.options.database.raw(
        `insert into server_processes (id) values (?) on conflict (id) do update set seen_at = now()`,
        [this.options.processId],
      );
      const held = this.heldNotebooks();
      const found = await this.#writeDown(held);
      for (const notebookId of held) {
        const others = this.#held.get(notebookId);
        const now = found.filter((each) => each.notebookId === notebookId).map(({ processId }) => processId);
        others?.clear();
        for (const processId of now) others?.add(processId);
      }
    } catch (error) {
      this.options.log.warn({ err: error }, "the other server processes could not be looked up");
    }
  }

  async stop(): Promise<void> {
    clearInterval(this.#beat);
    await this.#beating;
    await Promise.allSettled(this.#turns.values());
    this.#held.clear();
    await this.options.database
      .raw("delete from server_processes where id = ?", [this.options.processId])
      .catch((error: unknown) =>
        this.options.log.warn({ err: error }, "others will forget this process late"),
      );
  }

  /**
   * The share lock waits for whoever is adding rows, and they for it. So either our load sees their rows, or their
   * announcement sees us. The answer names the other holders.
   */
  async #writeDown(notebookIds: string[]): Promise<{ notebookId: string; processId: string }[]> {
    const { database, processId } = this.options;
    if (notebookIds.length === 0) return [];
    await database.raw("insert into server_processes (id) values (?) on conflict do nothing", [processId]);
    await database.raw(
      `with locked as materialized (
         select n.id from notebooks n
          where n.id = any(?::uuid[]) and not exists (
            select 1 from notebook_holders h where h.notebook_id = n.id and h.process_id = ?)
          order by n.id for share of n
       )
       insert into notebook_holders (notebook_id, process_id) select id, ?::uuid from locked
       on conflict do nothing`,
      [notebookIds, processId, processId],
    );
    return await rows(
      database,
      `select notebook_id as "notebookId", process_id as "processId" from notebook_holders
        where notebook_id = any(?::uuid[]) and process_id <> ?`,
      [notebookIds, processId],
    );
  }

  #inTurn(notebookId: string, work: () => Promise<void>): Promise<void> {
    const turn = (this.#turns.get(notebookId) ?? Promise.resolve()).then(work, work);
    this.#turns.set(notebookId, turn);
    const settled = () => {
      if (this.#turns.get(notebookId) === turn) this.#turns.delete(notebookId);
    };
    turn.then(settled, settled);
    return turn;
  }
}
