/** Documents in PostgreSQL: an append-only log of updates per notebook, and a compacted state beside it. */
import { randomUUID } from "node:crypto";
import pg from "pg";
import type { Logger } from "pino";
import { roleMay, roles } from "#contract/roles.ts";
import { firstRow, rows, type Database, type Queryable } from "../data/database.ts";
import type { BadRow, StoredUpdate } from "./build-document.ts";

export interface StoredDocument {
  readonly state: Uint8Array | null;
  /** Good rows after the state, in order. */
  readonly tail: readonly StoredUpdate[];
  readonly lastSeq: number;
  readonly schemaVersion: number;
}
export interface NewUpdate {
  readonly update: Uint8Array;
  readonly personId: string;
}
export interface AppendRequest {
  readonly notebookId: string;
  /** The last row this process knows; nothing is stored when there are others. */
  readonly after: number;
  /** Stores all the same when another process has added rows meanwhile; they then lie before these. */
  readonly evenIfBehind?: boolean;
  readonly updates: readonly NewUpdate[];
  /** Schema versions of the editors that wrote them. */
  readonly schema: { readonly lowest: number; readonly highest: number };
}
/** All updates are stored, or none and at least one of the reasons holds. */
export interface AppendOutcome {
  readonly stored: boolean;
  /** Another process holds the notebook too, and was told. */
  readonly announced: boolean;
  readonly lastSeq: number;
  readonly schemaVersion: number;
  readonly archived: boolean;
  readonly deleted: boolean;
  /** People among the writers who may not write (any more). */
  readonly denied: readonly string[];
}

export interface Newest {
  readonly lastSeq: number;
  readonly schemaVersion: number;
}

export interface DocumentStore {
  /** Names this process in what it announces. */
  readonly processId: string;
  /** Null when there is no such notebook (or it was deleted). */
  load(notebookId: string): Promise<StoredDocument | null>;
  /** Null when there is no such notebook. Committed durably when it resolves with `stored`. */
  append(request: AppendRequest): Promise<AppendOutcome | null>;
  /** Null when there is no such notebook (or it was deleted). */
  newest(notebookId: string): Promise<Newest | null>;
  readAfter(notebookId: string, seq: number): Promise<readonly StoredUpdate[]>;
  /** False when a newer state is there already. */
  saveState(notebookId: string, seq: number, state: Uint8Array): Promise<boolean>;
  quarantine(notebookId: string, bad: readonly BadRow[]): Promise<void>;
  stop(): Promise<void>;
}

const WRITING_CONNECTIONS = 8;

const writingRoles = roles.filter((role) => roleMay(role, "notebook.write"));

/**
 * One statement, one round trip, one commit. The row lock on the notebook orders the writers of all processes, so a
 * seq is never visible before a lower one; a serial number would not promise that. Prepared once per connection:
 * planning it would cost more than running it.
 *
 * $1 notebook, $2 writers, $3 roles that write, $4 last known seq, $5 lowest and $6 highest schema, $7 updates, $8 whether also
 * after rows of others, $9 this process
 */
const appendStatement = {
  name: "append-updates",
  text: `
    with notebook as materialized (
      select id, last_seq, schema_version, archived_at is not null as archived, deleted_at is not null as deleted
        from notebooks where id = $1 for update
    ), denied as (
      select distinct writer from unnest($2::uuid[]) as writer
       where not exists (select 1 from notebook_people p
         where p.notebook_id = $1 and p.person_id = writer and p.role = any($3::text[]))
    ), fit as (
      select id, last_seq from notebook
       where not archived and not deleted and (last_seq = $4 or $8) and schema_version <= $5
         and not exists (select 1 from denied)
    ), inserted as (
      insert into document_updates (notebook_id, seq, update, person_id)
      select fit.id, fit.last_seq + line.number, line.update, line.writer
        from fit, unnest($7::bytea[], $2::uuid[]) with ordinality as line (update, writer, number)
    ), raised as (
      update notebooks n
         set last_seq = fit.last_seq + cardinality($7::bytea[]), schema_version = greatest(n.schema_version, $6)
        from fit where n.id = fit.id
    )
    select last_seq::text, schema_version, archived, deleted, exists (select 1 from fit) as stored,
           coalesce((select announce_rows(fit.id, $9, fit.last_seq + cardinality($7::bytea[])) from fit), false)
             as announced,
           coalesce((select array_agg(writer::text) from denied), '{}') as denied
      from notebook`,
};
interface AppendRow {
  readonly last_seq: string;
  readonly schema_version: number;
  readonly archived: boolean;
  readonly deleted: boolean;
  readonly stored: boolean;
  readonly announced: boolean;
  readonly denied: readonly string[];
}

interface UpdateRow {
  readonly seq: string;
  readonly update: Buffer;
  readonly person_id: string | null;
}
const asStoredUpdate = (row: UpdateRow): StoredUpdate => ({
  seq: Number(row.seq),
  update: row.update,
  personId: row.person_id,
});

