/** A fresh, migrated database for one test file, copied from a template that is migrated once per layout. */
import { createHash, randomBytes } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import pg from "pg";
import { openDatabase } from "../../server/data/database.ts";
import { migrateToLatest } from "../../server/data/migrate.ts";

export interface TestDatabase {
  readonly url: string;
  drop(): Promise<void>;
}

const migrationsFolder = join(import.meta.dirname, "../../migrations");
/** Any number of our own: serialises the making of the template between test processes. */
const TEMPLATE_LOCK = 727_001;

function adminUrl(): string {
  const url = process.env["SUBLEADING_TEST_DATABASE_URL"];
  if (url === undefined)
    throw new Error("Set SUBLEADING_TEST_DATABASE_URL to a PostgreSQL superuser's address.");
  return url;
}

function urlOf(name: string): string {
  const url = new URL(adminUrl());
  url.pathname = `/${name}`;
  return url.href;
}

/** The template's name changes with the text of the migrations, so an edited layout gets a new one. */
function templateName(): string {
  const digest = createHash("sha256");
  for (const file of readdirSync(migrationsFolder).sort())
    digest.update(readFileSync(join(migrationsFolder, file)));
  return `subleading_template_${digest.digest("hex").slice(0, 12)}`;
}

async function withAdmin<Outcome>(work: (admin: pg.Client) => Promise<Outcome>): Promise<Outcome> {
  const admin = new pg.Client({ connectionString: adminUrl() });
  await admin.connect();
  try {
    return await work(admin);
  } finally {
    await admin.end();
  }
}

/** Migrated under another name and renamed when whole, so a half-made template is never copied. */
async function ensureTemplate(admin: pg.Client, template: string): Promise<void> {
  await admin.query("select pg_advisory_lock($1)", [TEMPLATE_LOCK]);
  const found = await admin.query("select 1 from pg_database where datname = $1", [template]);
  if (found.rowCount === 0) {
    const draft = `draft_${randomBytes(6).toString("hex")}`;
    await admin.query(`create database ${draft}`);
    const database = openDatabase(urlOf(draft), { most: 1 });
    await migrateToLatest(database).finally(() => database.destroy());
    await admin.query(`alter database ${draft} rename to ${template}`);
  }
  await admin.query("select pg_advisory_unlock($1)", [TEMPLATE_LOCK]);
}

export async function createTestDatabase(): Promise<TestDatabase> {
  const name = `test_${randomBytes(8).toString("hex")}`;
  await withAdmin(async (admin) => {
    const template = templateName();
    await ensureTemplate(admin, template);
    await admin.query(`create database ${name} template ${template}`);
  });
  return {
    url: urlOf(name),
    drop: () =>
      withAdmin(async (admin) => {
        await admin.query(`drop database if exists ${name} with (force)`);
      }),
  };
}
