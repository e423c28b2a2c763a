/** Folds the log of a notebook into one state from time to time, so that opening it stays quick. */
import type { Logger } from "pino";
import * as Y from "yjs";
import { buildDocument, type BadRow, type StoredUpdate } from "./build-document.ts";
import type { DocumentStore } from "./document-store.ts";
import type { OpenRoom, RoomObserver } from "./room-state.ts";

export interface Compacted {
  readonly state: Uint8Array;
  readonly bad: readonly BadRow[];
}
export type Compact = (parts: {
  readonly state: Uint8Array | null;
  readonly rows: readonly StoredUpdate[];
}) => Promise<Compacted>;

/** While a notebook is open. */
const ROWS_WHILE_OPEN = 500;
/** When it closes. */
const ROWS_AT_CLOSE = 20;
const REST_AFTER_FAILURE_MS = 30_000;

/** In this thread; the server hands in one that uses another. */
export const compactHere: Compact = ({ state, rows }) => {
  const { document, bad } = buildDocument(state, rows);
  const compacted = { state: Y.encodeStateAsUpdate(document), bad };
  document.destroy();
  return Promise.resolve(compacted);
};

/**
 * State and rows are read in one snapshot and folded elsewhere; only the writing takes the lock of the notebook's
 * writers. Rows stay: the log is append-only, and a state is never replaced by an older one.
 */
export async function compactNotebook(
  notebookId: string,
  { store, compact, log }: CompactionOptions,
): Promise<number> {
  const stored = await store.load(notebookId);
  if (stored === null || stored.tail.length === 0) return 0;
  const { state, bad } = await compact({ state: stored.state, rows: stored.tail });
  if (bad.length > 0) {
    log.error({ notebookId, rows: bad }, "stored rows do not apply and were set aside");
    await store.quarantine(notebookId, bad);
  }
  await store.saveState(notebookId, stored.lastSeq, state);
  return stored.tail.length;
}

export interface CompactionOptions {
  readonly store: DocumentStore;
  readonly compact: Compact;
  readonly log: Logger;
}

export function createCompaction(options: CompactionOptions): RoomObserver {
  const running = new Map<OpenRoom, Promise<void>>();
  const resting = new Map<OpenRoom, number>();
  const start = (room: OpenRoom): Promise<void> => {
    const due = room.content.rowsSinceState;
    const work = compactNotebook(room.notebookId, options)
      .then(() => {
        room.content.rowsSinceState = Math.max(0, room.content.rowsSinceState - due);
      })
      .catch((error: unknown) => {
        // Nothing is lost by it: the log is whole, and a later change tries again.
        options.log.error({ err: error, notebookId: room.notebookId }, "a notebook could not be compacted");
        resting.set(room, Date.now() + REST_AFTER_FAILURE_MS);
      })
      .finally(() => running.delete(room));
    running.set(room, work);
    return work;
  };
  return {
    committed(room) {
      if (room.content.rowsSinceState < ROWS_WHILE_OPEN || running.has(room)) return;
      if (Date.now() >= (resting.get(room) ?? 0)) void start(room);
    },
    async draining(room) {
      await running.get(room);
      if (room.content.rowsSinceState >= ROWS_AT_CLOSE) await start(room);
    },
    ended: (room) => void resting.delete(room),
  };
}
