/** Brings a database to the newest layout. Knex holds a lock meanwhile, so two starting servers do not collide. */
import { readConfiguration } from "../configuration.ts";
import { openDatabase, type Database } from "./database.ts";
import type { Knex } from "knex";
import * as foundation from "../../migrations/20261201000001_foundation.ts";
import * as searchText from "../../migrations/20261201000010_search_text.ts";
import * as serverProcesses from "../../migrations/20261201000020_server_processes.ts";
import * as attachments from "../../migrations/20261201000030_attachments.ts";

type Migration = { readonly up: (knex: Knex) => Promise<void>; readonly down: (knex: Knex) => Promise<void> };

/**
 * Every migration by the name knex stores, oldest first. Named here rather than read from the folder, so that
 * they are loaded like any other module, whether the server runs from sources or bundled.
 */
export const migrations: Readonly<Record<string, Migration>> = {
  "20261201000001_foundation.ts": foundation,
  "20261201000010_search_text.ts": searchText,
  "20261201000020_server_processes.ts": serverProcesses,
  "20261201000030_attachments.ts": attachments,
};

const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: () => Promise.resolve(Object.keys(migrations)),
  getMigrationName: (name) => name,
  getMigration: (name) => {
    const migration = migrations[name];
    if (migration === undefined) throw new Error(`No migration is called ${name}.`);
    return Promise.resolve(migration);
  },
};

/** Names of the migrations that were run. */
export async function migrateToLatest(database: Database): Promise<readonly string[]> {
  const [, names] = (await database.migrate.latest({ migrationSource })) as [number, string[]]; // knex types it any
  return names;
}

/** Takes every migration back; for tests of the way down. */
export async function migrateToNothing(database: Database): Promise<void> {
  await database.migrate.rollback({ migrationSource }, true);
}

/** `node --import tsx server/data/migrate.ts` */
async function main(): Promise<void> {
  const outcome = readConfiguration(process.env);
  const url = outcome.ok ? outcome.configuration.databaseUrl : process.env["DATABASE_URL"];
  if (url === undefined || url === "") throw new Error("Set DATABASE_URL to the PostgreSQL database.");
  const database = openDatabase(url, { most: 2, name: "subleading migrations" });
  try {
    const names = await migrateToLatest(database);
    process.stdout.write(names.length === 0 ? "The database is up to date.\n" : `Ran ${names.join(", ")}.\n`);
  } finally {
    await database.destroy();
  }
}

if (process.argv[1] === import.meta.filename) await main();
