/** People, notebooks, sign-in sessions and referee links for tests, written straight into the database. */
import { createHmac, randomBytes } from "node:crypto";
import type { Role } from "../../../client/contract/roles.ts";
import { firstRow, type Queryable } from "../../../server/data/database.ts";
import { hashRefereeToken } from "../../../server/policies/referee.ts";
import { sessionSecret } from "./collab-server.ts";

export interface CastPerson {
  readonly id: string;
  readonly name: string;
  readonly cookie: string;
  readonly sessionName: string;
}

let count = 0;
const one = async (database: Queryable, sql: string, bindings: (string | Buffer | Date | boolean | null)[]) =>
  (await firstRow<{ id: string }>(database, sql, bindings))!.id;

export async function addPerson(database: Queryable, name: string): Promise<CastPerson> {
  count += 1;
  const id = await one(database, "insert into people (login, name) values (?, ?) returning id", [
    `${name.toLowerCase()}-${process.pid}-${count}-${randomBytes(3).toString("hex")}`,
    name,
  ]);
  return { id, name, ...(await signIn(database, id)) };
}

/** As express-session and connect-pg-simple store it. */
export async function signIn(
  database: Queryable,
  personId: string,
  endsAt = new Date(Date.now() + 3_600_000),
): Promise<{ cookie: string; sessionName: string }> {
  const sessionName = randomBytes(24).toString("base64url");
  const content = { cookie: { expires: endsAt.toISOString(), path: "/", httpOnly: true }, personId };
  await database.raw("insert into sessions (sid, sess, expire) values (?, ?, ?)", [
    sessionName,
    JSON.stringify(content),
    endsAt,
  ]);
  const signature = createHmac("sha256", sessionSecret)
    .update(sessionName)
    .digest("base64")
    .replace(/=+$/, "");
  return { sessionName, cookie: `subleading=${encodeURIComponent(`s:${sessionName}.${signature}`)}` };
}

export async function addNotebook(
  database: Queryable,
  people: readonly (readonly [CastPerson, Role])[],
): Promise<string> {
  const id = await one(database, "insert into notebooks (title) values (?) returning id", [
    "A test notebook",
  ]);
  for (const [person, role] of people)
    await database.raw("insert into notebook_people (notebook_id, person_id, role) values (?, ?, ?)", [
      id,
      person.id,
      role,
    ]);
  return id;
}

export async function addRefereeLink(
  database: Queryable,
  notebookId: string,
  wish: { readonly hideAuthors?: boolean; readonly expiresAt?: Date } = {},
): Promise<{ token: string; id: string }> {
  const token = randomBytes(32).toString("base64url");
  const id = await one(
    database,
    `insert into referee_links (notebook_id, name, token_hash, hide_authors, expires_at)
     values (?, 'a referee', ?, ?, ?) returning id`,
    [notebookId, hashRefereeToken(token), wish.hideAuthors ?? false, wish.expiresAt ?? null],
  );
  return { token, id };
}
