/** Reading notebooks: the shelf in one query however long it is, and one notebook with its people. */
import * as z from "zod";
import type { Notebook, NotebookList, NotebookRow, Person } from "#contract/api.ts";
import type { Role } from "#contract/roles.ts";
import { refuse, succeed, type Outcome } from "../commands/outcome.ts";
import { KEPT_DAYS } from "../commands/deleted-notebooks.ts";
import type { NotebookAccess } from "../policies/access.ts";
import { firstRow, rows, type Queryable } from "./database.ts";

export interface ShelfQuery {
  readonly search: string;
  readonly show: "current" | "archived" | "deleted";
  readonly attention: "any" | "moved";
  readonly sort: "changed" | "title";
  readonly cursor?: string | undefined;
}

const PAGE = 50;

/** What the last row of a page was sorted by, times with the microseconds that a Date would lose. */
const cursorSchema = z.tuple([
  z
    .string()
    .max(300)
    .regex(/^[^\0]*$/),
  z.uuid(),
]);
const cursorTime = z.iso.datetime({ precision: 6 });
type Cursor = z.infer<typeof cursorSchema>;

function writeCursor(cursor: Cursor): string {
  return Buffer.from(JSON.stringify(cursor)).toString("base64url");
}
function readCursor(text: string, sort: ShelfQuery["sort"]): Cursor | null {
  let value: unknown;
  try {
    value = JSON.parse(Buffer.from(text, "base64url").toString("utf8"));
  } catch {
    return null; // Not something we wrote.
  }
  const parsed = cursorSchema.safeParse(value);
  if (!parsed.success) return null;
  if (sort === "changed" && !cursorTime.safeParse(parsed.data[0]).success) return null;
  return parsed.data;
}

/** Searched text stands for itself: % and _ are no wildcards. */
function likePattern(search: string): string {
  return `%${search.trim().replace(/[\\%_]/g, "\\$&")}%`;
}

interface ShelfRow extends Omit<NotebookRow, "lastChangedAt" | "archivedAt" | "deletedAt"> {
  readonly lastChangedAt: Date;
  readonly archivedAt: Date | null;
  readonly deletedAt: Date | null;
  readonly sortedBy: string;
}

/** In each order, ties are settled by the id, so a page begins exactly where the last one ended. */
const orders = {
  changed: {
    sortedBy: `to_char(n.changed_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
    orderBy: "n.changed_at desc, n.id desc",
    after: "(n.changed_at, n.id) < (?::timestamptz, ?::uuid)",
  },
  title: {
    sortedBy: "lower(n.title)",
    orderBy: "lower(n.title), n.id",
    after: "(lower(n.title), n.id) > (?, ?::uuid)",
  },
} as const;

const shown = {
  current: "n.deleted_at is null and n.archived_at is null",
  archived: "n.deleted_at is null and n.archived_at is not null",
  deleted: `m.role = 'owner' and n.deleted_at > now() - make_interval(days => ${KEPT_DAYS})`,
} as const;

/** Some words before what was found, and some after it. */
const excerpt = `case when position(lower(?) in lower(n.search_text)) > 0 then
  substring(n.search_text from greatest(1, position(lower(?) in lower(n.search_text)) - 50) for 140) end`;

const someoneMatches = `exists (
  select 1 from notebook_people o join people p on p.id = o.person_id
   where o.notebook_id = n.id and (p.name ilike ? or p.login ilike ?)
)`;

export async function listNotebooks(
  database: Queryable,
  personId: string,
  query: ShelfQuery,
): Promise<Outcome<NotebookList>> {
  const order = orders[query.sort];
  const cursor = query.cursor === undefined ? undefined : readCursor(query.cursor, query.sort);
  if (cursor === null)
    return refuse("invalid", "This page of the list is not known. Begin again at the first.");
  const pattern = likePattern(query.search);
  const searched = query.search.trim();
  const isSearch = searched !== "";
  const found = await rows<ShelfRow>(
    database,
    `with page as (
       select n.*, m.role
         from notebook_people m join notebooks n on n.id = m.notebook_id
        where m.person_id = ?
          and ${shown[query.show]}
          ${query.attention === "moved" ? "and (n.pins_moved > 0 or n.pins_loose > 0)" : ""}
          ${isSearch ? `and (n.title ilike ? or n.premises_line ilike ? or n.search_text ilike ? or ${someoneMatches})` : ""}
          ${cursor === undefined ? "" : `and ${order.after}`}
        order by ${order.orderBy}
        limit ?
     )
     select n.id, n.title, n.role, n.changed_at as "lastChangedAt", changer.name as "lastChangedBy",
            everyone.names as people, n.premises_line as "premisesLine", n.pins_moved as "pinsMoved",
            n.pins_loose as "pinsLoose", n.archived_at as "archivedAt", n.deleted_at as "deletedAt",
            ${isSearch ? excerpt : "null"} as excerpt, ${order.sortedBy} as "sortedBy"
       from page n
       left join people changer on changer.id = n.changed_by
       cross join lateral (
         select array_agg(p.name order by o.since, p.login) as names
           from notebook_people o join people p on p.id = o.person_id
          where o.notebook_id = n.id
       ) everyone
      order by ${order.orderBy}`,
    [
      personId,
      ...(isSearch ? [pattern, pattern, pattern, pattern, pattern] : []),
      ...(cursor ?? []),
      PAGE + 1,
      ...(isSearch ? [searched, searched] : []),
    ],
  );
  const page = found.slice(0, PAGE);
  const last = page.at(-1);
  return succeed({
    notebooks: page.map(({ sortedBy: _, ...row }) => ({
      ...row,
      lastChangedAt: row.lastChangedAt.toISOString(),
      archivedAt: row.archivedAt?.toISOString() ?? null,
      deletedAt: row.deletedAt?.toISOString() ?? null,
    })),
    nextCursor: found.length > PAGE && last !== undefined ? writeCursor([last.sortedBy, last.id]) : null,
  });
}

/** One notebook as someone with this role sees it; null when it was deleted meanwhile. */
export async function findNotebook(
  database: Queryable,
  { notebookId, role }: Pick<NotebookAccess, "notebookId"> & { readonly role: Role },
): Promise<Notebook | null> {
  const row = await firstRow<{
    title: string;
    schemaVersion: number;
    archivedAt: Date | null;
    people: Person[];
  }>(
    database,
    `select n.title, n.schema_version as "schemaVersion", n.archived_at as "archivedAt",
            coalesce((
              select jsonb_agg(jsonb_build_object('id', p.id, 'login', p.login, 'name', p.name) order by o.since, p.login)
                from notebook_people o join people p on p.id = o.person_id where o.notebook_id = n.id
            ), '[]') as people
       from notebooks n where n.id = ? and n.deleted_at is null`,
    [notebookId],
  );
  if (row === undefined) return null;
  return { id: notebookId, role, ...row, archivedAt: row.archivedAt?.toISOString() ?? null };
}
