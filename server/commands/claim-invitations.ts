/** Invitations that waited for someone: claimed when they sign in, by account name or verified address. */
import type { Role } from "#contract/roles.ts";
import { rows, type Queryable } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { announceAccessChange } from "../policies/access-changes.ts";

interface Claimant {
  readonly id: string;
  readonly login: string;
  readonly email: string | null;
  readonly emailVerified: boolean;
}

/**
 * Runs inside the transaction of signing in. Who takes part already keeps their role; of two invitations to
 * one notebook the one with more rights counts.
 */
export async function claimInvitations(transaction: Queryable, person: Claimant): Promise<void> {
  const verifiedEmail = person.emailVerified ? person.email : null;
  const joined = await rows<{ notebook_id: string; role: Role }>(
    transaction,
    `with claimed as (
       delete from invitations i using notebooks n
        where n.id = i.notebook_id and n.deleted_at is null
          and (lower(i.login) = lower(?) or lower(i.email) = lower(?::text))
        returning i.notebook_id, i.role
     ), best as (
       select distinct on (notebook_id) notebook_id, role from claimed
        order by notebook_id, array_position(array['owner', 'author', 'reviewer', 'reader'], role)
     )
     insert into notebook_people (notebook_id, person_id, role)
     select notebook_id, ?, role from best
     on conflict do nothing
     returning notebook_id, role`,
    [person.login, verifiedEmail, person.id],
  );
  for (const { notebook_id: notebookId, role } of joined) {
    await recordEvent(transaction, {
      personId: person.id,
      notebookId,
      what: "invitation-claimed",
      details: { role },
    });
    await announceAccessChange(transaction, { about: "person", notebookId, personId: person.id });
    await announceAccessChange(transaction, { about: "notebook", notebookId });
  }
}
