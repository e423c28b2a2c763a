/**
 * node --import tsx tests/bench/delivery.ts
 *
 * How long a keystroke takes to the others in a notebook, committed on the way, beside an in-memory room without a
 * store in the same run. Takes the address of a PostgreSQL in SUBLEADING_TEST_DATABASE_URL or DATABASE_URL, and makes a
 * database of its own there.
 */
import { fork } from "node:child_process";
import { once } from "node:events";
import { join } from "node:path";
import { openDatabase, rows } from "../../server/data/database.ts";
import { addNotebook, addPerson, type CastPerson } from "../server/collab/cast.ts";
import { startChild } from "../server/collab/child.ts";
import { publicUrl } from "../server/collab/collab-server.ts";
import { createTestDatabase } from "../server/database.ts";
import { measureDelivery, type CrowdOptions } from "./typing-crowd.ts";

process.env["SUBLEADING_TEST_DATABASE_URL"] ??= process.env["DATABASE_URL"];
const crowds = [
  { people: 2, keystrokes: 10 },
  { people: 20, keystrokes: 5 },
] as const;
const ROUNDS = 3;
const times = { warmUpMs: 1_000, measureMs: 4_000 };

async function startControl() {
  const control = fork(join(import.meta.dirname, "control-room.ts"), { execArgv: process.execArgv });
  const [{ port }] = (await once(control, "message")) as [{ port: number }]; // see control-room.ts
  return { port, end: () => control.kill("SIGTERM") };
}

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? Number.NaN;
}
function summary(samples: readonly number[]) {
  const sorted = [...samples].sort((a, b) => a - b);
  return { p50: quantile(sorted, 0.5), p95: quantile(sorted, 0.95), count: sorted.length };
}
const milliseconds = (value: number) => `${value.toFixed(2).padStart(7)} ms`;

const testDatabase = await createTestDatabase();
const database = openDatabase(testDatabase.url);
const server = await startChild(testDatabase.url);
try {
  const [settings] = await rows<{ fsync: string; commit: string }>(
    database,
    "select current_setting('fsync') as fsync, current_setting('synchronous_commit') as commit",
  );
  console.log(`PostgreSQL: fsync ${settings?.fsync ?? "?"}, synchronous_commit ${settings?.commit ?? "?"}`);
  console.log(
    "from a keystroke to its being in another's document, committed on the way (ours) or not (control)\n",
  );
  for (const { people, keystrokes } of crowds) {
    const cast: CastPerson[] = [];
    for (let index = 0; index < people; index += 1) cast.push(await addPerson(database, `Typist ${index}`));
    const ours: number[] = [];
    const control: number[] = [];
    const measure = (addresses: CrowdOptions["addresses"]) =>
      measureDelivery({ addresses, keystrokes, ...times });
    for (let round = 0; round < ROUNDS; round += 1) {
      const room = await startControl();
      const url = `ws://127.0.0.1:${room.port}/`;
      control.push(...(await measure(cast.map(() => ({ url, headers: {} })))));
      room.end();
      const notebookId = await addNotebook(
        database,
        cast.map((person) => [person, "author"] as const),
      );
      ours.push(
        ...(await measure(
          cast.map(({ cookie }) => ({
            url: `ws://127.0.0.1:${server.port}/collab/${notebookId}?schema=1`,
            headers: { cookie, origin: publicUrl },
          })),
        )),
      );
    }
    const [mine, theirs] = [summary(ours), summary(control)];
    console.log(`${people} people, ${keystrokes} keystrokes a second each (${mine.count} deliveries)`);
    console.log(`            p50          p95`);
    console.log(`  ours    ${milliseconds(mine.p50)}  ${milliseconds(mine.p95)}`);
    console.log(`  control ${milliseconds(theirs.p50)}  ${milliseconds(theirs.p95)}`);
    console.log(
      `  ratio   ${(mine.p50 / theirs.p50).toFixed(2).padStart(7)}     ${(mine.p95 / theirs.p95).toFixed(2).padStart(7)}\n`,
    );
  }
} finally {
  await server.end("SIGTERM");
  await database.destroy();
  await testDatabase.drop();
}
