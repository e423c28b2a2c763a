/** What passes between the writer of a room and the room. */
import type { Connection } from "./connection.ts";

export interface QueuedUpdate {
  readonly connection: Connection;
  readonly frame: number;
  readonly personId: string;
  readonly update: Uint8Array;
  /** False when there is nothing new in it: it is acknowledged in its turn and not stored. */
  carries: boolean;
}

/** What the writer has to say; the room acts on it. */
export interface WriterReports {
  committed(batch: readonly QueuedUpdate[]): void;
  /** This update will never be stored. */
  refused(update: QueuedUpdate, reason: string): void;
  malformed(connection: Connection, reason: string): void;
  /** These people may not write, or nobody may. */
  lostRight(personIds: readonly string[] | "everyone"): void;
  schemaRaised(): void;
  storeUnreachable(): void;
  storeBack(): void;
  notebookGone(): void;
  /** The room cannot go on and must be loaded afresh; nothing that was acknowledged is lost by that. */
  broken(error: unknown): void;
}
