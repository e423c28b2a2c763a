/** Copies a notebook as it stands: text, blocks, results and kept files, under a new owner, with nobody else and no links. */
import { loadStored } from "../collab/document-store.ts";
import type { Compute } from "../compute/open-compute.ts";
import { firstRow, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

interface Duplicating {
  readonly notebookId: string;
  readonly personId: string;
}

/** The copy's id. What was deleted from the text is not copied: the copy begins with a history of its own. */
export async function duplicateNotebook(
  database: Database,
  compact: Compute["compact"],
  { notebookId, personId }: Duplicating,
): Promise<Outcome<string>> {
  const stored = await loadStored(database, notebookId);
  if (stored === null) return refuse("not-found");
  const compacted = await compact({ state: stored.state, rows: stored.tail });
  const state = Buffer.from(compacted.state);
  return database.transaction(async (transaction) => {
    const made = await firstRow<{ id: string }>(
      transaction,
      `insert into notebooks (title, schema_version, premises_line, pins_moved, pins_loose, search_text,
                              created_by, changed_by)
       select left('Copy of ' || title, 300), ?, premises_line, pins_moved, pins_loose, search_text, ?, ?
         from notebooks where id = ? and deleted_at is null
       returning id`,
      [stored.schemaVersion, personId, personId, notebookId],
    );
    if (made === undefined) return refuse("not-found");
    await transaction("notebook_people").insert({ notebook_id: made.id, person_id: personId, role: "owner" });
    await transaction("document_states").insert({ notebook_id: made.id, seq: 0, state });
    await transaction.raw(
      `insert into notebook_results (notebook_id, block_id, key, settled_at, changed_by)
       select ?, block_id, key, settled_at, changed_by from notebook_results where notebook_id = ?`,
      [made.id, notebookId],
    );
    // The copy's document names them by the ids it was copied with.
    await transaction.raw(
      `insert into attachments (notebook_id, id, sha256, name, media_type, bytes, size, uploaded_by, created_at)
       select ?, id, sha256, name, media_type, bytes, size, uploaded_by, now() from attachments
        where notebook_id = ?`,
      [made.id, notebookId],
    );
    await recordEvent(transaction, {
      personId,
      notebookId: made.id,
      what: "notebook-created",
      details: { from: notebookId },
    });
    return succeed(made.id);
  });
}
