/** Deleted notebooks can be brought back for 30 days; then they go for good. */
import { firstRow, rows, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { announceAccessChange } from "../policies/access-changes.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

export const KEPT_DAYS = 30;

/** Only its owner can: for everyone else there is no such notebook. */
export function restoreNotebook(
  database: Database,
  personId: string,
  notebookId: string,
): Promise<Outcome<null>> {
  return database.transaction(async (transaction) => {
    const restored = await firstRow(
      transaction,
      `update notebooks n set deleted_at = null
         from notebook_people p
        where n.id = ? and p.notebook_id = n.id and p.person_id = ? and p.role = 'owner'
          and n.deleted_at > now() - make_interval(days => ?)
       returning 1`,
      [notebookId, personId, KEPT_DAYS],
    );
    if (restored === undefined) return refuse("not-found");
    await recordEvent(transaction, { personId, notebookId, what: "notebook-undeleted" });
    await announceAccessChange(transaction, { about: "notebook", notebookId });
    return succeed(null);
  });
}

/** With everything that belongs to them. The number of notebooks that went. */
export async function removeDeletedForGood(database: Database): Promise<number> {
  const gone = await rows(
    database,
    "delete from notebooks where deleted_at <= now() - make_interval(days => ?) returning 1",
    [KEPT_DAYS],
  );
  return gone.length;
}
