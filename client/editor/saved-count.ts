/**
 * Whether everything typed is committed on the server.
 *
 * The server says how many sync frames with content (step 2 or update) of this connection are committed; here we
 * count how many were sent. Deletions change no state vector, so nothing else can tell. On a new connection all
 * that is missing travels in the answer to the server's step 1: before that answer is committed nothing is "saved".
 */
import { messageType } from "#contract/collab.ts";

const syncStep2 = 1;
const syncUpdate = 2;

export interface SavedCount {
  /** Something was typed in this editor. */
  typed(): void;
  connected(): void;
  sent(frame: Uint8Array): void;
  /** The server's count for this connection. */
  committed(frames: number): void;
  unsaved(): boolean;
}

/** The kind of a frame that carries content, or null. Both type numbers are below 128: one byte each. */
export function contentOf(frame: Uint8Array): "step 2" | "update" | null {
  if (frame[0] !== messageType.sync) return null;
  if (frame[1] === syncStep2) return "step 2";
  return frame[1] === syncUpdate ? "update" : null;
}

/** `unsavedBefore`: an earlier page left typing in the local copy that was not known to be committed. */
export function createSavedCount(unsavedBefore: boolean): SavedCount {
  let unsaved = unsavedBefore;
  let answered = false;
  let framesSent = 0;
  return {
    typed() {
      unsaved = true;
    },
    connected() {
      answered = false;
      framesSent = 0;
    },
    sent(frame) {
      const content = contentOf(frame);
      if (content === null) return;
      framesSent += 1;
      if (content === "step 2") answered = true;
    },
    committed(frames) {
      if (answered && frames >= framesSent) unsaved = false;
    },
    unsaved: () => unsaved,
  };
}
