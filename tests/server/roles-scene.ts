/** The vocabulary of the roles table: who acts, on what, and how it ends. */
import { randomBytes, randomUUID } from "node:crypto";
import type { Role } from "#contract/roles.ts";
import { rows } from "../../server/data/database.ts";
import { hashRefereeToken } from "../../server/policies/referee.ts";
import type { Browser } from "./http-browser.ts";
import type { World } from "./http-world.ts";

export const whos = [
  "owner",
  "author",
  "reviewer",
  "reader",
  "stranger",
  "signed out",
  "referee link",
  "revoked link",
] as const;
export type Who = (typeof whos)[number];

/** "done", or the code of the refusal; "read-only" on a socket that opens and takes nothing. */
export type Verdict = "done" | "read-only" | "signed-out" | "forbidden" | "not-found" | "gone";

/** Someone about to act: a browser with or without a session, and the token of a referee link, good or bad. */
export interface Actor {
  readonly who: Who;
  readonly browser: Browser;
  readonly token: string;
}
/** A notebook of its own for every line of the table, so that no line sees what another did. */
export interface Scene {
  readonly world: World;
  readonly notebookId: string;
  /** A reader who is in nobody's way. */
  readonly bystanderId: string;
  readonly invitationId: string;
  readonly linkId: string;
}
export interface Line {
  readonly action: string;
  /** What must be so before anyone acts. */
  prepare?(scene: Scene): Promise<unknown>;
  attempt(actor: Actor, scene: Scene): Promise<Verdict>;
  readonly verdicts: Readonly<Record<Who, Verdict>>;
  /** Whether what is done can be seen in the database afterwards. Refused, it must never be. */
  readonly changes: boolean;
}

/** The common shape of a line: what members may, and what everyone else meets. */
export function verdicts(
  [owner, author, reviewer, reader]: readonly [Verdict, Verdict, Verdict, Verdict],
  others: Partial<Record<Who, Verdict>> = {},
): Record<Who, Verdict> {
  return {
    owner,
    author,
    reviewer,
    reader,
    stranger: "not-found",
    "signed out": "signed-out",
    "referee link": "signed-out",
    "revoked link": "signed-out",
    ...others,
  };
}

const accounts: Readonly<Record<Who, string | null>> = {
  owner: "wren-lantern",
  author: "otto-lantern",
  reviewer: "ines-tern",
  reader: "ravi-ledger",
  stranger: "mika-unverified",
  "signed out": null,
  "referee link": null,
  "revoked link": null,
};
const memberRoles: readonly Role[] = ["owner", "author", "reviewer", "reader"];
const newToken = () => randomBytes(32).toString("base64url");

export interface Cast {
  readonly browsers: ReadonlyMap<Who, Browser>;
  readonly bystanderId: string;
}
export async function assembleCast(world: World): Promise<Cast> {
  const browsers = new Map<Who, Browser>();
  for (const who of whos) {
    const account = accounts[who];
    browsers.set(who, account === null ? world.stranger() : await world.signIn(account));
  }
  return { browsers, bystanderId: (await world.signIn("lena-newcomer")).id };
}

export async function setScene(world: World, cast: Cast, who: Who): Promise<{ actor: Actor; scene: Scene }> {
  const { database } = world;
  const notebookId = randomUUID();
  await database("notebooks").insert({ id: notebookId, title: "Roles" });
  await database("notebook_people").insert([
    ...memberRoles.map((role) => ({ notebook_id: notebookId, person_id: cast.browsers.get(role)!.id, role })),
    { notebook_id: notebookId, person_id: cast.bystanderId, role: "reader" },
  ]);
  const invitationId = randomUUID();
  await database("invitations").insert({
    id: invitationId,
    notebook_id: notebookId,
    login: "waiting",
    role: "reader",
  });
  const [good, revoked, linkId] = [newToken(), newToken(), randomUUID()];
  await database("referee_links").insert([
    { id: linkId, notebook_id: notebookId, name: "good", token_hash: hashRefereeToken(good) },
    {
      notebook_id: notebookId,
      name: "revoked",
      token_hash: hashRefereeToken(revoked),
      revoked_at: database.fn.now(),
    },
  ]);
  const token = { "referee link": good, "revoked link": revoked }[who as string] ?? newToken();
  return {
    actor: { who, browser: cast.browsers.get(who)!, token },
    scene: { world, notebookId, bystanderId: cast.bystanderId, invitationId, linkId },
  };
}

/** All that the actions of the table could change in a notebook, but for when a link was opened. */
export async function snapshot({ world, notebookId }: Scene): Promise<string> {
  const [row] = await rows(
    world.database,
    `select (select n::text from notebooks n where id = :id) as notebook,
            (select string_agg(m::text, ';' order by m.person_id) from notebook_people m where notebook_id = :id) as people,
            (select string_agg(i::text, ';' order by i.id) from invitations i where notebook_id = :id) as invitations,
            (select string_agg(concat_ws(',', l.id, l.name, l.revoked_at), ';' order by l.id)
               from referee_links l where notebook_id = :id) as links,
            (select count(*) from document_updates where notebook_id = :id) as updates,
            (select string_agg(concat_ws(',', a.id, a.name, a.size), ';' order by a.id)
               from attachments a where notebook_id = :id) as attachments,
            (select count(*) from events where notebook_id = :id) as events`.replaceAll(
      ":id",
      `'${notebookId}'`,
    ),
  );
  return JSON.stringify(row);
}

const codes: Readonly<Record<string, Verdict>> = {
  "urn:subleading:signed-out": "signed-out",
  "urn:subleading:forbidden": "forbidden",
  "urn:subleading:not-found": "not-found",
  "urn:subleading:gone": "gone",
};
/** How an HTTP request ended. Anything the table has no word for is a mistake of the test or the server. */
export function verdictOf(answer: {
  readonly status: number;
  readonly body: { readonly type?: string } | null;
}): Verdict {
  if (answer.status >= 200 && answer.status < 300) return "done";
  const verdict = codes[answer.body?.type ?? ""];
  if (verdict === undefined)
    throw new Error(`No verdict for ${answer.status} ${JSON.stringify(answer.body)}`);
  return verdict;
}
