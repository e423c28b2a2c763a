/**
 * A notebook that is open in this process. One state machine:
 *
 *   loading ──▶ open ◀──▶ draining ──▶ closed
 *      │          │           │
 *      └──────────┴───────────┴──────▶ failed
 *
 * A room stays as long as someone holds a lease on it (from before its load until their socket ends) or as long as
 * something is not stored. Draining turns back to open when someone comes.
 */
import { setTimeout as sleep } from "node:timers/promises";
import { closeCode, type ServerNotice } from "#contract/collab.ts";
import { CommittedDocument, type CommittedBy } from "./committed-document.ts";
import type { Connection } from "./connection.ts";
import { writeStep1, writeUpdate } from "./frames.ts";
import { Presence } from "./presence.ts";
import { RoomFailed, RoomNotFound, ways, type RoomState } from "./room-state.ts";
import type { Content, Lease, RoomOptions } from "./room-parts.ts";
import { reportsTo } from "./room-reports.ts";
import { UpdateWriter } from "./update-writer.ts";
import type { QueuedUpdate } from "./writer-reports.ts";

export class Room {
  readonly notebookId: string;
  readonly members = new Set<Connection>();
  /** Resolves once, when the room is closed or failed. */
  readonly ended: Promise<void>;

  readonly #options: RoomOptions;
  readonly #loaded: Promise<Content>;
  readonly #presence: Presence;
  #state: RoomState = "loading";
  #content: Content | null = null;
  #leases = 0;
  #stopping = false;
  /** Something was announced while the stored document was on its way here. */
  #mayBeBehind = false;
  #linger: NodeJS.Timeout | null = null;
  /** Told apart by number: one that was interrupted must not end the room under a later one. */
  #drains = 0;
  #resolveEnded: () => void = () => undefined;

