/** A stage whose store waits or fails when it is told to. */
import { afterEach } from "vitest";
import { pino } from "pino";
import * as Y from "yjs";
import { openDocumentStore } from "../../../server/collab/document-store.ts";
import { makeSlow, type Door, type SlowStore } from "./slow-store.ts";
import { setStage, type Stage } from "./stage.ts";
import { textOf } from "./writer.ts";

const doors: readonly Door[] = ["load", "append", "readAfter", "saveState", "quarantine"];

export interface SlowStage {
  readonly stage: Stage;
  /** The server's store; its doors are open again after each test. */
  store(): SlowStore;
  /** The text that the stored rows make. */
  stored(notebookId: string): Promise<string>;
  roomOf(notebookId: string): ReturnType<Stage["server"]["collab"]["rooms"]["find"]>;
}

/** What a lost network looks like to those who query. */
export const connectionLost = Object.assign(new Error("the connection was lost"), { code: "ECONNRESET" });

export function setSlowStage(): SlowStage {
  let slow: SlowStore | undefined;
  const store = () => {
    if (slow === undefined) throw new Error("the server has not been started yet");
    return slow;
  };
  const stage = setStage({
    retry: { firstMs: 10, longestMs: 40 },
    with: (database, databaseUrl) => {
      slow = makeSlow(openDocumentStore({ database, databaseUrl, log: pino({ level: "silent" }) }));
      return { store: slow };
    },
  });
  afterEach(() => {
    for (const door of doors) {
      store().fail(door, null);
      store().open(door);
    }
  });
  return {
    stage,
    store,
    async stored(notebookId) {
      const document = new Y.Doc();
      for (const { update } of await stage.store.readAfter(notebookId, 0)) Y.applyUpdate(document, update);
      return textOf(document);
    },
    roomOf: (notebookId) => stage.server.collab.rooms.find(notebookId),
  };
}
