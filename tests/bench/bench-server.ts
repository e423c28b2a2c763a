/** What the benches of co-editing start from: a database of their own, and a server process on it. */
import { openDatabase, rows, type Database } from "../../server/data/database.ts";
import { SCHEMA_VERSION } from "../../client/schema/version.ts";
import { addNotebook, addPerson, type CastPerson } from "../server/collab/cast.ts";
import { startChild, type Child } from "../server/collab/child.ts";
import { publicUrl } from "../server/collab/collab-server.ts";
import { createTestDatabase } from "../server/database.ts";

export interface BenchServer {
  readonly database: Database;
  readonly child: Child;
  readonly people: readonly CastPerson[];
  notebook(people: readonly CastPerson[]): Promise<string>;
  address(person: CastPerson, notebookId: string): { url: string; headers: Record<string, string> };
  end(): Promise<void>;
}

export async function startBenchServer(count: number): Promise<BenchServer> {
  process.env["SUBLEADING_TEST_DATABASE_URL"] ??= process.env["DATABASE_URL"];
  const testDatabase = await createTestDatabase();
  const database = openDatabase(testDatabase.url);
  const [settings] = await rows<{ fsync: string; commit: string }>(
    database,
    "select current_setting('fsync') as fsync, current_setting('synchronous_commit') as commit",
  );
  console.log(`PostgreSQL: fsync ${settings?.fsync ?? "?"}, synchronous_commit ${settings?.commit ?? "?"}`);
  const people: CastPerson[] = [];
  for (let index = 0; index < count; index += 1) people.push(await addPerson(database, `Person ${index}`));
  const child = await startChild(testDatabase.url);
  return {
    database,
    child,
    people,
    notebook: (members) =>
      addNotebook(
        database,
        members.map((person) => [person, "author"] as const),
      ),
    address: ({ cookie }, notebookId) => ({
      url: `ws://127.0.0.1:${child.port}/collab/${notebookId}?schema=${SCHEMA_VERSION}`,
      headers: { cookie, origin: publicUrl },
    }),
    end: async () => {
      await child.end("SIGTERM");
      await database.destroy();
      await testDatabase.drop();
    },
  };
}
