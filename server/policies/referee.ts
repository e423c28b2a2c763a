/** What a referee's token opens. Only its hash is stored, so a leaked database opens nothing. */
import { createHash } from "node:crypto";
import { firstRow, type Queryable } from "../data/database.ts";

export interface RefereeAccess {
  readonly refereeLinkId: string;
  readonly notebookId: string;
  readonly schemaVersion: number;
  readonly hideAuthors: boolean;
  /** When open pages must be cut, known from the start. */
  readonly expiresAt: Date | null;
}
export type RefereeOutcome =
  | { readonly state: "open"; readonly access: RefereeAccess }
  | { readonly state: "expired" | "revoked" | "withdrawn" }
  | { readonly state: "unknown" };

/** 32 random bytes in base64url. */
const tokenShape = /^[A-Za-z0-9_-]{43}$/;

export function hashRefereeToken(token: string): Buffer {
  return createHash("sha256").update(token, "utf8").digest();
}

/** "withdrawn" when the notebook itself was deleted. */
export async function resolveReferee(database: Queryable, token: string): Promise<RefereeOutcome> {
  if (!tokenShape.test(token)) return { state: "unknown" };
  const row = await firstRow<{
    id: string;
    notebook_id: string;
    schema_version: number;
    hide_authors: boolean;
    expires_at: Date | null;
    revoked: boolean;
    expired: boolean;
    deleted: boolean;
  }>(
    database,
    `select l.id, l.notebook_id, n.schema_version, l.hide_authors, l.expires_at,
            l.revoked_at is not null as revoked,
            coalesce(l.expires_at <= now(), false) as expired,
            n.deleted_at is not null as deleted
       from referee_links l join notebooks n on n.id = l.notebook_id
      where l.token_hash = ?`,
    [hashRefereeToken(token)],
  );
  if (row === undefined) return { state: "unknown" };
  if (row.revoked) return { state: "revoked" };
  if (row.deleted) return { state: "withdrawn" };
  if (row.expired) return { state: "expired" };
  return {
    state: "open",
    access: {
      refereeLinkId: row.id,
      notebookId: row.notebook_id,
      schemaVersion: row.schema_version,
      hideAuthors: row.hide_authors,
      expiresAt: row.expires_at,
    },
  };
}
