/** The document of an open room: committed updates only, garbage-collected, with its place in the stored log. */
import * as Y from "yjs";
import { buildDocument, type BadRow } from "./build-document.ts";
import type { Connection } from "./connection.ts";
import type { StoredDocument } from "./document-store.ts";
import { EncodingCache } from "./encoding-cache.ts";
import type { StateVector } from "./frames.ts";

/** Origin of every transaction after loading: whose committed update it was. */
export class CommittedBy {
  constructor(
    /** Null when the account is gone, or the row came without a person. */
    readonly personId: string | null,
    /** Null when another process wrote it. */
    readonly connection: Connection | null,
  ) {}
}

export type Application = { readonly ok: true } | { readonly ok: false; readonly reason: string };

export class CommittedDocument {
  readonly document: Y.Doc;
  /** Rows left out while loading. */
  readonly bad: readonly BadRow[];
  lastSeq: number;
  schemaVersion: number;
  /** Rows since the stored state; compaction looks at it. */
  rowsSinceState: number;

  readonly #cache: EncodingCache;

  constructor(stored: StoredDocument) {
    const { document, bad } = buildDocument(stored.state, stored.tail);
    this.document = document;
    this.bad = bad;
    this.lastSeq = stored.lastSeq;
    this.schemaVersion = stored.schemaVersion;
    this.rowsSinceState = stored.tail.length;
    this.#cache = new EncodingCache(document);
    document.on("update", (update) => this.#cache.note(update));
  }

  /** `listener` gets what was new in the update, for those who have everything before it. */
  onUpdate(listener: (update: Uint8Array, origin: CommittedBy) => void): void {
    this.document.on("update", (update: Uint8Array, origin: unknown) => {
      // Yjs tidies formatting marks in transactions of its own; every client does the same for itself.
      if (origin instanceof CommittedBy) listener(update, origin);
    });
  }

  apply(seq: number, update: Uint8Array, origin: CommittedBy): Application {
    const pendingBefore = this.document.store.pendingStructs !== null;
    try {
      Y.applyUpdate(this.document, update, origin);
    } catch (error) {
      return { ok: false, reason: error instanceof Error ? error.message : String(error) };
    }
    this.lastSeq = Math.max(this.lastSeq, seq);
    this.rowsSinceState += 1;
    if (!pendingBefore && this.document.store.pendingStructs !== null)
      return { ok: false, reason: "it builds on something that is not there" };
    return { ok: true };
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
