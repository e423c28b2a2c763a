/** node --import tsx tests/bench/reconnect-storm.ts: 200 people come back at once with nothing, while someone types. */
import { fork } from "node:child_process";
import { once } from "node:events";
import { join } from "node:path";
import WebSocket from "ws";
import { openRaw, step1, step2 } from "../server/collab/raw-socket.ts";
import { until } from "../server/collab/until.ts";
import { openWriter } from "../server/collab/writer.ts";
import { startBenchServer } from "./bench-server.ts";
import { columns, median } from "./figures.ts";
import { longHistory, store } from "./long-history.ts";
import { memoryMegabytes } from "./processor-time.ts";

const PEOPLE = 200;
const EDITS = 50_000;
const ROUNDS = 3;

/** Until every one of them has received the document; nobody's own work with it is counted. */
async function storm(
  addresses: readonly { url: string; headers: Record<string, string> }[],
): Promise<number> {
  const start = performance.now();
  const hello = step1();
  await Promise.all(
    addresses.map(async ({ url, headers }) => {
      const socket = new WebSocket(url, { headers, perMessageDeflate: false });
      const received = new Promise<void>((resolve, reject) => {
        socket.on("error", reject);
        socket.on("message", (data: Buffer) => {
          if (data[0] === 0 && data[1] === 1) resolve();
        });
      });
      await once(socket, "open");
      socket.send(hello);
      await received;
      socket.terminate();
    }),
  );
  return performance.now() - start;
}

const bench = await startBenchServer(PEOPLE + 1);
const control = fork(join(import.meta.dirname, "blob-server.ts"), { execArgv: process.execArgv });
await once(control, "message");
try {
  const [typist, ...people] = bench.people;
  if (typist === undefined) throw new Error("nobody is there");
  const notebookId = await bench.notebook(bench.people);
  const whole = await store(bench.database, notebookId, longHistory(EDITS), 400);
  control.send(Buffer.from(step2(whole)).toString("base64"));
  const [{ port }] = (await once(control, "message")) as [{ port: number }]; // see blob-server.ts
  const writer = openWriter({ port: bench.child.port, notebookId, cookie: typist.cookie });
  await writer.synced();
  const watcher = await openRaw({ port: bench.child.port, notebookId, cookie: typist.cookie });
  watcher.send(step1());
  await until("the watcher has it", () => watcher.frames.some(({ step }) => step === 1));
  const ours: number[] = [];
  const theirs: number[] = [];
  const waits: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    theirs.push(await storm(people.map(() => ({ url: `ws://127.0.0.1:${port}/`, headers: {} }))));
    const typing = new AbortController();
    const typed = (async () => {
      while (!typing.signal.aborted) {
        const start = performance.now();
        writer.type("x");
        await writer.allSaved();
        waits.push(performance.now() - start);
        await new Promise((resolve) => setTimeout(resolve, 50));
      }
    })();
    ours.push(await storm(people.map((person) => bench.address(person, notebookId))));
    typing.abort();
    await typed;
  }
  const [mine, control_] = [median(ours), median(theirs)];
  console.log(`${PEOPLE} people at once, ${(whole.length / 1e6).toFixed(2)} MB for each\n`);
  columns([
    ["", "measured", "control", "ratio", "promised"],
    [
      "all have the document",
      `${mine.toFixed(0)} ms`,
      `${control_.toFixed(0)} ms`,
      (mine / control_).toFixed(2),
      "3",
    ],
    ["a typist's longest wait meanwhile", `${Math.max(...waits).toFixed(0)} ms`, "", "", "1000 ms"],
    ["server memory afterwards", `${memoryMegabytes(bench.child.pid).toFixed(0)} MB`, "", "", ""],
  ]);
  writer.stop();
  watcher.stop();
} finally {
  control.kill("SIGTERM");
  await bench.end();
}
