/** Reads an update, and stops reading one of more parts than an honest page sends: a byte can hold one. */
import * as Y from "yjs";
import { PARTS_PER_UPDATE } from "./limits.ts";

class BoundedDecoder extends Y.UpdateDecoderV1 {
  #left = PARTS_PER_UPDATE;

  /** Read once for every struct. */
  override readInfo(): number {
    this.#count();
    return super.readInfo();
  }

  /** Read once for every stretch of deletions. */
  override readDsClock(): number {
    this.#count();
    return super.readDsClock();
  }

  #count(): void {
    this.#left -= 1;
    if (this.#left < 0) throw new Error("a change of too many parts");
  }
}

/** Throws on bytes that are no update, and on an update of too many parts. */
export function decodeBounded(update: Uint8Array): ReturnType<typeof Y.decodeUpdate> {
  // The name says version 2; the decoder makes it version 1, as in Yjs's own `decodeUpdate`.
  return Y.decodeUpdateV2(update, BoundedDecoder);
}
