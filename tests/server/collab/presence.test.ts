/** Who is shown to be where: nobody can appear as, change or remove someone else. */
import * as decoding from "lib0/decoding";
import { expect, test } from "vitest";
import { messageType } from "../../../client/contract/collab.ts";
import { Presence } from "../../../server/collab/presence.ts";
import type { Connection } from "../../../server/collab/connection.ts";
import { PRESENCE } from "../../../server/collab/limits.ts";
import { presence, presenceIn } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";

const stage = setStage();

test("name and id are the server's, whatever a state says", async () => {
  const notebookId = await stage.notebook();
  const watcher = await stage.raw(stage.cleo, notebookId);
  const ben = await stage.raw(stage.ben, notebookId);
  ben.send(
    presence([5, 1, { user: { id: stage.ada.id, name: "Ada", color: "url(x)" }, cursor: { anchor: 1 } }]),
  );
  await until("he is seen", () => presenceIn(watcher).has(5));
  expect(presenceIn(watcher).get(5)!.state).toEqual({
    user: { id: stage.ben.id, name: "Ben" },
    cursor: { anchor: 1 },
  });
});

test("nobody changes or removes the state of another", async () => {
  const notebookId = await stage.notebook();
  const watcher = await stage.raw(stage.cleo, notebookId);
  const ada = await stage.raw(stage.ada, notebookId);
  const ben = await stage.raw(stage.ben, notebookId);
  ada.send(presence([5, 1, { place: "hers" }]));
  await until("she is seen", () => presenceIn(watcher).has(5));
  ben.send(presence([5, 900, null]));
  ben.send(presence([5, 901, { place: "his" }]));
  ben.send(presence([6, 1, { place: "his own" }]));
  await until("he is seen", () => presenceIn(watcher).has(6));
  expect(presenceIn(watcher).get(5)!.state).toMatchObject({ place: "hers", user: { name: "Ada" } });
});

test("who leaves is gone for everyone, and who comes back is seen again", async () => {
  const notebookId = await stage.notebook();
  const watcher = await stage.write(stage.cleo, notebookId);
  const ada = await stage.write(stage.ada, notebookId);
  const seen = () => watcher.awareness.getStates().has(ada.document.clientID);
  ada.awareness.setLocalState({ place: "first" });
  await until("she is seen", seen);
  ada.provider.disconnect();
  await until("she is gone", () => !seen());
  ada.provider.connect();
  await until("she is seen again", seen);
});

test("who joins sees who is there, and a page's echo of others changes nothing", async () => {
  const notebookId = await stage.notebook();
  const ada = await stage.write(stage.ada, notebookId);
  ada.awareness.setLocalState({ place: "hers" });
  const ben = await stage.write(stage.ben, notebookId);
  ben.awareness.setLocalState({ place: "his" });
  await until(
    "they see each other",
    () => ada.awareness.getStates().size === 2 && ben.awareness.getStates().size === 2,
  );
  const cleo = await stage.write(stage.cleo, notebookId);
  await until("the third sees both", () => cleo.awareness.getStates().size >= 3);
  expect(cleo.awareness.getStates().get(ada.document.clientID)).toMatchObject({ user: { name: "Ada" } });
  ada.stop();
  await until("she is gone for both", () =>
    [ben, cleo].every(({ awareness }) => !awareness.getStates().has(ada.document.clientID)),
  );
});

test("demoted to reading, a person is shown no longer", async () => {
  const notebookId = await stage.notebook();
  const watcher = await stage.raw(stage.cleo, notebookId);
  const ben = await stage.raw(stage.ben, notebookId);
  ben.send(presence([5, 1, {}]));
  await until("he is seen", () => presenceIn(watcher).get(5)?.state != null);
  await stage.server.database.transaction(async (transaction) => {
    await transaction.raw(
      "update notebook_people set role = 'reader' where notebook_id = ? and person_id = ?",
      [notebookId, stage.ben.id],
    );
    await transaction.raw("select pg_notify('access', ?)", [
      JSON.stringify({ about: "person", notebookId, personId: stage.ben.id }),
    ]);
  });
  await until("he is gone", () => presenceIn(watcher).get(5)?.state === null);
});

/** Stands in for a socket where only time matters. */
function connectionOf(personId: string, sent: Uint8Array[]): Connection {
  const rights = { mayWrite: true, maySendPresence: true, maySeePresence: true };
  const visitor = { as: "member", personId, name: personId, sessionId: "s" };
  return {
    rights,
    visitor,
    isOpen: true,
    backlogBytes: 0,
    send: (frame: Uint8Array) => sent.push(frame),
  } as unknown as Connection;
}

test("a state that is not renewed expires, and the room holds only so many", () => {
  let now = 1_000_000;
  const sent: Uint8Array[] = [];
  const watcher = connectionOf("watcher", sent);
  const states = new Presence({ audience: () => [watcher], now: () => now });
  for (let client = 1; client <= PRESENCE.statesPerRoom + 50; client += 1)
    states.receive(connectionOf(`person-${client}`, []), statesIn(presence([client, 1, {}])));
  const snapshot = states.snapshotFor(watcher)!;
  expect(decoding.readVarUint(decoding.createDecoder(statesIn(snapshot)))).toBe(PRESENCE.statesPerRoom);
  now += PRESENCE.expiresAfterMs + 1;
  states.expire();
  expect(states.snapshotFor(watcher)).toBeNull();
  // What is left of them makes room for others a while later.
  now += PRESENCE.expiresAfterMs + 1;
  states.expire();
  states.receive(connectionOf("late", []), statesIn(presence([9_999, 1, {}])));
  expect(states.snapshotFor(watcher)).not.toBeNull();
  states.stop();
});

/** A presence frame without its type. */
function statesIn(frame: Uint8Array): Uint8Array {
  const decoder = decoding.createDecoder(frame);
  decoding.readVarUint(decoder);
  return decoding.readVarUint8Array(decoder);
}

test("someone alone hears from the server often enough for y-websocket to stay", async () => {
  const socket = await stage.raw(stage.ada, await stage.notebook());
  const before = socket.frames.length;
  await until("a heartbeat comes", () => socket.frames.length > before, 15_000);
  expect(socket.frames.at(-1)).toEqual({ type: messageType.awareness, bytes: Uint8Array.of(0) });
}, 20_000);
