/** The whole document encoded once and kept, so that many people joining at once do not each pay for it. */
import * as Y from "yjs";

/** Below this size encoding anew costs less than a frame more. */
const SMALL_BYTES = 32 * 1024;
const LONGEST_TAIL = 64;

export class EncodingCache {
  #encoded: Uint8Array | null = null;
  #tail: Uint8Array[] = [];

  constructor(private readonly document: Y.Doc) {}

  /** Call with every update that the document took. */
  note(update: Uint8Array): void {
    if (this.#encoded === null) return;
    if (this.#tail.length < LONGEST_TAIL) this.#tail.push(update);
    else this.clear();
  }

  clear(): void {
    this.#encoded = null;
    this.#tail = [];
  }

  /** The document as it is: one encoding of its garbage-collected state. */
  exact(): Uint8Array {
    if (this.#encoded === null || this.#tail.length > 0) {
      this.#encoded = Y.encodeStateAsUpdate(this.document);
      this.#tail = [];
    }
    return this.#encoded;
  }

  /** An encoding and, if it is not the newest, what came since: to be sent one after the other. */
  forJoining(): readonly [whole: Uint8Array, since?: Uint8Array] {
    if (this.#encoded === null || this.#tail.length === 0 || this.#encoded.length < SMALL_BYTES)
      return [this.exact()];
    return [this.#encoded, Y.mergeUpdates(this.#tail)];
  }
}
