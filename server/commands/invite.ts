/** Invites by account name or e-mail address: whoever is known joins at once, anyone else is waited for. */
import type { Knex } from "knex";
import * as z from "zod";
import type { Invitation, InvitationOutcome, Person } from "#contract/api.ts";
import { invitationWords } from "#contract/invitation-words.ts";
import { roleMay, type Role } from "#contract/roles.ts";
import { firstRow, rows, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { presentInvitation, type InvitationRow, type KnownPerson } from "../data/people.ts";
import { enqueueLetter } from "../mail/queue.ts";
import { roleOf } from "../policies/access.ts";
import { announceAccessChange } from "../policies/access-changes.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

interface Wish {
  readonly notebookId: string;
  readonly inviter: KnownPerson;
  readonly to: string;
  readonly role: Role;
  readonly publicUrl: string;
}
type Addressee =
  { readonly by: "login"; readonly login: string } | { readonly by: "email"; readonly email: string };

const emailSchema = z.email().max(254);
/** GitHub's own rule, with the underscore of accounts that an enterprise manages. */
const loginShape = /^[A-Za-z0-9](?:[A-Za-z0-9_-]{0,98}[A-Za-z0-9_])?$/;

function readAddressee(to: string): Outcome<Addressee> {
  const name = to.replace(/^@/, "");
  if (loginShape.test(name)) return succeed({ by: "login", login: name });
  const email = emailSchema.safeParse(to);
  if (email.success) return succeed({ by: "email", email: email.data });
  return refuse("invalid", "This is neither an account name nor an e-mail address.");
}

/** An address finds someone only when they have verified it, and only when it is theirs alone. */
async function findAddressee(
  transaction: Knex.Transaction,
  addressee: Addressee,
): Promise<KnownPerson | null> {
  const found = await rows<KnownPerson>(
    transaction,
    `select id, login, name, email, email_verified as "emailVerified" from people
      where ${addressee.by === "login" ? "lower(login) = lower(?)" : "email_verified and lower(email) = lower(?)"}
      limit 2`,
    [addressee.by === "login" ? addressee.login : addressee.email],
  );
  return found.length === 1 ? (found[0] ?? null) : null;
}

async function addPerson(
  transaction: Knex.Transaction,
  wish: Wish,
  known: KnownPerson,
): Promise<Outcome<InvitationOutcome>> {
  const { notebookId, inviter, role } = wish;
  const person: Person = { id: known.id, login: known.login, name: known.name };
  const inserted = await firstRow(
    transaction,
    `insert into notebook_people (notebook_id, person_id, role) values (?, ?, ?) on conflict do nothing returning role`,
    [notebookId, person.id, role],
  );
  if (inserted === undefined) {
    const present = await roleOf(transaction, person.id, notebookId);
    if (present === role) return succeed({ outcome: "added", person });
    const words = `${person.name} takes part already, as ${present ?? "someone else"}. Change the role in the list of people.`;
    return refuse("already-there", words);
  }
  const details = { person: person.id, role };
  await recordEvent(transaction, { personId: inviter.id, notebookId, what: "person-added", details });
  await announceAccessChange(transaction, { about: "person", notebookId, personId: person.id });
  await announceAccessChange(transaction, { about: "notebook", notebookId });
  if (known.email !== null && known.emailVerified) await writeLetter(transaction, wish, known.email, true);
  return succeed({ outcome: "added", person });
}

async function keepInvitation(
  transaction: Knex.Transaction,
  wish: Wish,
  addressee: Addressee,
): Promise<Invitation> {
  const { notebookId, inviter, role } = wish;
  const login = addressee.by === "login" ? addressee.login : null;
  const email = addressee.by === "email" ? addressee.email : null;
  const column = addressee.by; // one of two words of ours, never what was sent
  // xmax is 0 in a row that this statement inserted and not in one it found.
  const row = await firstRow<InvitationRow & { is_new: boolean }>(
    transaction,
    `insert into invitations (notebook_id, login, email, role, invited_by) values (?, ?, ?, ?, ?)
     on conflict (notebook_id, lower(${column})) where ${column} is not null do update set role = excluded.role
     returning id, coalesce(login, email) as "to", role, invited_at, xmax = 0 as is_new`,
    [notebookId, login, email, role, inviter.id],
  );
  if (row === undefined) throw new Error("PostgreSQL kept an invitation and returned none.");
  if (row.is_new) {
    await recordEvent(transaction, {
      personId: inviter.id,
      notebookId,
      what: "invited",
      details: { to: row.to, role },
    });
    await announceAccessChange(transaction, { about: "notebook", notebookId });
    if (email !== null) await writeLetter(transaction, wish, email, false);
  }
  return presentInvitation(row);
}

async function writeLetter(
  transaction: Knex.Transaction,
  wish: Wish,
  recipient: string,
  isMember: boolean,
): Promise<void> {
  const notebook = await firstRow<{ title: string }>(
    transaction,
    "select title from notebooks where id = ?",
    [wish.notebookId],
  );
  const words = invitationWords({ ...wish, recipient, isMember, notebookTitle: notebook?.title ?? "" });
  await enqueueLetter(transaction, { recipient, ...words });
}

/** Inviting again the same way changes nothing and sends nothing. */
export function invite(database: Database, wish: Wish): Promise<Outcome<InvitationOutcome>> {
  return database.transaction(async (transaction) => {
    const role = await roleOf(transaction, wish.inviter.id, wish.notebookId);
    if (role === null) return refuse("not-found");
    if (!roleMay(role, "invitation.manage")) return refuse("forbidden");
    const addressee = readAddressee(wish.to);
    if (!addressee.ok) return addressee;
    // Whoever signs in at this moment takes the same lock, so the invitation is seen by one of the two.
    await transaction.raw("lock table invitations in share row exclusive mode");
    const known = await findAddressee(transaction, addressee.value);
    if (known !== null) return addPerson(transaction, wish, known);
    return succeed({
      outcome: "invited",
      invitation: await keepInvitation(transaction, wish, addressee.value),
    });
  });
}

export function withdrawInvitation(
  database: Database,
  personId: string,
  notebookId: string,
  invitationId: string,
): Promise<Outcome<null>> {
  return database.transaction(async (transaction) => {
    const withdrawn = await firstRow<{ to: string }>(
      transaction,
      `delete from invitations where id = ? and notebook_id = ? returning coalesce(login, email) as "to"`,
      [invitationId, notebookId],
    );
    if (withdrawn === undefined)
      return refuse("not-found", "This invitation was accepted or withdrawn already.");
    await recordEvent(transaction, {
      personId,
      notebookId,
      what: "invitation-withdrawn",
      details: { to: withdrawn.to },
    });
    await announceAccessChange(transaction, { about: "notebook", notebookId });
    return succeed(null);
  });
}
