/** The newest stored result of every block of a notebook. */
import type { StoredResult } from "#contract/api.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { rows, type Queryable } from "./database.ts";

/** Without authors, nobody is named as the one whose edit led to a result. */
export async function storedResults(
  database: Queryable,
  notebookId: string,
  { hideAuthors = false }: { readonly hideAuthors?: boolean } = {},
): Promise<readonly StoredResult[]> {
  const found = await rows<{
    blockId: string;
    key: string;
    engineVersion: string;
    evaluation: Evaluation;
    settledAt: Date;
    changedBy: string | null;
  }>(
    database,
    `select nr.block_id as "blockId", nr.key, r.engine_version as "engineVersion", r.value as evaluation,
            nr.settled_at as "settledAt", p.name as "changedBy"
       from notebook_results nr
       join results r on r.key = nr.key
       left join people p on p.id = nr.changed_by
      where nr.notebook_id = ?
      order by nr.block_id`,
    [notebookId],
  );
  return found.map((result) => ({
    ...result,
    settledAt: result.settledAt.toISOString(),
    changedBy: hideAuthors ? null : result.changedBy,
  }));
}
