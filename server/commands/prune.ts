/** What nobody needs any more: rows long since folded into a state, and results and files that nothing names. */
import { rows, type Database } from "../data/database.ts";

/** Another process, or a backup's reader, may be that far behind and no further. */
const FOLDED_ROWS_KEPT_DAYS = 90;
const RESULTS_KEPT_DAYS = 90;
/** A block that was deleted may come back by undo, or with a page that was offline. */
const UNNAMED_ATTACHMENTS_KEPT_DAYS = 30;
/** In one statement, so that no lock is held for long. */
const AT_ONCE = 5_000;

export interface Pruned {
  readonly rows: number;
  readonly results: number;
  readonly attachments: number;
}

/** Rows that did not apply are kept: someone may still want to look at them. */
async function pruneFoldedRows(database: Database): Promise<number> {
  const gone = await rows(
    database,
    `delete from document_updates u
      where (u.notebook_id, u.seq) in (
        select old.notebook_id, old.seq from document_updates old
          join document_states s on s.notebook_id = old.notebook_id and old.seq <= s.seq
         where old.quarantined_at is null and old.committed_at < now() - make_interval(days => ?)
         limit ?)
     returning 1`,
    [FOLDED_ROWS_KEPT_DAYS, AT_ONCE],
  );
  return gone.length;
}

interface Candidate {
  readonly key: string;
}

/**
 * A pin names the result it was taken from by its key, inside of the shared document. Keys are looked for in the stored
 * bytes, where the values of attributes stand as they are; whatever looks like one counts.
 */
async function pruneResults(database: Database): Promise<number> {
  const candidates = await rows<Candidate>(
    database,
    `select r.key from results r
      where r.created_at < now() - make_interval(days => ?)
        and not exists (select 1 from notebook_results n where n.key = r.key)
      order by r.created_at limit ?`,
    [RESULTS_KEPT_DAYS, AT_ONCE],
  );
  if (candidates.length === 0) return 0;
  const unnamed = new Set(candidates.map(({ key }) => key));
  for await (const { bytes } of storedBytes(database))
    for (const [key] of bytes.toString("latin1").matchAll(/[0-9a-f]{64}/g)) unnamed.delete(key);
  const gone = await rows(
    database,
    `delete from results r where r.key = any(?::text[])
        and not exists (select 1 from notebook_results n where n.key = r.key)
     returning 1`,
    [[...unnamed]],
  );
  return gone.length;
}

/** Of one notebook after the other, all of them unless some are named: its state, and the rows after that. */
async function* storedBytes(
  database: Database,
  only: string[] | null = null,
): AsyncGenerator<{ readonly notebookId: string; readonly bytes: Buffer }> {
  const notebooks = await rows<{ id: string }>(
    database,
    "select id from notebooks where ?::uuid[] is null or id = any(?::uuid[]) order by id",
    [only, only],
  );
  for (const { id } of notebooks) {
    const parts = await rows<{ bytes: Buffer }>(
      database,
      `select s.state as bytes from document_states s where s.notebook_id = ?
       union all
       select u.update from document_updates u
        where u.notebook_id = ?
          and u.seq > coalesce((select s.seq from document_states s where s.notebook_id = u.notebook_id), 0)`,
      [id, id],
    );
    for (const { bytes } of parts) yield { notebookId: id, bytes };
  }
}

/** A Data block names its original by its id; one whose id stands nowhere in the document of its notebook may go. */
async function pruneAttachments(database: Database): Promise<number> {
  const candidates = await rows<{ id: string; notebook_id: string }>(
    database,
    `select a.id, a.notebook_id from attachments a
      where a.created_at < now() - make_interval(days => ?)
      order by a.created_at limit ?`,
    [UNNAMED_ATTACHMENTS_KEPT_DAYS, AT_ONCE],
  );
  if (candidates.length === 0) return 0;
  const unnamed = new Set(candidates.map(({ id, notebook_id }) => `${notebook_id} ${id}`));
  const notebooks = [...new Set(candidates.map(({ notebook_id }) => notebook_id))];
  for await (const { notebookId, bytes } of storedBytes(database, notebooks))
    for (const [id] of bytes.toString("latin1").matchAll(/[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}/g))
      unnamed.delete(`${notebookId} ${id}`);
  const gone = await rows(
    database,
    `delete from attachments a
      where a.notebook_id || ' ' || a.id = any(?::text[])
        and a.created_at < now() - make_interval(days => ?)
     returning 1`,
    [[...unnamed], UNNAMED_ATTACHMENTS_KEPT_DAYS],
  );
  return gone.length;
}

export async function prune(database: Database): Promise<Pruned> {
  return {
    rows: await pruneFoldedRows(database),
    results: await pruneResults(database),
    attachments: await pruneAttachments(database),
  };
}
