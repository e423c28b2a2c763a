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
import { startBenchServer } from "./bench-server.ts";
import { measureDelivery, type CrowdOptions } from "./typing-crowd.ts";

const crowds = [
  { people: 2, keystrokes: 10 },
  { people: 10, keystrokes: 5 },
  { people: 20, keystrokes: 2 },
  { people: 50, keystrokes: 1 },
  { people: 200, keystrokes: 0.25 },
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

const bench = await startBenchServer(Math.max(...crowds.map(({ people }) => people)));
try {
  console.log(
    "from a keystroke to its being in another's document, committed on the way (ours) or not (control)\n",
  );
  for (const { people, keystrokes } of crowds) {
    const cast = bench.people.slice(0, people);
    const ours: number[] = [];
    const control: number[] = [];
    const measure = (addresses: CrowdOptions["addresses"]) =>
      measureDelivery({ addresses, keystrokes, ...times });
    for (let round = 0; round < ROUNDS; round += 1) {
      const room = await startControl();
      const url = `ws://127.0.0.1:${room.port}/`;
      control.push(...(await measure(cast.map(() => ({ url, headers: {} })))));
      room.end();
      const notebookId = await bench.notebook(cast);
      ours.push(...(await measure(cast.map((person) => bench.address(person, notebookId)))));
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
  await bench.end();
}
