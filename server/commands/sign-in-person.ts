/** Finds or makes the person behind an account, keeps what the account says of them, claims invitations. */
import { firstRow, type Database, type Queryable } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { claimInvitations } from "./claim-invitations.ts";

export interface Account {
  readonly provider: "github";
  /** The account's unchanging id. Names can be given up and taken by someone else; ids cannot. */
  readonly subject: string;
  readonly login: string;
  readonly name: string;
  readonly email: string | null;
  readonly emailVerified: boolean;
}

/** Two tabs signing in one new account at once must not make two people. */
async function lockAccount(transaction: Queryable, account: Account): Promise<void> {
  await transaction.raw("select pg_advisory_xact_lock(hashtextextended(?, 0))", [
    `account ${account.provider} ${account.subject}`,
  ]);
}

/** Someone else held this name before it changed hands at the sign-in service; they keep everything but the name. */
async function freeLogin(transaction: Queryable, login: string, personId: string | null): Promise<void> {
  await transaction.raw(
    `update people set login = left(login, 80) || '~' || left(id::text, 8)
      where lower(login) = lower(?) and id is distinct from ?::uuid`,
    [login, personId],
  );
}

export interface SignedIn {
  readonly personId: string;
  /** Whether this is the first time. */
  readonly isNew: boolean;
}

export async function signInPerson(database: Database, account: Account): Promise<SignedIn> {
  return database.transaction(async (transaction) => {
    await lockAccount(transaction, account);
    const known = await firstRow<{ person_id: string }>(
      transaction,
      "select person_id from identities where provider = ? and subject = ?",
      [account.provider, account.subject],
    );
    await freeLogin(transaction, account.login, known?.person_id ?? null);
    const profile = {
      login: account.login,
      name: account.name,
      email: account.email,
      email_verified: account.emailVerified,
    };
    let personId = known?.person_id;
    if (personId === undefined) {
      const [made] = await transaction("people").insert(profile).returning<{ id: string }[]>("id");
      if (made === undefined) throw new Error("PostgreSQL inserted a person and returned none.");
      personId = made.id;
      await transaction("identities").insert({
        provider: account.provider,
        subject: account.subject,
        person_id: personId,
      });
    } else {
      await transaction("people").where({ id: personId }).update(profile);
    }
    await claimInvitations(transaction, { ...account, id: personId });
    await recordEvent(transaction, { personId, what: "signed-in" });
    return { personId, isNew: known === undefined };
  });
}
