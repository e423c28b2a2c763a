/** What waits to be stored, in order, and what it brings the document to. */
import { BackPressure } from "./back-pressure.ts";
import type { CommittedDocument } from "./committed-document.ts";
import { nextBatch } from "./next-batch.ts";
import { assessUpdate, isDeletedIn, type Assessment, type KnownContent } from "./update-check.ts";
import type { QueuedUpdate, WriterReports } from "./writer-reports.ts";

export class WriteQueue {
  /** What is stored or queued. */
  readonly known: KnownContent;
  readonly #queue: QueuedUpdate[] = [];
  /** Clocks that the queue brings clients to, beyond the document's. */
  readonly #reaches = new Map<number, number>();
  readonly #pressure = new BackPressure();

  constructor(
    document: CommittedDocument,
    private readonly reports: Pick<WriterReports, "refused">,
  ) {
    this.known = {
      clockOf: (client) => Math.max(this.#reaches.get(client) ?? 0, document.clockOf(client)),
      isDeleted: (client, clock, length) => isDeletedIn(document.document, client, clock, length),
    };
  }

  get length(): number {
    return this.#queue.length;
  }

  nextBatch(): readonly QueuedUpdate[] {
    return nextBatch(this.#queue);
  }

  push(entry: QueuedUpdate, assessment: Assessment): void {
    entry.carries = assessment.verdict === "new";
    if (assessment.verdict === "new") this.#note(assessment.reaches);
    this.#queue.push(entry);
    this.#pressure.add(entry.connection, entry.update.length);
  }

  /** The first batch is stored, or there was nothing in it to store. */
  settle(batch: readonly QueuedUpdate[]): void {
    this.#queue.splice(0, batch.length);
    if (this.#queue.length === 0) this.#reaches.clear();
    for (const { connection, frame, update } of batch) {
      connection.saved.commit(frame);
      this.#pressure.remove(connection, update.length);
    }
  }

  refuse(isRefused: (entry: QueuedUpdate) => boolean, reason: string): void {
    const refused = this.#queue.filter(isRefused);
    const kept = this.#queue.filter((entry) => !refused.includes(entry));
    this.#queue.splice(0, this.#queue.length, ...kept);
    for (const entry of refused) {
      this.#pressure.remove(entry.connection, entry.update.length);
      this.reports.refused(entry, reason);
    }
    this.reassess();
  }

  /** What the queue builds on has changed: some of it may be known by now, or have lost what it builds on. */
  reassess(): void {
    const queued = this.#queue.splice(0);
    this.#reaches.clear();
    for (const entry of queued) {
      const assessment = assessUpdate(entry.update, this.known);
      if (assessment.verdict === "new") this.#note(assessment.reaches);
      entry.carries = assessment.verdict === "new";
      if (assessment.verdict === "new" || assessment.verdict === "known") this.#queue.push(entry);
      else {
        this.#pressure.remove(entry.connection, entry.update.length);
        this.reports.refused(entry, "it builds on something that was not accepted");
      }
    }
  }

  clear(): void {
    this.#queue.length = 0;
    this.#reaches.clear();
    this.#pressure.releaseAll();
  }

  #note(reaches: ReadonlyMap<number, number>): void {
    for (const [client, clock] of reaches) this.#reaches.set(client, clock);
  }
}
