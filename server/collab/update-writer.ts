/**
 * The one ordered writer of a room. What arrives while one insert commits is gathered for the next (group commit);
 * only what is committed is applied, broadcast and acknowledged. A store that cannot be reached is waited for.
 */
import { setImmediate as nextTurn, setTimeout as sleep } from "node:timers/promises";
import type { Logger } from "pino";
import { CommittedBy, type CommittedDocument } from "./committed-document.ts";
import type { Connection } from "./connection.ts";
import type { AppendOutcome, DocumentStore } from "./document-store.ts";
import { appendUntilAnswered, usualRetry, type RetryTimes } from "./append-until-answered.ts";
import { HeldFrames } from "./held-frames.ts";
import type { QueuedUpdate, WriterReports } from "./writer-reports.ts";
import { STEPS_PER_TURN } from "./integration-meter.ts";
import { rowsSetAside } from "./rows-set-aside.ts";
import { takeInRows } from "./take-in-rows.ts";
import { assessUpdate, type Assessment, type Missing } from "./update-check.ts";
import { WriteQueue } from "./write-queue.ts";

const SHORTER = "the stored log is shorter than what was committed";

export interface WriterOptions {
  readonly notebookId: string;
  readonly store: DocumentStore;
  readonly document: CommittedDocument;
  readonly reports: WriterReports;
  readonly log: Logger;
  readonly retry?: RetryTimes;
}

export class UpdateWriter {
  readonly #options: WriterOptions;
  readonly #queue: WriteQueue;
  readonly #held = new HeldFrames();
  readonly #stop = new AbortController();
  readonly #retry: RetryTimes;
  #running: Promise<void> | null = null;
  #mayBeBehind = false;
  /** Another process held the notebook when this one last stored something. */
  #isShared = false;

  constructor(options: WriterOptions) {
    this.#options = options;
    this.#retry = options.retry ?? usualRetry;
    this.#queue = new WriteQueue(options.document, options.reports);
  }

