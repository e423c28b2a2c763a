/** Writes what was evaluated: results by key (once and for all), and which block has which result now. */
import { ENGINE_VERSION } from "#engine/index.ts";
import { rows, type Database, type Queryable } from "../data/database.ts";
import type { SettledBlock, SettledDocument } from "./tasks.ts";
import type { Touched } from "./touched-blocks.ts";

/** A name for a block longer than this is nobody's; PostgreSQL could not index it. */
const LONGEST_BLOCK_ID = 200;

/** True when a result or a count of the notebook differs from before. `touched` says who is to be named. */
export async function storeSettled(
  transaction: Queryable,
  notebookId: string,
  settled: SettledDocument,
  touched: Pick<Touched, "blocks" | "structure">,
): Promise<boolean> {
  const blocks = settled.blocks.filter(({ blockId }) => blockId.length <= LONGEST_BLOCK_ID);
  await storeResults(transaction, blocks);
  const here = [...blocks, ...settled.postponed].map(({ blockId }) => storable(blockId));
  const gone = await rows(
    transaction,
    "delete from notebook_results where notebook_id = ? and block_id <> all(?::text[]) returning 1",
    // What is being computed keeps its last result.
    [notebookId, here],
  );
  const changed = await rows(
    transaction,
    `insert into notebook_results (notebook_id, block_id, key, changed_by)
     select ?, line.block_id, line.key, (select id from people where id = line.changed_by)
       from unnest(?::text[], ?::text[], ?::uuid[]) as line (block_id, key, changed_by)
     on conflict (notebook_id, block_id) do update
       set key = excluded.key, settled_at = now(), changed_by = excluded.changed_by
       where notebook_results.key <> excluded.key
     returning 1`,
    [
      notebookId,
      blocks.map(({ blockId }) => storable(blockId)),
      blocks.map(({ key }) => key),
      // Knex passes arrays on as they are; PostgreSQL takes null among uuids.
      blocks.map((block) => whoChanged(block, touched)) as unknown as string[],
    ],
  );
  const counted = await rows(
    transaction,
    `update notebooks set premises_line = ?, pins_moved = ?, pins_loose = ?
      where id = ? and (premises_line, pins_moved, pins_loose) is distinct from (?, ?, ?)
     returning 1`,
    [...summaryOf(settled), notebookId, ...summaryOf(settled)],
  );
  if (settled.words !== null) {
    const words = storable(settled.words);
    await transaction.raw("update notebooks set search_text = ? where id = ? and search_text <> ?", [
      words,
      notebookId,
      words,
    ]);
  }
  return gone.length > 0 || changed.length > 0 || counted.length > 0;
}

/** Results are right for their key for ever, so those that are there stay. */
export async function storeResults(database: Queryable, blocks: readonly SettledBlock[]): Promise<void> {
  // In order of key, so that two processes storing the same results never wait for each other in a circle.
  const byKey = new Map(blocks.map((block) => [block.key, block]));
  const distinct = [...byKey.values()].sort((a, b) => (a.key < b.key ? -1 : 1));
  await database.raw(
    `insert into results (key, engine_version, inputs, value)
     select line.key, ?, line.inputs, line.value
       from unnest(?::text[], ?::jsonb[], ?::jsonb[]) as line (key, inputs, value)
     on conflict (key) do nothing`,
    [
      ENGINE_VERSION,
      distinct.map(({ key }) => key),
      distinct.map(({ inputs }) => jsonOf(inputs)),
      distinct.map(({ evaluation }) => jsonOf(evaluation)),
    ],
  );
}

/** For the shelf: who changed the notebook last, and when. */
export async function storeLastChange(
  database: Database,
  notebookId: string,
  personId: string | null,
): Promise<void> {
  await database.raw(
    `update notebooks set changed_at = now(), changed_by = (select id from people where id = ?) where id = ?`,
    [personId, notebookId],
  );
}

/** The person who touched the block, or else its premises, or else added or removed something. */
function whoChanged(
  { blockId, standsOn }: SettledDocument["blocks"][number],
  { blocks, structure }: Pick<Touched, "blocks" | "structure">,
): string | null {
  const own = blocks.get(blockId);
  if (own !== undefined) return own;
  const ofPremises = standsOn === null ? undefined : blocks.get(standsOn);
  return ofPremises === undefined ? structure : ofPremises;
}

function summaryOf({ premisesLine, pins }: SettledDocument): readonly [string, number, number] {
  return [storable(premisesLine), pins.moved, pins.loose];
}

/** PostgreSQL keeps no NUL and no lone surrogate; a document may hold either. */
function storable(text: string): string {
  return text.replace(/[\0\p{Surrogate}]/gu, "\ufffd");
}
function jsonOf(value: unknown): string {
  return JSON.stringify(value, (_name, part: unknown) => (typeof part === "string" ? storable(part) : part));
}
