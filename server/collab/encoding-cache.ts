/** The whole document encoded once and kept, so that many people joining at once do not each pay for it. */
import * as Y from "yjs";

/** Below this size encoding anew costs less than a frame more. */
const SMALL_BYTES = 32 * 1024;
const LONGEST_TAIL = 64;
/** Merging takes time that grows with the square of the rows; compaction leaves about so many at most. */
const LONGEST_STORED_TAIL = 600;

export class EncodingCache {
  #encoded: Uint8Array | null = null;
  /** What came since, in order; merged into one when somebody joins. */
  #tail: Uint8Array[] = [];
  #updatesSince = 0;

  constructor(private readonly document: Y.Doc) {}

  /**
   * The document was just made of these: whoever joins next gets them as they are stored, which spares encoding a long
   * one anew. Not for those who must not see what was deleted since the state was folded.
   */
  begin(state: Uint8Array, tail: readonly Uint8Array[]): void {
    if (state.length < SMALL_BYTES || tail.length > LONGEST_STORED_TAIL) return;
    this.#encoded = state;
    this.#tail = [...tail];
  }

  /** Call with every update that the document took. */
  note(update: Uint8Array): void {
    if (this.#encoded === null) return;
    this.#updatesSince += 1;
    if (this.#updatesSince <= LONGEST_TAIL) this.#tail.push(update);
    else this.clear();
  }

  clear(): void {
    this.#encoded = null;
    this.#tail = [];
    this.#updatesSince = 0;
  }

  /** The document as it is: one encoding of its garbage-collected state. */
  exact(): Uint8Array {
    if (this.#encoded === null || this.#tail.length > 0) {
      this.clear();
      this.#encoded = Y.encodeStateAsUpdate(this.document);
    }
    return this.#encoded;
  }

  /** An encoding and, if it is not the newest, what came since: to be sent one after the other. */
  forJoining(): readonly [whole: Uint8Array, since?: Uint8Array] {
    if (this.#encoded === null || this.#tail.length === 0 || this.#encoded.length < SMALL_BYTES)
      return [this.exact()];
    const [first, second] = this.#tail;
    const since = first !== undefined && second === undefined ? first : Y.mergeUpdates(this.#tail);
    this.#tail = [since];
    return [this.#encoded, since];
  }
}
