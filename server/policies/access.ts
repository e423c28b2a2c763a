/** Who may do what in a notebook, read fresh from the database whenever it is asked. */
import { roleMay, type Action, type Role } from "#contract/roles.ts";
import { firstRow, type Queryable } from "../data/database.ts";

export interface NotebookAccess {
  readonly notebookId: string;
  readonly role: Role;
  readonly archived: boolean;
  readonly schemaVersion: number;
}

/** Null for strangers and for notebooks that do not exist or were deleted: from outside these look alike. */
export async function accessTo(
  database: Queryable,
  personId: string,
  notebookId: string,
): Promise<NotebookAccess | null> {
  const row = await firstRow<{ role: Role; archived: boolean; schema_version: number }>(
    database,
    `select p.role, n.archived_at is not null as archived, n.schema_version
       from notebook_people p join notebooks n on n.id = p.notebook_id
      where p.person_id = ? and p.notebook_id = ? and n.deleted_at is null`,
    [personId, notebookId],
  );
  if (row === undefined) return null;
  return { notebookId, role: row.role, archived: row.archived, schemaVersion: row.schema_version };
}

/** A person's name with their access, in one round trip; undefined when there is no such person (any more). */
export async function personWithAccess(
  database: Queryable,
  personId: string,
  notebookId: string,
): Promise<{ readonly name: string; readonly access: NotebookAccess | null } | undefined> {
  const row = await firstRow<{
    name: string;
    role: Role | null;
    archived: boolean;
    schema_version: number;
  }>(
    database,
    `select people.name, member.role, member.archived, member.schema_version
       from people left join lateral (
         select p.role, n.archived_at is not null as archived, n.schema_version
           from notebook_people p join notebooks n on n.id = p.notebook_id
          where p.person_id = people.id and p.notebook_id = ? and n.deleted_at is null) member on true
      where people.id = ?`,
    [notebookId, personId],
  );
  if (row === undefined) return undefined;
  const { name, role, archived, schema_version: schemaVersion } = row;
  return { name, access: role === null ? null : { notebookId, role, archived, schemaVersion } };
}

export async function roleOf(
  database: Queryable,
  personId: string,
  notebookId: string,
): Promise<Role | null> {
  return (await accessTo(database, personId, notebookId))?.role ?? null;
}

/** The role's rights, less writing while the notebook is archived. */
export function mayNow(access: NotebookAccess, action: Action): boolean {
  if (access.archived && (action === "notebook.write" || action === "notebook.rename")) return false;
  return roleMay(access.role, action);
}
