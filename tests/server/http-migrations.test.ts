import { readdirSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { openDatabase, rows, type Database } from "../../server/data/database.ts";
import { migrateToLatest, migrateToNothing, migrations } from "../../server/data/migrate.ts";
import { createTestDatabase, type TestDatabase } from "./database.ts";

describe("migrations", () => {
  let test: TestDatabase;
  let database: Database;
  beforeAll(async () => {
    test = await createTestDatabase();
    database = openDatabase(test.url, { most: 2 });
  });
  afterAll(async () => {
    await database.destroy();
    await test.drop();
  });
  const tables = async () =>
    (
      await rows<{ name: string }>(
        database,
        "select table_name as name from information_schema.tables where table_schema = 'public' order by 1",
      )
    ).map(({ name }) => name);

  it("name every file of the folder, in order", () => {
    const files = readdirSync(join(import.meta.dirname, "../../migrations")).sort();
    expect(Object.keys(migrations)).toEqual(files);
  });

  it("have all run in a test database, so running them again does nothing", async () => {
    expect(await migrateToLatest(database)).toEqual([]);
  });

  it("go back to nothing and forward again to the same tables", async () => {
    const before = await tables();
    expect(before).toContain("notebooks");
    await migrateToNothing(database);
    expect(await tables()).toEqual(["knex_migrations", "knex_migrations_lock"]);
    expect(await migrateToLatest(database)).toEqual(Object.keys(migrations));
    expect(await tables()).toEqual(before);
  });
});