async function tailAfter(database: Queryable, notebookId: string, seq: number): Promise<StoredUpdate[]> {
  const found = await rows<UpdateRow>(
    database,
    // "order by seq" alone would mean the text in the select list, and put 10 before 9.
    `select u.seq::text, u.update, u.person_id from document_updates u
      where u.notebook_id = ? and u.seq > ? and u.quarantined_at is null order by u.seq`,
    [notebookId, seq],
  );
  return found.map(asStoredUpdate);
}

/** What is stored of a document; null when there is no such notebook (or it was deleted). */
export function loadStored(database: Database, notebookId: string): Promise<StoredDocument | null> {
  // One snapshot: a compaction between two reads would otherwise leave a gap.
  return database.transaction(
    async (transaction) => {
      const notebook = await firstRow<{
        last_seq: string;
        schema_version: number;
        seq: string | null;
        state: Buffer | null;
      }>(
        transaction,
        `select n.last_seq::text, n.schema_version, s.seq::text, s.state
               from notebooks n left join document_states s on s.notebook_id = n.id
              where n.id = ? and n.deleted_at is null`,
        [notebookId],
      );
      if (notebook === undefined) return null;
      return {
        state: notebook.state,
        tail: await tailAfter(transaction, notebookId, Number(notebook.seq ?? 0)),
        lastSeq: Number(notebook.last_seq),
        schemaVersion: notebook.schema_version,
      };
    },
    { isolationLevel: "repeatable read", readOnly: true },
  );
}

export interface DocumentStoreOptions {
  readonly database: Database;
  readonly databaseUrl: string;
  readonly log: Logger;
}

/** Writing has connections of its own, so that no slow query of a page delays what people type. */
export function openDocumentStore({ database, databaseUrl, log }: DocumentStoreOptions): DocumentStore {
  const pool = new pg.Pool({
    connectionString: databaseUrl,
    application_name: "subleading documents",
    max: WRITING_CONNECTIONS,
    connectionTimeoutMillis: 5_000,
    statement_timeout: 15_000,
    // A dead network path answers nothing at all.
    query_timeout: 20_000,
  });
  // Without a listener, a broken idle connection would end the process.
  pool.on("error", (error) => log.warn({ err: error }, "an idle connection for documents was lost"));
  const processId = randomUUID();
  return {
    processId,
    stop: () => pool.end(),

    load: (notebookId) => loadStored(database, notebookId),

    async append({ notebookId, after, evenIfBehind = false, updates, schema }) {
      const writers = updates.map(({ personId }) => personId);
      const bytes = updates.map(({ update }) => asBuffer(update));
      const values = [
        ...[notebookId, writers, writingRoles, after, schema.lowest, schema.highest, bytes],
        ...[evenIfBehind, processId],
      ];
      const [row] = (await pool.query<AppendRow>({ ...appendStatement, values })).rows;
      if (row === undefined) return null;
      const { stored, announced, archived, deleted, denied } = row;
      return {
        stored,
        announced,
        lastSeq: Number(row.last_seq) + (stored ? updates.length : 0),
        schemaVersion: stored ? Math.max(row.schema_version, schema.highest) : row.schema_version,
        archived,
        deleted,
        denied,
      };
    },

    async newest(notebookId) {
      const row = await firstRow<{ last_seq: string; schema_version: number }>(
        database,
        "select last_seq::text, schema_version from notebooks where id = ? and deleted_at is null",
        [notebookId],
      );
      return row === undefined ? null : { lastSeq: Number(row.last_seq), schemaVersion: row.schema_version };
    },

    readAfter: (notebookId, seq) => tailAfter(database, notebookId, seq),

    saveState: (notebookId, seq, state) =>
      database.transaction(async (transaction) => {
        await transaction.raw("select 1 from notebooks where id = ? for update", [notebookId]);
        const saved = await rows(
          transaction,
          `insert into document_states (notebook_id, seq, state) values (?, ?, ?)
           on conflict (notebook_id) do update
             set seq = excluded.seq, state = excluded.state, compacted_at = now()
             where document_states.seq < excluded.seq
           returning 1`,
          [notebookId, seq, asBuffer(state)],
        );
        return saved.length > 0;
      }),

    quarantine: (notebookId, bad) =>
      database.transaction(async (transaction) => {
        await transaction.raw(
          `update document_updates set quarantined_at = now()
            where notebook_id = ? and seq = any(?) and quarantined_at is null`,
          [notebookId, bad.map(({ seq }) => seq)],
        );
        await transaction.raw(
          `insert into events (notebook_id, what, details) values (?, 'document.row-quarantined', ?::jsonb)`,
          [notebookId, JSON.stringify({ rows: bad })],
        );
      }),
  };
}

function asBuffer(bytes: Uint8Array): Buffer {
  return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}
