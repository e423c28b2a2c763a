/** Files that were read into a notebook, kept as they came. */
import { createHash } from "node:crypto";
import { LARGEST_ATTACHMENT_BYTES } from "#contract/attachment-type.ts";
import type { Attachment } from "#contract/attachments.ts";
import { firstRow, type Database, type Queryable } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { mayNow, type NotebookAccess } from "../policies/access.ts";
import { resolveReferee } from "../policies/referee.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

/** Ten of the largest, or a great many ordinary ones. */
export const MOST_BYTES_OF_A_NOTEBOOK = 100_000_000;

export interface StoredFile {
  readonly name: string;
  readonly mediaType: string;
  readonly bytes: Buffer;
}
interface NewAttachment {
  readonly personId: string;
  readonly name: string;
  readonly bytes: Buffer;
}

/** A file that is there already under this name is given back, and counts as new. */
export async function keepAttachment(
  database: Database,
  access: NotebookAccess,
  { personId, name, bytes }: NewAttachment,
): Promise<Outcome<Attachment>> {
  if (!mayNow(access, "notebook.write")) return refuse(access.archived ? "archived" : "forbidden");
  if (bytes.length === 0) return refuse("invalid", "The file is empty.");
  if (bytes.length > LARGEST_ATTACHMENT_BYTES) return refuse("too-large", "A file may have at most 10 MB.");
  if (!isText(bytes)) return refuse("invalid", "Only tables as text in UTF-8 are kept.");
  const { notebookId } = access;
  const sha256 = createHash("sha256").update(bytes).digest();
  return database.transaction(async (transaction) => {
    // Two at once must not both find room. A lock of its own: nobody who types waits for a file.
    await transaction.raw("select pg_advisory_xact_lock(hashtextextended(?, 0))", [
      `attachments ${notebookId}`,
    ]);
    const room = await firstRow<{ used: string }>(
      transaction,
      `select coalesce(sum(size), 0) as used from attachments
        where notebook_id = ? and not (sha256 = ? and name = ?)`,
      [notebookId, sha256, name],
    );
    if (Number(room?.used ?? 0) + bytes.length > MOST_BYTES_OF_A_NOTEBOOK)
      return refuse("too-large", "The files of this notebook have reached their limit of 100 MB together.");
    const row = await firstRow<{ id: string; is_new: boolean }>(
      transaction,
      `insert into attachments (notebook_id, sha256, name, media_type, bytes, size, uploaded_by)
       values (?, ?, ?, ?, ?, ?, ?)
       on conflict (notebook_id, sha256, name) do update set created_at = now()
       returning id, (xmax = 0) as is_new`,
      [notebookId, sha256, name, mediaTypeOf(name), bytes, bytes.length, personId],
    );
    if (row === undefined) throw new Error("an insert that updates on conflict returns its row");
    if (row.is_new)
      await recordEvent(transaction, {
        personId,
        notebookId,
        what: "attachment-kept",
        details: { attachment: row.id, name, size: bytes.length },
      });
    return succeed({ id: row.id, name, size: bytes.length });
  });
}

export async function fetchAttachment(
  database: Queryable,
  notebookId: string,
  id: string,
): Promise<Outcome<StoredFile>> {
  const row = await firstRow<StoredFile>(
    database,
    `select name, media_type as "mediaType", bytes from attachments where notebook_id = ? and id = ?`,
    [notebookId, id],
  );
  return row === undefined
    ? refuse("not-found", "This notebook does not keep that file.")
    : succeed({ name: row.name, mediaType: row.mediaType, bytes: row.bytes });
}

/** For whoever holds a referee's link, of the notebook behind it and of no other. */
export async function fetchAttachmentAsReferee(
  database: Database,
  token: string,
  id: string,
): Promise<Outcome<StoredFile>> {
  const referee = await resolveReferee(database, token);
  if (referee.state === "unknown") return refuse("not-found");
  if (referee.state !== "open") return refuse("gone");
  return fetchAttachment(database, referee.access.notebookId, id);
}

/** What a browser may take it for. Never a page or a script, whatever the name says. */
function mediaTypeOf(name: string): string {
  if (/\.csv$/i.test(name)) return "text/csv; charset=utf-8";
  return /\.(?:tsv|tab)$/i.test(name)
    ? "text/tab-separated-values; charset=utf-8"
    : "text/plain; charset=utf-8";
}

function isText(bytes: Buffer): boolean {
  if (bytes.includes(0)) return false;
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes);
    return true;
  } catch {
    // The decoder tells by throwing.
    return false;
  }
}