  constructor(options: RoomOptions) {
    this.notebookId = options.notebookId;
    this.#options = options;
    this.#presence = new Presence({
      audience: () => this.members,
      onChange: (state) => options.neighbours.say({ about: "presence", notebookId: this.notebookId, state }),
    });
    this.ended = new Promise((resolve) => (this.#resolveEnded = resolve));
    this.#loaded = this.#load();
    // Whoever waits for the load hears of its failure; nobody may be waiting any more.
    this.#loaded.catch(() => undefined);
  }

  get state(): RoomState {
    return this.#state;
  }

  /** Waits for the load. Throws `RoomNotFound` or `RoomFailed`; the lease is then released already. */
  async enter(): Promise<Lease> {
    this.#leases += 1;
    this.#stay();
    let held = true;
    const release = () => {
      if (!held) return;
      held = false;
      this.#leases -= 1;
      this.#leaveIfEmpty();
    };
    try {
      await this.#loaded;
    } catch (error) {
      release();
      throw error;
    }
    if (this.#state === "failed" || this.#state === "closed") {
      release();
      throw new RoomFailed("the notebook has just been closed");
    }
    return { room: this, release };
  }

  /** The caller holds a lease. */
  join(connection: Connection): void {
    const content = this.#opened();
    if (content === null) return connection.close(closeCode.failed, "the notebook could not be kept open");
    this.members.add(connection);
    if (connection.rights.mayWrite) connection.send(writeStep1(content.document.document));
    const present = this.#presence.snapshotFor(connection);
    if (present !== null) connection.send(present);
  }

  leave(connection: Connection): void {
    this.members.delete(connection);
    this.#presence.leave(connection);
    this.#content?.writer.forget(connection);
  }

  /** Null unless frames may be taken at the moment. */
  get taking(): { readonly document: CommittedDocument; readonly writer: UpdateWriter } | null {
    if (this.#stopping || this.#state !== "open" || this.#content?.document.isSpoilt === true) return null;
    return this.#opened();
  }

  get presence(): Presence {
    return this.#presence;
  }

  /** After a change of rights: tells the person, and asks for what they have typed meanwhile. */
  rightsChanged(connection: Connection, before: { readonly mayWrite: boolean }): void {
    if (!connection.rights.maySendPresence) this.#presence.leave(connection);
    if (before.mayWrite === connection.rights.mayWrite) return;
    connection.notify({ about: connection.rights.mayWrite ? "writable" : "read-only" });
    if (!connection.rights.mayWrite) this.#content?.writer.forget(connection);
    else if (this.#content !== null) connection.send(writeStep1(this.#content.document.document));
  }

  notify(notice: ServerNotice): void {
    for (const member of this.members) member.notify(notice);
  }

  /** Another process has committed rows, or may have. */
  lookForMore(): void {
    if (this.#content === null) this.#mayBeBehind = true;
    else this.#content.writer.lookForMore();
  }

  /** Called every few seconds. */
  tick(now: number): void {
    this.#presence.expire();
    this.#content?.writer.expireHeld(now);
  }

  /** Takes no more frames, stores what is queued, closes the sockets and ends. */
  async stop(patienceMs: number): Promise<void> {
    this.#stopping = true;
    if (this.#state === "loading") {
      const loading = this.#loaded.catch(() => undefined); // a failed load has ended the room
      await Promise.race([loading, sleep(patienceMs, undefined, { ref: false })]);
      if (this.state === "loading") return this.fail(new Error("the load did not end"));
    }
    const content = this.#content;
    if (content !== null) {
      const timer = setTimeout(() => {
        this.#options.log.error("updates could not be stored before the end; their authors still hold them");
        content.writer.abandon();
      }, patienceMs);
      await content.writer.drained();
      clearTimeout(timer);
    }
    for (const member of this.members) member.close(closeCode.goingAway, "the server is stopping");
    await this.#drain();
    await this.ended;
  }

  /** Ends at once; whoever comes next loads the room anew. */
  fail(
    error: unknown,
    code: number = closeCode.failed,
    reason = "the notebook is being loaded afresh",
  ): void {
    if (this.#state === "failed" || this.#state === "closed") return;
    this.#options.log.warn({ err: error }, "a room failed");
    this.#content?.writer.abandon();
    for (const member of this.members) member.close(code, reason);
    this.#end("failed");
  }

  #move(to: RoomState): void {
    if (!ways[this.#state].includes(to)) throw new Error(`a room cannot go from ${this.#state} to ${to}`);
    this.#state = to;
  }

  async #load(): Promise<Content> {
    const { store, notebookId, observers, neighbours, log } = this.#options;
    try {
      await neighbours.hold(notebookId);
      const stored = await store.load(notebookId);
      if (stored === null) throw new RoomNotFound("there is no such notebook");
      const document = new CommittedDocument(stored);
      if (document.bad.length > 0) {
        log.error({ rows: document.bad }, "stored rows do not apply and were set aside");
        await store
          .quarantine(notebookId, document.bad)
          .catch((error: unknown) => log.error({ err: error }, "rows could not be set aside"));
      }
      const content = this.#open(document);
      this.#move("open");
      if (this.#mayBeBehind) content.writer.lookForMore();
      for (const observer of observers) observer.opened?.(content.open);
      this.#leaveIfEmpty();
      return content;
    } catch (error) {
      this.#options.log.warn({ err: error }, "a notebook could not be loaded");
      if (this.state === "loading") this.#end("failed");
      throw error instanceof RoomNotFound
        ? error
        : new RoomFailed("the notebook could not be loaded", { cause: error });
    }
  }

  #open(document: CommittedDocument): Content {
    const { notebookId, store, log, retry } = this.#options;
    document.onUpdate((update, origin) => this.#broadcast(update, origin));
    const writer = new UpdateWriter({
      notebookId,
      store,
      document,
      log,
      reports: reportsTo(this, document, (batch) => this.#committed(batch)),
      ...(retry === undefined ? {} : { retry }),
    });
    const notify = (notice: ServerNotice) => {
      this.notify(notice);
      if (notice.about === "results") this.#options.neighbours.say({ about: "results", notebookId });
    };
    const open = { notebookId, content: document, notify };
    this.#content = { document, writer, open };
    return this.#content;
  }

  #opened(): Content | null {
    return this.#state === "open" || this.#state === "draining" ? this.#content : null;
  }

  #broadcast(update: Uint8Array, origin: CommittedBy): void {
    const frame = writeUpdate(update);
    for (const member of this.members) if (member.joined && member !== origin.connection) member.send(frame);
  }

  #committed(batch: readonly QueuedUpdate[]): void {
    for (const connection of new Set(batch.map(({ connection }) => connection))) connection.sendSaved();
    const content = this.#content;
    if (content === null || !batch.some(({ carries }) => carries)) return;
    for (const observer of this.#options.observers) observer.committed?.(content.open);
  }

  #stay(): void {
    if (this.#linger !== null) clearTimeout(this.#linger);
    this.#linger = null;
    if (this.#state !== "draining" || this.#stopping) return;
    this.#drains += 1;
    this.#move("open");
  }

  #leaveIfEmpty(): void {
    if (this.#leases > 0 || this.#state !== "open" || this.#stopping || this.#linger !== null) return;
    this.#linger = setTimeout(() => {
      this.#linger = null;
      this.#drain().catch((error: unknown) => this.fail(error));
    }, this.#options.lingerMs);
  }

  /** Ends the room unless someone comes while it is being tidied. */
  async #drain(): Promise<void> {
    if (this.#state !== "open" || (this.#leases > 0 && !this.#stopping)) return;
    const content = this.#content;
    if (content === null) return;
    this.#move("draining");
    this.#drains += 1;
    const turn = this.#drains;
    await content.writer.drained();
    for (const observer of this.#options.observers) {
      if (turn !== this.#drains) return;
      await observer.draining?.(content.open);
    }
    if (turn === this.#drains && this.state === "draining") this.#end("closed");
  }

  #end(state: "closed" | "failed"): void {
    this.#move(state);
    if (this.#linger !== null) clearTimeout(this.#linger);
    this.#linger = null;
    this.#presence.stop();
    this.#options.neighbours
      .letGo(this.notebookId)
      .catch((error: unknown) => this.#options.log.warn({ err: error }, "a notebook stays noted as held"));
    const content = this.#content;
    if (content !== null) {
      for (const observer of this.#options.observers) observer.ended?.(content.open);
      content.document.destroy();
    }
    this.#resolveEnded();
  }
}
