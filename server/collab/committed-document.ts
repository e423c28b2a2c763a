/** The document of an open room: committed updates only, garbage-collected, with its place in the stored log. */
import * as Y from "yjs";
import { buildDocument, type BadRow } from "./build-document.ts";
import type { Connection } from "./connection.ts";
import type { StoredDocument } from "./document-store.ts";
import { DocumentSize } from "./document-size.ts";
import { EncodingCache } from "./encoding-cache.ts";
import type { StateVector } from "./frames.ts";
import {
  metered,
  rowLimits,
  STEPS_PER_DOCUMENT,
  STEPS_PER_ROW_THEN,
  type Effort,
  type Limits,
} from "./integration-meter.ts";

/** Origin of every transaction after loading: whose committed update it was. */
export class CommittedBy {
  constructor(
    /** Null when the account is gone, or the row came without a person. */
    readonly personId: string | null,
    /** Null when another process wrote it. */
    readonly connection: Connection | null,
  ) {}
}

export type Application =
  { readonly ok: true; readonly steps: number } | { readonly ok: false; readonly reason: string };

/** A row that took so many steps more counts as another row when compaction is considered. */
const STEPS_LIKE_A_ROW = 10_000;

export class CommittedDocument {
  readonly document: Y.Doc;
  /** Rows left out while loading. */
  readonly bad: readonly BadRow[];
  lastSeq: number;
  schemaVersion: number;
  /** Rows since the stored state, laborious ones counted more than once; compaction looks at it. */
  rowsSinceState: number;
  /** A row did not apply and may have left half of itself: nothing of it is for anyone, and the room is made anew. */
  isSpoilt = false;

  readonly size: DocumentSize;

  readonly #cache: EncodingCache;
  readonly #listeners: ((update: Uint8Array, origin: CommittedBy) => void)[] = [];
  /** Told of only once a row has been taken in whole. */
  #untold: Uint8Array[] = [];
  #walked: number;

  constructor(stored: StoredDocument) {
    const { document, bad, walked } = buildDocument(stored.state, stored.tail);
    this.document = document;
    this.#walked = walked;
    this.bad = bad;
    this.lastSeq = stored.lastSeq;
    this.schemaVersion = stored.schemaVersion;
    this.rowsSinceState = stored.tail.length;
    this.#cache = new EncodingCache(document);
    if (stored.state !== null && bad.length === 0)
      this.#cache.begin(
        stored.state,
        stored.tail.map(({ update }) => update),
      );
    const bytes = stored.tail.reduce((sum, { update }) => sum + update.length, stored.state?.length ?? 0);
    this.size = new DocumentSize(bytes, () => this.encoded().length);
    document.on("update", (update, origin) => {
      this.#cache.note(update);
      // Yjs tidies formatting marks in transactions of its own; every client does the same for itself.
      if (origin instanceof CommittedBy) this.#untold.push(update);
    });
  }

  /** `listener` gets what was new in the update, for those who have everything before it. */
  onUpdate(listener: (update: Uint8Array, origin: CommittedBy) => void): void {
    this.#listeners.push(listener);
  }

  apply(seq: number, update: Uint8Array, origin: CommittedBy): Application {
    const pendingBefore = this.document.store.pendingStructs !== null;
    this.#untold = [];
    let effort: Effort;
    try {
      effort = metered(this.document, this.#limits(), () => Y.applyUpdate(this.document, update, origin));
    } catch (error) {
      return this.#spoilt(error instanceof Error ? error.message : String(error));
    }
    this.lastSeq = Math.max(this.lastSeq, seq);
    if (!pendingBefore && this.document.store.pendingStructs !== null)
      return this.#spoilt("it builds on something that is not there");
    const steps = effort.walked + effort.moved;
    this.#walked += effort.walked;
    this.size.add(update.length);
    this.rowsSinceState += 1 + Math.floor(steps / STEPS_LIKE_A_ROW);
    for (const whole of this.#untold) for (const listener of this.#listeners) listener(whole, origin);
    return { ok: true, steps };
  }

  #limits(): Limits {
    return this.#walked < STEPS_PER_DOCUMENT ? rowLimits : { ...rowLimits, walked: STEPS_PER_ROW_THEN };
  }

  #spoilt(reason: string): Application {
    this.isSpoilt = true;
    return { ok: false, reason };
  }

  clockOf(client: number): number {
    return Y.getState(this.document.store, client);
  }

  /** The answer to a step 1. */
  missingFor(
    stateVector: StateVector,
    encoded: Uint8Array,
  ): readonly [whole: Uint8Array, since?: Uint8Array] {
    if (stateVector.size === 0) return this.#cache.forJoining();
    return [Y.encodeStateAsUpdate(this.document, encoded)];
  }

  /** Holds no deleted sentence, unlike the updates that made it. */
  encoded(): Uint8Array {
    return this.#cache.exact();
  }

  destroy(): void {
    this.#cache.clear();
    this.document.destroy();
  }
}
