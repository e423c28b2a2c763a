/** Referee links as their owner sees them; never the token, of which only a hash exists. */
import type { RefereeLink } from "#contract/api.ts";
import { rows, type Queryable } from "./database.ts";

export interface RefereeLinkRow {
  readonly id: string;
  readonly name: string;
  readonly hide_authors: boolean;
  readonly created_at: Date;
  readonly expires_at: Date | null;
  readonly revoked_at: Date | null;
  readonly last_opened_at: Date | null;
}
export const refereeLinkColumns =
  "id, name, hide_authors, created_at, expires_at, revoked_at, last_opened_at";

export function presentRefereeLink(row: RefereeLinkRow): RefereeLink {
  return {
    id: row.id,
    name: row.name,
    hideAuthors: row.hide_authors,
    createdAt: row.created_at.toISOString(),
    expiresAt: row.expires_at?.toISOString() ?? null,
    revokedAt: row.revoked_at?.toISOString() ?? null,
    lastOpenedAt: row.last_opened_at?.toISOString() ?? null,
  };
}

export async function refereeLinksOf(
  database: Queryable,
  notebookId: string,
): Promise<readonly RefereeLink[]> {
  const found = await rows<RefereeLinkRow>(
    database,
    `select ${refereeLinkColumns} from referee_links where notebook_id = ? order by created_at desc, id`,
    [notebookId],
  );
  return found.map(presentRefereeLink);
}
