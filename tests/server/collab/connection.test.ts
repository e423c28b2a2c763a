/** One socket by itself: who is alive, who reads too slowly, and how it is closed. */
import { createServer } from "node:http";
import { once } from "node:events";
import type { AddressInfo } from "node:net";
import { pino } from "pino";
import { afterEach, expect, test } from "vitest";
import { WebSocket, WebSocketServer } from "ws";
import { closeCode } from "../../../client/contract/collab.ts";
import { Connection } from "../../../server/collab/connection.ts";
import { LARGEST_BACKLOG_BYTES } from "../../../server/collab/limits.ts";
import { SavedPrefix } from "../../../server/collab/saved-prefix.ts";
import { rightsOfReferee } from "../../../server/collab/visitor.ts";
import { until } from "./until.ts";

const ends: (() => void)[] = [];
afterEach(() => {
  for (const end of ends.splice(0)) end();
});

async function connect(): Promise<{ connection: Connection; client: WebSocket }> {
  const server = createServer();
  const sockets = new WebSocketServer({ server });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const accepted = once(sockets, "connection");
  const client = new WebSocket(`ws://127.0.0.1:${(server.address() as AddressInfo).port}`);
  const [socket] = (await accepted) as [WebSocket];
  await until("it is open", () => client.readyState === WebSocket.OPEN);
  ends.push(() => {
    client.terminate();
    sockets.close();
    server.close();
  });
  const connection = new Connection({
    socket,
    notebookId: "n",
    visitor: { as: "referee", refereeLinkId: "r", hideAuthors: false },
    rights: rightsOfReferee(false),
    schemaVersion: 1,
    log: pino({ level: "silent" }),
  });
  return { connection, client };
}
const times = { silentForMs: 10_000, deadAfterMs: 45_000 };

test("someone who is told much and says nothing is asked whether they are there, and stays", async () => {
  const { connection, client } = await connect();
  const pinged = once(client, "ping");
  const before = connection.lastHeardAt;
  connection.send(Uint8Array.of(1));
  connection.keepAlive(Date.now() + 20_000, times);
  await pinged;
  await until("the answer is heard", () => connection.lastHeardAt > before);
  expect(connection.isOpen).toBe(true);
});

test("someone who does not answer is given up", async () => {
  const { connection, client } = await connect();
  const closed = once(client, "close");
  connection.keepAlive(Date.now() + 46_000, times);
  const [code] = (await closed) as [number];
  expect(code).toBe(1006);
});

test("someone whose frames we leave unread is not taken for dead", async () => {
  const { connection } = await connect();
  connection.hold();
  connection.keepAlive(Date.now() + 46_000, times);
  expect(connection.isOpen).toBe(true);
});

test("a reader that never reads is dropped before much waits for it", async () => {
  const { connection, client } = await connect();
  client.pause();
  let ended = false;
  connection.onEnd(() => (ended = true));
  const frame = new Uint8Array(1024 * 1024);
  let most = 0;
  for (let count = 0; count < 40; count += 1) {
    connection.send(frame);
    most = Math.max(most, connection.backlogBytes);
  }
  expect(connection.isOpen).toBe(false);
  expect(most).toBeLessThanOrEqual(LARGEST_BACKLOG_BYTES + 2 * frame.length);
  await until("its socket is gone", () => ended);
});

test("closing says why, once, and hears nothing more", async () => {
  const { connection, client } = await connect();
  const closed = once(client, "close");
  const frames: Uint8Array[] = [];
  connection.onFrame((frame) => frames.push(frame));
  connection.close(closeCode.forbidden, "first");
  connection.close(closeCode.malformed, "second");
  client.send(Uint8Array.of(1));
  const [code, reason] = (await closed) as [number, Buffer];
  expect([code, reason.toString(), frames]).toEqual([closeCode.forbidden, "first", []]);
});

test("frames count as saved only without a gap", () => {
  const saved = new SavedPrefix();
  const [first, second, third] = [saved.take(), saved.take(), saved.take()];
  saved.commit(second);
  expect(saved.count).toBe(0);
  saved.commit(first);
  expect(saved.count).toBe(2);
  saved.commit(first);
  saved.commit(third);
  expect(saved.count).toBe(3);
});
