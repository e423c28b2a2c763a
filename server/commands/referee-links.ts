/** Creates, revokes and opens referee links. */
import { randomBytes } from "node:crypto";
import type { RefereeLink, RefereeLinkCreated, RefereeView } from "#contract/api.ts";
import { firstRow, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { presentRefereeLink, refereeLinkColumns, type RefereeLinkRow } from "../data/referee-links.ts";
import { storedResults } from "../data/stored-results.ts";
import { announceAccessChange } from "../policies/access-changes.ts";
import { hashRefereeToken, resolveReferee } from "../policies/referee.ts";
import { refuse, succeed, type Outcome } from "./outcome.ts";

interface NewLink {
  readonly notebookId: string;
  readonly personId: string;
  readonly name: string;
  readonly expiresAt: string | null;
  readonly hideAuthors: boolean;
}

export function createRefereeLink(database: Database, wish: NewLink): Promise<Outcome<RefereeLinkCreated>> {
  const { notebookId, personId, name, expiresAt, hideAuthors } = wish;
  return database.transaction(async (transaction) => {
    const token = randomBytes(32).toString("base64url");
    const row = await firstRow<RefereeLinkRow>(
      transaction,
      `insert into referee_links (notebook_id, name, token_hash, hide_authors, created_by, expires_at)
       select ?, ?, ?, ?, ?, ?::timestamptz
        where coalesce(?::timestamptz > now(), true)
       returning ${refereeLinkColumns}`,
      [notebookId, name, hashRefereeToken(token), hideAuthors, personId, expiresAt, expiresAt],
    );
    if (row === undefined)
      return refuse("invalid", "The link would have expired already. Choose a later time.");
    const details = { link: row.id, name, hideAuthors };
    await recordEvent(transaction, { personId, notebookId, what: "referee-link-created", details });
    return succeed({ link: presentRefereeLink(row), token });
  });
}

/** Revoking twice is revoking once. */
export function revokeRefereeLink(
  database: Database,
  personId: string,
  notebookId: string,
  linkId: string,
): Promise<Outcome<RefereeLink>> {
  return database.transaction(async (transaction) => {
    const before = await firstRow<RefereeLinkRow>(
      transaction,
      `select ${refereeLinkColumns} from referee_links where id = ? and notebook_id = ? for update`,
      [linkId, notebookId],
    );
    if (before === undefined) return refuse("not-found", "This notebook has no such link.");
    if (before.revoked_at !== null) return succeed(presentRefereeLink(before));
    const after = await firstRow<RefereeLinkRow>(
      transaction,
      `update referee_links set revoked_at = now() where id = ? returning ${refereeLinkColumns}`,
      [linkId],
    );
    await recordEvent(transaction, {
      personId,
      notebookId,
      what: "referee-link-revoked",
      details: { link: linkId },
    });
    await announceAccessChange(transaction, { about: "referee-link", notebookId, refereeLinkId: linkId });
    return succeed(presentRefereeLink(after ?? before));
  });
}

const closedWords = {
  expired: "This link has expired. Ask the authors for a new one.",
  revoked: "The authors have closed this link. Ask them for a new one.",
  withdrawn: "The notebook behind this link has been withdrawn by its authors.",
} as const;

/** What a referee sees first; notes that the link was opened. */
export async function openRefereeLink(database: Database, token: string): Promise<Outcome<RefereeView>> {
  const referee = await resolveReferee(database, token);
  if (referee.state === "unknown")
    return refuse("not-found", "No notebook is behind this link. Check that the address was copied whole.");
  if (referee.state !== "open") return refuse("gone", closedWords[referee.state]);
  const { refereeLinkId, notebookId, schemaVersion, hideAuthors, expiresAt } = referee.access;
  const row = await firstRow<{ title: string; authors: string[] }>(
    database,
    `with opened as (update referee_links set last_opened_at = now() where id = ?)
     select n.title, array(
              select p.name from notebook_people m join people p on p.id = m.person_id
               where m.notebook_id = n.id and m.role in ('owner', 'author') order by m.since, p.login
            ) as authors
       from notebooks n where n.id = ?`,
    [refereeLinkId, notebookId],
  );
  if (row === undefined) return refuse("gone", closedWords.withdrawn);
  return succeed({
    notebookId,
    title: row.title,
    authors: hideAuthors ? null : row.authors,
    schemaVersion,
    expiresAt: expiresAt?.toISOString() ?? null,
    results: await storedResults(database, notebookId, { hideAuthors }),
  });
}
