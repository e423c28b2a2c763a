/** node --import tsx tests/bench/opening.ts: how long a notebook with a long history takes to open, cold. */
import * as Y from "yjs";
import { startBenchServer } from "./bench-server.ts";
import type { CastPerson } from "../server/collab/cast.ts";
import { columns, median } from "./figures.ts";
import { longHistory, store } from "./long-history.ts";
import { memoryMegabytes } from "./processor-time.ts";
import { joinRoom } from "./typing-crowd.ts";

const cases = [
  { edits: 200_000, rowsLeft: 400, promised: "2 × + 0.5 s" },
  { edits: 200_000, rowsLeft: 200_000, promised: "(none: nothing folded)" },
  { edits: 1_000_000, rowsLeft: 400, promised: "2.5 ×" },
] as const;

const ROUNDS = 3;

const bench = await startBenchServer(1);

/** Several notebooks with one history, which itself is let go. */
async function stored(person: CastPerson, edits: number, rowsLeft: number) {
  const updates = longHistory(edits);
  const notebooks: string[] = [];
  let whole: Uint8Array = new Uint8Array();
  for (let round = 0; round < ROUNDS; round += 1) {
    const notebookId = await bench.notebook([person]);
    whole = await store(bench.database, notebookId, updates, rowsLeft);
    notebooks.push(notebookId);
  }
  return { notebooks, whole };
}

try {
  const [person] = bench.people;
  if (person === undefined) throw new Error("nobody is there");
  // What a server that has been running has compiled already.
  (await joinRoom(bench.address(person, await bench.notebook([person])))).socket.terminate();
  const table = [
    ["edits, of them rows", "bytes", "client alone", "open, cold", "ratio", "promised", "server memory"],
  ];
  for (const { edits, rowsLeft, promised } of cases) {
    const { notebooks, whole } = await stored(person, edits, rowsLeft);
    const alones: number[] = [];
    const opens: number[] = [];
    // By turns, each notebook for the first time: what this process has compiled and must tidy up is the same for both.
    for (const notebookId of notebooks) {
      let start = performance.now();
      Y.applyUpdate(new Y.Doc(), whole);
      alones.push(performance.now() - start);
      start = performance.now();
      const { socket } = await joinRoom(bench.address(person, notebookId));
      opens.push(performance.now() - start);
      socket.terminate();
    }
    const [alone, open] = [median(alones), median(opens)];
    table.push([
      `${edits}, ${rowsLeft}`,
      `${(whole.length / 1e6).toFixed(1)} MB`,
      `${alone.toFixed(0)} ms`,
      `${open.toFixed(0)} ms`,
      (open / alone).toFixed(2),
      promised,
      `${memoryMegabytes(bench.child.pid).toFixed(0)} MB`,
    ]);
  }
  console.log(
    "from the request for a socket to the whole document in the client, that client's own work included\n",
  );
  columns(table);
} finally {
  await bench.end();
}
