/** Reading people and who takes part in a notebook. */
import type { Invitation, NotebookPeople, Person } from "#contract/api.ts";
import type { Role } from "#contract/roles.ts";
import { firstRow, rows, type Queryable } from "./database.ts";

export interface KnownPerson extends Person {
  readonly email: string | null;
  readonly emailVerified: boolean;
}

export async function findPerson(database: Queryable, personId: string): Promise<KnownPerson | null> {
  const row = await firstRow<KnownPerson>(
    database,
    `select id, login, name, email, email_verified as "emailVerified" from people where id = ?`,
    [personId],
  );
  return row ?? null;
}

export async function peopleOfNotebook(
  database: Queryable,
  notebookId: string,
): Promise<NotebookPeople["people"]> {
  const found = await rows<Person & { role: Role; since: Date }>(
    database,
    `select p.id, p.login, p.name, m.role, m.since
       from notebook_people m join people p on p.id = m.person_id
      where m.notebook_id = ?
      order by m.since, p.login`,
    [notebookId],
  );
  return found.map((person) => ({ ...person, since: person.since.toISOString() }));
}

export interface InvitationRow {
  readonly id: string;
  readonly to: string;
  readonly role: Role;
  readonly invited_at: Date;
}
export function presentInvitation(row: InvitationRow): Invitation {
  return { id: row.id, to: row.to, role: row.role, invitedAt: row.invited_at.toISOString() };
}

export async function invitationsOfNotebook(
  database: Queryable,
  notebookId: string,
): Promise<readonly Invitation[]> {
  const found = await rows<InvitationRow>(
    database,
    `select id, coalesce(login, email) as "to", role, invited_at
       from invitations where notebook_id = ? order by invited_at, id`,
    [notebookId],
  );
  return found.map(presentInvitation);
}
