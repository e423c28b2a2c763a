/**
 * The other server processes on the same database. What they commit is heard of at once; presence and notices are
 * gathered and cross at most four times a second. A process alone says nothing.
 */
import type { Logger } from "pino";
import type { Database } from "../data/database.ts";
import { listenForNotifications, type Notifications } from "../data/notifications.ts";
import { Holders } from "./holders.ts";
import {
  linesOf,
  lineSchema,
  NEIGHBOURS_CHANNEL,
  readLine,
  ROWS_CHANNEL,
  rowsSchema,
  type NeighbourMessage,
} from "./neighbour-messages.ts";

export interface NeighboursOptions {
  readonly database: Database;
  readonly databaseUrl: string;
  readonly log: Logger;
  /** Of this process, as the rows it writes say. */
  readonly processId: string;
  /** Of a notebook that is held here. */
  readonly onRows: (notebookId: string) => void;
  readonly onMessage: (message: NeighbourMessage, from: string) => void;
  /** Announcements may have been missed, in every notebook. */
  readonly onGap: () => void;
}

const GATHER_MS = 250;
const FIRST_RETRY_MS = 100;
const LONGEST_RETRY_MS = 5_000;

export class Neighbours {
  readonly holders: Holders;
  readonly #listening = new AbortController();
  readonly #started: Promise<Notifications | null>;
  #outbox: NeighbourMessage[] = [];
  #timer: NodeJS.Timeout | null = null;
  #sending: Promise<void> = Promise.resolve();

  constructor(private readonly options: NeighboursOptions) {
    this.holders = new Holders({ ...options, onShared: options.onRows });
    this.#started = this.#listen();
  }

  /** Call before the notebook is read. */
  async hold(notebookId: string): Promise<void> {
    await this.#started;
    await this.holders.hold(notebookId);
    this.say({ about: "hello", notebookId });
  }

  async letGo(notebookId: string): Promise<void> {
    this.say({ about: "goodbye", notebookId });
    await this.holders.letGo(notebookId);
  }

  /** To those who hold the notebook; of what is said of one person or notice in the meantime the last counts. */
  say(message: NeighbourMessage): void {
    if (this.holders.othersOf(message.notebookId).size === 0) return;
    const isReplaced = (earlier: NeighbourMessage) =>
      earlier.about === message.about &&
      earlier.notebookId === message.notebookId &&
      (earlier.about !== "presence" ||
        message.about !== "presence" ||
        earlier.state.client === message.state.client);
    this.#outbox = [...this.#outbox.filter((earlier) => !isReplaced(earlier)), message];
    this.#timer ??= setTimeout(() => this.#send(), GATHER_MS);
  }

  async stop(): Promise<void> {
    this.#listening.abort();
    if (this.#timer !== null) this.#send();
    await this.#sending;
    await (await this.#started)?.stop();
    await this.holders.stop();
  }

  #send(): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
    const lines = [...linesOf(this.options.processId, this.#outbox)];
    this.#outbox = [];
    if (lines.length === 0) return;
    this.#sending = this.options.database
      .raw(
        // What is said here may be lost with the database; waiting for its disk would only slow down what may not.
        `select set_config('synchronous_commit', 'off', true), pg_notify(?, line) from unnest(?::text[]) as line`,
        [NEIGHBOURS_CHANNEL, lines],
      )
      .then(
        () => undefined,
        (error: unknown) => this.options.log.warn({ err: error }, "the other processes could not be told"),
      );
  }

  /** A database that is away when we start is waited for, as later on. */
  async #listen(): Promise<Notifications | null> {
    const { databaseUrl, log, onGap } = this.options;
    for (let delay = FIRST_RETRY_MS; !this.#listening.signal.aborted;) {
      try {
        return await listenForNotifications({
          databaseUrl,
          channels: [ROWS_CHANNEL, NEIGHBOURS_CHANNEL],
          log,
          onNotification: (channel, payload) => this.#hear(channel, payload),
          onGap: () => {
            // Noted as holders first: what is committed after that is announced to us again.
            void this.holders.refresh().then(onGap);
          },
        });
      } catch (error) {
        log.warn({ err: error }, "the other processes cannot be listened to yet");
      }
      await new Promise((resolve) => setTimeout(resolve, delay));
      delay = Math.min(delay * 2, LONGEST_RETRY_MS);
    }
    return null;
  }

  #hear(channel: string, payload: string): void {
    const { processId, onRows, log } = this.options;
    if (channel === ROWS_CHANNEL) {
      const said = readLine(rowsSchema, payload);
      if (said === null) return log.warn("an announcement of rows could not be read");
      if (said.from !== processId && this.holders.isHeld(said.notebookId)) onRows(said.notebookId);
      return;
    }
    const line = readLine(lineSchema, payload);
    if (line === null) return log.warn("a message of another process could not be read");
    if (line.from === processId) return;
    for (const message of line.messages) this.#take(message, line.from);
  }

  #take(message: NeighbourMessage, from: string): void {
    const { notebookId, about } = message;
    if (!this.holders.isHeld(notebookId)) return;
    if (about === "goodbye") this.holders.went(notebookId, from);
    else this.holders.came(notebookId, from);
    this.options.onMessage(message, from);
  }
}
