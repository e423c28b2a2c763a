/** How large a document is: an upper bound kept cheaply, measured only when it comes near the limit. */
import { LARGEST_DOCUMENT_BYTES, MEASURE_AGAIN_AFTER_MS } from "./limits.ts";

export class DocumentSize {
  #bytes: number;
  #measuredAt = -Infinity;

  constructor(
    stored: number,
    private readonly measure: () => number,
    private readonly now: () => number = Date.now,
  ) {
    this.#bytes = stored;
  }

  /** What is taken in adds at most its own length. */
  add(bytes: number): void {
    this.#bytes += bytes;
  }

  /** Whether so many bytes more may be taken. What was deleted since counts until it is measured again. */
  hasRoomFor(bytes: number, most = LARGEST_DOCUMENT_BYTES): boolean {
    if (this.#bytes + bytes <= most) return true;
    if (this.now() - this.#measuredAt < MEASURE_AGAIN_AFTER_MS) return false;
    this.#measuredAt = this.now();
    this.#bytes = this.measure();
    return this.#bytes + bytes <= most;
  }
}
