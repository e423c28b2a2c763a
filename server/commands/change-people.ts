/** Gives and takes roles, so that a notebook never loses its last owner, also when two act at once. */
import type { Knex } from "knex";
import { roleMay, type Role } from "#contract/roles.ts";
import { rows, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { announceAccessChange } from "../policies/access-changes.ts";
import { refuse, succeed, type Outcome, type Refusal } from "./outcome.ts";

interface Subject {
  readonly notebookId: string;
  /** Who acts. */
  readonly actorId: string;
  /** Who is acted upon. */
  readonly personId: string;
}

interface Roles {
  readonly actorRole: Role;
  readonly personRole: Role;
  readonly isLastOwner: boolean;
}

/**
 * Locks the roles of owners, actor and person, always in the same order, and reads them as they are after whoever
 * held the lock has committed. Two owners who step down at once therefore do so one after the other.
 */
async function lockRoles(transaction: Knex.Transaction, subject: Subject): Promise<Outcome<Roles>> {
  const { notebookId, actorId, personId } = subject;
  await transaction.raw(
    `select 1 from notebook_people where notebook_id = ? and (role = 'owner' or person_id in (?, ?))
      order by person_id for update`,
    [notebookId, actorId, personId],
  );
  const found = await rows<{ person_id: string; role: Role }>(
    transaction,
    `select person_id, role from notebook_people where notebook_id = ? and (role = 'owner' or person_id in (?, ?))`,
    [notebookId, actorId, personId],
  );
  const actorRole = found.find(({ person_id }) => person_id === actorId)?.role;
  const personRole = found.find(({ person_id }) => person_id === personId)?.role;
  if (actorRole === undefined) return refuse("not-found");
  if (personRole === undefined) return refuse("not-found", "This person does not take part in the notebook.");
  const owners = found.filter(({ role }) => role === "owner").length;
  return succeed({ actorRole, personRole, isLastOwner: personRole === "owner" && owners === 1 });
}

async function announce(transaction: Knex.Transaction, { notebookId, personId }: Subject): Promise<void> {
  await announceAccessChange(transaction, { about: "person", notebookId, personId });
  await announceAccessChange(transaction, { about: "notebook", notebookId });
}

function lastOwner(subject: Subject, doing: "remove" | "demote"): Refusal {
  if (subject.actorId === subject.personId)
    return refuse("last-owner", "You are the only owner. Make someone else owner first.");
  const words = doing === "remove" ? "be removed" : "get another role";
  return refuse("last-owner", `This is the only owner and cannot ${words}. Make someone else owner first.`);
}

export function changeRole(database: Database, subject: Subject, role: Role): Promise<Outcome<null>> {
  const { notebookId, actorId, personId } = subject;
  return database.transaction(async (transaction) => {
    const roles = await lockRoles(transaction, subject);
    if (!roles.ok) return roles;
    const { actorRole, personRole, isLastOwner } = roles.value;
    if (!roleMay(actorRole, "people.manage")) return refuse("forbidden");
    if (personRole === role) return succeed(null);
    if (isLastOwner) return lastOwner(subject, "demote");
    await transaction("notebook_people")
      .where({ notebook_id: notebookId, person_id: personId })
      .update({ role });
    const details = { person: personId, from: personRole, to: role };
    await recordEvent(transaction, { personId: actorId, notebookId, what: "role-changed", details });
    await announce(transaction, subject);
    return succeed(null);
  });
}

/** Removing someone, or leaving oneself. */
export function removePerson(database: Database, subject: Subject): Promise<Outcome<null>> {
  const { notebookId, actorId, personId } = subject;
  const isLeaving = actorId === personId;
  return database.transaction(async (transaction) => {
    const roles = await lockRoles(transaction, subject);
    if (!roles.ok) return roles;
    const { actorRole, personRole, isLastOwner } = roles.value;
    const may = roleMay(actorRole, "people.manage") || (isLeaving && roleMay(actorRole, "people.leave"));
    if (!may) return refuse("forbidden");
    if (isLastOwner) return lastOwner(subject, "remove");
    await transaction("notebook_people").where({ notebook_id: notebookId, person_id: personId }).delete();
    const what = isLeaving ? "person-left" : "person-removed";
    await recordEvent(transaction, {
      personId: actorId,
      notebookId,
      what,
      details: { person: personId, role: personRole },
    });
    await announce(transaction, subject);
    return succeed(null);
  });
}
