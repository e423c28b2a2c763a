/** What a room is made with, and what it is made of. */
import type { Logger } from "pino";
import type { RetryTimes } from "./append-until-answered.ts";
import type { CommittedDocument } from "./committed-document.ts";
import type { DocumentStore } from "./document-store.ts";
import type { Neighbours } from "./neighbours.ts";
import type { OpenRoom, RoomObserver } from "./room-state.ts";
import type { Room } from "./room.ts";
import type { UpdateWriter } from "./update-writer.ts";

export interface RoomOptions {
  readonly notebookId: string;
  readonly store: DocumentStore;
  readonly log: Logger;
  readonly observers: readonly RoomObserver[];
  readonly neighbours: Pick<Neighbours, "hold" | "letGo" | "say">;
  /** How long an empty room is kept for those who reload their page. */
  readonly lingerMs: number;
  readonly retry?: RetryTimes;
}

export interface Lease {
  readonly room: Room;
  release(): void;
}

export interface Content {
  readonly document: CommittedDocument;
  readonly writer: UpdateWriter;
  readonly open: OpenRoom;
}