  /** Takes a content frame of someone who may write. */
  offer(connection: Connection, personId: string, update: Uint8Array): void {
    const { reports, document } = this.#options;
    const frame = connection.saved.take();
    const assessment = assessUpdate(update, this.#queue.known);
    const entry = { connection, frame, personId, update, carries: assessment.verdict === "new" };
    if (assessment.verdict === "malformed") return reports.malformed(connection, assessment.reason);
    if (assessment.verdict === "waiting") return this.#hold(entry, assessment.missing);
    const grows = assessment.verdict === "new" && assessment.reaches.size > 0;
    if (grows && !document.size.hasRoomFor(update.length))
      return reports.refused(entry, "the notebook is full: delete something first");
    this.#enqueue(entry, assessment);
    if (entry.carries) this.#retryHeld(connection);
  }

  /** Frames of a closed connection that wait for something are given up; queued ones are still stored. */
  forget(connection: Connection): void {
    this.#held.drop(connection);
  }

  /** Gives up frames that have waited too long for what they build on. */
  expireHeld(now: number): void {
    for (const connection of this.#held.connections()) this.#retryHeld(connection);
    for (const entry of this.#held.takeExpired(now))
      this.#options.reports.refused(entry, "it builds on something that never arrived");
  }

  /** Resolves when everything queued is stored (or the writer was abandoned). */
  async drained(): Promise<void> {
    while (this.#running !== null) await this.#running;
  }

  /** Stops trying. What is queued was never acknowledged, so its authors still hold it. */
  abandon(): void {
    this.#stop.abort();
    this.#queue.clear();
  }

  /** Another process has committed rows, or may have while nobody heard of it. */
  lookForMore(): void {
    this.#mayBeBehind = true;
    this.#start();
  }

  #isGivenUp(): boolean {
    return this.#stop.signal.aborted;
  }

  #hold(entry: QueuedUpdate, missing: readonly Missing[]): void {
    if (!this.#held.add(entry, missing, Date.now())) this.#waitsTooMuch(entry.connection);
  }

  #waitsTooMuch(connection: Connection): void {
    this.#options.reports.malformed(connection, "too much builds on something that is not there");
  }

  #retryHeld(connection: Connection): void {
    const next = () => this.#held.first(connection, this.#queue.known);
    for (let entry = next(); entry !== null; entry = next()) {
      const assessment = assessUpdate(entry.update, this.#queue.known);
      if (assessment.verdict === "waiting") {
        if (!this.#held.waitOn(connection, assessment.missing)) this.#waitsTooMuch(connection);
        return;
      }
      this.#held.takeFirst(connection);
      if (assessment.verdict === "malformed")
        return this.#options.reports.malformed(connection, assessment.reason);
      this.#enqueue(entry, assessment);
    }
  }

  #enqueue(entry: QueuedUpdate, assessment: Assessment): void {
    this.#queue.push(entry, assessment);
    this.#start();
  }

  #start(): void {
    this.#running ??= this.#run().finally(() => (this.#running = null));
  }

  async #run(): Promise<void> {
    // What arrives in the same turn shares the first insert.
    await Promise.resolve();
    while ((this.#queue.length > 0 || this.#mayBeBehind) && !this.#isGivenUp()) {
      if (this.#mayBeBehind) await this.#look();
      if (this.#queue.length === 0 || this.#isGivenUp()) continue;
      const batch = this.#queue.nextBatch();
      const carrying = batch.filter(({ carries }) => carries);
      if (carrying.length === 0) {
        this.#settle(batch);
        continue;
      }
      const outcome = await this.#append(carrying);
      if (outcome === "given up") return;
      if (outcome === null) return this.#options.reports.notebookGone();
      if (outcome.stored) await this.#commit(batch, carrying, outcome);
      else await this.#resolve(outcome);
    }
  }

  async #append(carrying: readonly QueuedUpdate[]): Promise<AppendOutcome | null | "given up"> {
    const { store, document, notebookId, reports, log } = this.#options;
    const versions = carrying.map(({ connection }) => connection.schemaVersion);
    const request = {
      notebookId,
      after: document.lastSeq,
      // Two who write at once would otherwise refuse each other again and again.
      evenIfBehind: this.#isShared,
      updates: carrying,
      schema: { lowest: Math.min(...versions), highest: Math.max(...versions) },
    };
    const outcome = await appendUntilAnswered(store, request, {
      log,
      signal: this.#stop.signal,
      retry: this.#retry,
      onUnreachable: () => reports.storeUnreachable(),
      onBack: () => reports.storeBack(),
    });
    if (outcome !== null && "hopeless" in outcome) {
      reports.broken(outcome.hopeless);
      return "given up";
    }
    return outcome !== null && "abandoned" in outcome ? "given up" : outcome;
  }

  async #commit(
    batch: readonly QueuedUpdate[],
    carrying: readonly QueuedUpdate[],
    outcome: AppendOutcome,
  ): Promise<void> {
    const { document, reports } = this.#options;
    this.#isShared = outcome.announced;
    let seq = outcome.lastSeq - carrying.length;
    if (seq < document.lastSeq) return reports.broken(new Error(SHORTER));
    while (seq > document.lastSeq && !this.#isGivenUp()) await this.#catchUpOrWait(seq);
    if (this.#isGivenUp()) return;
    let stepsInTurn = 0;
    for (const [index, { update, personId, connection }] of carrying.entries()) {
      seq += 1;
      const applied = document.apply(seq, update, new CommittedBy(personId, connection));
      if (!applied.ok) return this.#setAside(seq, applied.reason, carrying.slice(index));
      stepsInTurn += applied.steps;
      if (stepsInTurn < STEPS_PER_TURN) continue;
      stepsInTurn = 0;
      // Other notebooks get their turn between laborious rows.
      await nextTurn();
      if (this.#isGivenUp()) return;
    }
    this.#settle(batch);
    this.#heedSchema(outcome);
  }

  #settle(batch: readonly QueuedUpdate[]): void {
    this.#queue.settle(batch);
    this.#options.reports.committed(batch);
  }

  /** Our own mistake, or made to take too long: set aside, its sender closed, and the room made anew without it. */
  #setAside(seq: number, reason: string, rest: readonly QueuedUpdate[]): void {
    const { store, notebookId, reports, log } = this.#options;
    log.error({ seq, reason }, "a stored update does not apply");
    if (rest[0] !== undefined) reports.malformed(rest[0].connection, reason);
    this.#stop.abort();
    store
      .quarantine(notebookId, rowsSetAside(seq, reason, rest))
      .catch((error: unknown) => log.error({ err: error, seq }, "a row could not be set aside"))
      .finally(() => reports.broken(new Error(`row ${seq} does not apply: ${reason}`)));
  }

  /** Nothing was stored: sees to each reason, so that the next attempt differs from this one. */
  async #resolve(outcome: AppendOutcome): Promise<void> {
    const { document, reports } = this.#options;
    if (outcome.deleted) return reports.notebookGone();
    if (outcome.lastSeq < document.lastSeq) return reports.broken(new Error(SHORTER));
    if (outcome.archived) {
      this.#queue.refuse(() => true, "the notebook is archived");
      return reports.lostRight("everyone");
    }
    if (outcome.denied.length > 0) {
      const denied = new Set(outcome.denied);
      this.#queue.refuse(({ personId }) => denied.has(personId), "you may only read this notebook");
      reports.lostRight(outcome.denied);
    }
    this.#heedSchema(outcome);
    if (outcome.lastSeq > document.lastSeq) {
      await this.#catchUpOrWait(outcome.lastSeq);
      this.#queue.reassess();
    }
  }

  /** Older editors would delete what they do not know: they are refused, also when another process took the newer one. */
  #heedSchema({ schemaVersion }: Pick<AppendOutcome, "schemaVersion">): void {
    const { document, reports } = this.#options;
    if (schemaVersion <= document.schemaVersion) return;
    document.schemaVersion = schemaVersion;
    this.#queue.refuse(
      ({ connection }) => connection.schemaVersion < schemaVersion,
      "the notebook needs a newer page",
    );
    reports.schemaRaised();
  }

  /** What became of the notebook elsewhere. */
  async #look(): Promise<void> {
    const { store, document, notebookId, reports, log } = this.#options;
    this.#mayBeBehind = false;
    try {
      const newest = await store.newest(notebookId);
      if (newest === null) return reports.notebookGone();
      if (newest.lastSeq < document.lastSeq) return reports.broken(new Error(SHORTER));
      this.#heedSchema(newest);
      if (newest.lastSeq === document.lastSeq) return;
      await this.#catchUp(newest.lastSeq);
      this.#queue.reassess();
    } catch (error) {
      log.error({ err: error }, "rows of another process could not be looked for");
      this.#mayBeBehind = true;
      await this.#pause();
    }
  }

  /** Takes in rows that another process wrote. */
  async #catchUp(upTo: number): Promise<void> {
    const bad = await takeInRows(this.#options, upTo, () => this.#isGivenUp());
    if (bad !== null) this.#setAside(bad.seq, bad.reason, []);
  }

  async #catchUpOrWait(upTo: number): Promise<void> {
    try {
      await this.#catchUp(upTo);
    } catch (error) {
      // The next attempt meets the same store.
      this.#options.log.error({ err: error }, "rows of another process could not be read");
      await this.#pause();
    }
  }

  async #pause(): Promise<void> {
    await sleep(this.#retry.firstMs, undefined, { signal: this.#stop.signal }).catch(() => undefined); // given up: looked at next
  }
}
