/** The states of a room, and what it tells those who watch it. */
import type { ServerNotice } from "#contract/collab.ts";
import type { CommittedDocument } from "./committed-document.ts";

export type RoomState = "loading" | "open" | "draining" | "closed" | "failed";

/** From each state the states that may follow. */
export const ways: Readonly<Record<RoomState, readonly RoomState[]>> = {
  loading: ["open", "failed"],
  open: ["draining", "failed"],
  draining: ["open", "closed", "failed"],
  closed: [],
  failed: [],
};

export class RoomNotFound extends Error {}
export class RoomFailed extends Error {}

/** What others may see of an open room. */
export interface OpenRoom {
  readonly notebookId: string;
  readonly content: CommittedDocument;
  notify(notice: ServerNotice): void;
}
/** Told of what happens in rooms: evaluation and compaction listen. Must not throw. */
export interface RoomObserver {
  opened?(room: OpenRoom): void;
  committed?(room: OpenRoom): void;
  /** Before a room closes; it waits for this, and turns back if someone comes meanwhile. */
  draining?(room: OpenRoom): Promise<void>;
  /** Also after a failure. */
  ended?(room: OpenRoom): void;
}
