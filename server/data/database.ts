/** The one way to PostgreSQL for queries. Sessions and listeners keep connections of their own. */
import createKnex, { type Knex } from "knex";
import type { Logger } from "pino";

export type Database = Knex;
/** A knex or a transaction of it: what a query needs, whoever owns the transaction. */
export type Queryable = Knex | Knex.Transaction;

export interface DatabaseOptions {
  readonly most?: number;
  readonly name?: string;
  /** Takes what knex would print by itself. */
  readonly log?: Logger;
}

function knexLog(log: Logger): Knex.Logger {
  const say = (level: "debug" | "warn") => (message: unknown) =>
    log[level]({ said: String(message) }, "knex");
  return { debug: say("debug"), warn: say("warn"), error: say("warn"), deprecate: say("debug") };
}

export function openDatabase(
  url: string,
  { most = 10, name = "subleading", log }: DatabaseOptions = {},
): Database {
  return createKnex({
    client: "pg",
    connection: { connectionString: url, application_name: name },
    pool: { min: 0, max: most },
    acquireConnectionTimeout: 10_000,
    ...(log === undefined ? {} : { log: knexLog(log) }),
  });
}

/** Rows of a raw query, typed by the caller who wrote the select list. */
export async function rows<Row>(
  database: Queryable,
  sql: string,
  bindings: Knex.RawBinding[] = [],
): Promise<Row[]> {
  const answer = await database.raw<{ rows: Row[] }>(sql, bindings);
  return answer.rows;
}

/** The first row, or undefined. */
export async function firstRow<Row>(
  database: Queryable,
  sql: string,
  bindings: Knex.RawBinding[] = [],
): Promise<Row | undefined> {
  return (await rows<Row>(database, sql, bindings))[0];
}
