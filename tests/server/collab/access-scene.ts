/** Ways to change who may do what, announced as the server's commands do, and to look at what came of it. */
import * as Y from "yjs";
import { firstRow } from "../../../server/data/database.ts";
import { announceAccessChange, type AnnouncedChange } from "../../../server/policies/access-changes.ts";
import type { CastPerson } from "./cast.ts";
import type { RawSocket } from "./raw-socket.ts";
import type { Stage } from "./stage.ts";
import { until } from "./until.ts";
import { paragraphOf } from "./writer.ts";

export const WITHIN_A_SECOND = 1_000;

export function accessScene(stage: Stage) {
  const change = (sql: string, bindings: string[], announced: AnnouncedChange): Promise<void> =>
    stage.server.database.transaction(async (transaction) => {
      await transaction.raw(sql, bindings);
      await announceAccessChange(transaction, announced);
    });
  return {
    change,
    setRole: (notebookId: string, person: CastPerson, role: string) =>
      change(
        "update notebook_people set role = ? where notebook_id = ? and person_id = ?",
        [role, notebookId, person.id],
        { about: "person", notebookId, personId: person.id },
      ),
    remove: (notebookId: string, person: CastPerson) =>
      change("delete from notebook_people where notebook_id = ? and person_id = ?", [notebookId, person.id], {
        about: "person",
        notebookId,
        personId: person.id,
      }),
    /** How many updates are stored, of everyone or of one person. */
    async storedRows(notebookId: string, by?: CastPerson): Promise<number> {
      const row = await firstRow<{ count: string }>(
        stage.server.database,
        `select count(*) from document_updates
          where notebook_id = ? and person_id is not distinct from coalesce(?, person_id)`,
        [notebookId, by?.id ?? null],
      );
      return Number(row!.count);
    },
  };
}

/** One paragraph with this text, by a client of its own. */
export function typed(text: string): Uint8Array {
  const document = new Y.Doc();
  paragraphOf(document).insert(0, text);
  return Y.encodeStateAsUpdate(document);
}

export async function closedWithin(socket: RawSocket, patienceMs: number): Promise<number> {
  await until("the socket is closed", () => socket.closed() !== null, patienceMs);
  return socket.closed()!.code;
}
