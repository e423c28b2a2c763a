/** node --import tsx tests/bench/many-notebooks.ts: 200 notebooks with two people each, and what a keystroke costs. */
import { startBenchServer } from "./bench-server.ts";
import { columns } from "./figures.ts";
import { databaseProcessorTime, memoryMegabytes, processorTime } from "./processor-time.ts";
import { measureDelivery } from "./typing-crowd.ts";

const NOTEBOOKS = 200;
const MEASURE_MS = 10_000;
const times = { keystrokes: 2.5, warmUpMs: 3_000, measureMs: MEASURE_MS };

const bench = await startBenchServer(2);
try {
  const notebooks: string[] = [];
  for (let index = 0; index < NOTEBOOKS; index += 1) notebooks.push(await bench.notebook(bench.people));
  const before = memoryMegabytes(bench.child.pid);
  let server = Number.NaN;
  let database = Number.NaN;
  let memory = Number.NaN;
  const measured = Promise.all(
    notebooks.map((notebookId) =>
      measureDelivery({
        addresses: bench.people.map((person) => bench.address(person, notebookId)),
        ...times,
      }),
    ),
  );
  const look = async () => ({
    server: processorTime(bench.child.pid),
    database: await databaseProcessorTime(bench.database),
    rows: Number(
      (await bench.database.raw<{ rows: { count: string }[] }>("select count(*) from document_updates"))
        .rows[0]?.count,
    ),
  });
  await new Promise((resolve) => setTimeout(resolve, times.warmUpMs + 1_000));
  const start = await look();
  await new Promise((resolve) => setTimeout(resolve, MEASURE_MS - 2_000));
  const end = await look();
  const keystrokes = end.rows - start.rows;
  server = (end.server - start.server) / keystrokes;
  database = (end.database - start.database) / keystrokes;
  memory = memoryMegabytes(bench.child.pid);
  const delivered = (await measured).flat().sort((a, b) => a - b);
  console.log(
    `${NOTEBOOKS} notebooks, two people in each, ${times.keystrokes} keystroke a second and person\n`,
  );
  columns([
    ["", "measured", "promised"],
    ["server, processor time per keystroke", `${server.toFixed(2)} ms`, "0.60 ms"],
    ["database, processor time per keystroke", `${database.toFixed(2)} ms`, "0.50 ms"],
    ["delivery p95", `${(delivered[Math.floor(delivered.length * 0.95)] ?? NaN).toFixed(1)} ms`, ""],
    ["server memory before and with all open", `${before.toFixed(0)} → ${memory.toFixed(0)} MB`, ""],
  ]);
} finally {
  await bench.end();
}
