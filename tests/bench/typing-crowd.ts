/** People who type in one notebook, and how long each keystroke takes to each of the others. */
import { setTimeout as sleep } from "node:timers/promises";
import * as decoding from "lib0/decoding";
import WebSocket from "ws";
import * as Y from "yjs";
import { step1, update as updateFrame } from "../server/collab/raw-socket.ts";
import { until } from "../server/collab/until.ts";
import { paragraphOf } from "../server/collab/writer.ts";

export interface CrowdOptions {
  readonly addresses: readonly { readonly url: string; readonly headers: Readonly<Record<string, string>> }[];
  /** Per person and second. */
  readonly keystrokes: number;
  readonly warmUpMs: number;
  readonly measureMs: number;
}
interface Person {
  readonly socket: WebSocket;
  readonly document: Y.Doc;
}

/** Milliseconds from a keystroke to its being in the document of another, one entry for each other person. */
export async function measureDelivery(options: CrowdOptions): Promise<readonly number[]> {
  const typedAt = new Map<string, number>();
  const times: number[] = [];
  let measuring = false;
  let expected = 0;
  const people = await Promise.all(options.addresses.map(joinRoom));
  const [first] = people;
  if (first === undefined) throw new Error("nobody types");
  paragraphOf(first.document);
  await until("all have the paragraph", () =>
    people.every(({ document }) => document.store.clients.size > 0),
  );
  for (const { document } of people)
    document.on("update", (_update, origin, _document, { beforeState, afterState }: Y.Transaction) => {
      if (origin !== "network") return;
      const now = performance.now();
      for (const [client, after] of afterState)
        for (let clock = beforeState.get(client) ?? 0; clock < after; clock += 1) {
          const start = typedAt.get(`${client}:${clock}`);
          if (start !== undefined) times.push(now - start);
        }
    });
  const timers = people.map(({ document }, index) => {
    const everyMs = 1_000 / options.keystrokes;
    const type = () => {
      const text = paragraphOf(document);
      const clock = Y.getState(document.store, document.clientID);
      if (measuring) {
        typedAt.set(`${document.clientID}:${clock}`, performance.now());
        expected += people.length - 1;
      }
      text.insert(Math.floor(text.length / 2), "x");
    };
    let timer: NodeJS.Timeout | undefined;
    // Spread over the interval: people do not type in step.
    const start = setTimeout(() => (timer = setInterval(type, everyMs)), (everyMs * index) / people.length);
    return () => {
      clearTimeout(start);
      clearInterval(timer);
    };
  });
  await sleep(options.warmUpMs);
  measuring = true;
  await sleep(options.measureMs);
  measuring = false;
  for (const stop of timers) stop();
  await until("all has arrived", () => times.length === expected, 30_000);
  for (const { socket } of people) socket.terminate();
  return times;
}

/** Someone who has the whole document. */
export async function joinRoom({ url, headers }: CrowdOptions["addresses"][number]): Promise<Person> {
  const document = new Y.Doc();
  const socket = new WebSocket(url, { headers, perMessageDeflate: false });
  let isSynced = false;
  socket.on("message", (data: Buffer) => {
    const decoder = decoding.createDecoder(data);
    if (decoding.readVarUint(decoder) !== 0) return;
    const step = decoding.readVarUint(decoder);
    if (step === 0) return;
    Y.applyUpdate(document, decoding.readVarUint8Array(decoder), "network");
    isSynced ||= step === 1;
  });
  document.on("update", (update: Uint8Array, origin: unknown) => {
    if (origin !== "network") socket.send(updateFrame(update));
  });
  await new Promise((resolve, reject) => socket.once("open", resolve).once("error", reject));
  socket.send(step1(document));
  await until("the document is there", () => isSynced, 60_000);
  return { socket, document };
}
