/** Renames, archives, restores and deletes a notebook. */
import { firstRow, type Database } from "../data/database.ts";
import { recordEvent, type Happening } from "../data/events.ts";
import { mayNow, type NotebookAccess } from "../policies/access.ts";
import { announceAccessChange } from "../policies/access-changes.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

export interface NotebookChange {
  readonly title?: string | undefined;
  readonly archived?: boolean | undefined;
}

/** Each part of the change needs a right of its own; restoring comes first, so one request may restore and rename. */
function refusalOf(access: NotebookAccess, change: NotebookChange) {
  if (change.archived !== undefined && !mayNow(access, "notebook.archive")) return refuse("forbidden");
  if (change.title === undefined) return null;
  const archived = access.archived && change.archived !== false;
  if (mayNow({ ...access, archived }, "notebook.rename")) return null;
  return archived && mayNow({ ...access, archived: false }, "notebook.rename")
    ? refuse("archived")
    : refuse("forbidden");
}

export function changeNotebook(
  database: Database,
  personId: string,
  access: NotebookAccess,
  change: NotebookChange,
): Promise<Outcome<null>> {
  const { notebookId } = access;
  return database.transaction(async (transaction) => {
    const refusal = refusalOf(access, change);
    if (refusal !== null) return refusal;
    const before = await firstRow<{ title: string; archived: boolean }>(
      transaction,
      `select title, archived_at is not null as archived from notebooks
        where id = ? and deleted_at is null for no key update`,
      [notebookId],
    );
    if (before === undefined) return refuse("not-found");
    const events: Pick<Happening, "what" | "details">[] = [];
    if (change.archived !== undefined && change.archived !== before.archived) {
      const archived_at = change.archived ? transaction.fn.now() : null;
      await transaction("notebooks").where({ id: notebookId }).update({ archived_at });
      events.push({ what: change.archived ? "notebook-archived" : "notebook-restored" });
    }
    if (change.title !== undefined && change.title !== before.title) {
      const { title } = change;
      await transaction("notebooks")
        .where({ id: notebookId })
        .update({ title, changed_at: transaction.fn.now(), changed_by: personId });
      events.push({ what: "notebook-renamed", details: { from: before.title, to: title } });
    }
    for (const event of events) await recordEvent(transaction, { personId, notebookId, ...event });
    if (events.length > 0) await announceAccessChange(transaction, { about: "notebook", notebookId });
    return succeed(null);
  });
}

/** Takes it from every shelf and closes it for everyone; the rows stay, so an operator can bring it back. */
export function deleteNotebook(
  database: Database,
  personId: string,
  notebookId: string,
): Promise<Outcome<null>> {
  return database.transaction(async (transaction) => {
    const count = await transaction("notebooks")
      .where({ id: notebookId, deleted_at: null })
      .update({ deleted_at: transaction.fn.now() });
    if (count === 0) return refuse("not-found");
    await recordEvent(transaction, { personId, notebookId, what: "notebook-deleted" });
    await announceAccessChange(transaction, { about: "notebook", notebookId });
    return succeed(null);
  });
}
