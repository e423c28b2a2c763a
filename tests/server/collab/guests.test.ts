/** One person's share of the server, over all their sockets and notebooks. */
import { describe, expect, test } from "vitest";
import * as encoding from "lib0/encoding";
import type { Connection } from "../../../server/collab/connection.ts";
import { Guests } from "../../../server/collab/guests.ts";
import { CONNECTIONS_PER_GUEST, EFFORT, OFFENCES } from "../../../server/collab/limits.ts";
import { closeCode } from "../../../client/contract/collab.ts";
import { addPerson } from "./cast.ts";
import { update, upgradeStatus } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";

/** What the guests know of a connection. */
function fakeConnection(personId: string) {
  const held = new Set<string>();
  const visitor = { as: "member", personId, name: personId, sessionId: "s" } as const;
  const connection = {
    visitor,
    hold: (reason: string) => void held.add(reason),
    release: (reason: string) => void held.delete(reason),
  } as unknown as Connection; // no more of it is used
  return { connection, visitor, held };
}

describe("the share of one guest", () => {
  test("work beyond it is waited for on every socket of theirs, and on nobody else's", async () => {
    const guests = new Guests(() => 0);
    const [one, two, other] = [fakeConnection("ada"), fakeConnection("ada"), fakeConnection("ben")];
    for (const { connection } of [one, two, other]) guests.enter(connection);
    guests.spend(one.connection, EFFORT.most - 50);
    expect([one.held.size, two.held.size]).toEqual([0, 0]);
    guests.spend(one.connection, 60);
    expect([one.held.size, two.held.size, other.held.size]).toEqual([1, 1, 0]);
    await until("it is paid off", () => one.held.size === 0 && two.held.size === 0);
    guests.stop();
  });

  test("sockets are counted over all notebooks", () => {
    const guests = new Guests();
    const { visitor } = fakeConnection("ada");
    for (let count = 0; count < CONNECTIONS_PER_GUEST; count += 1) {
      expect(guests.mayEnter(visitor)).toBe(true);
      guests.enter(fakeConnection("ada").connection);
    }
    expect(guests.mayEnter(visitor)).toBe(false);
    expect(guests.mayEnter(fakeConnection("ben").visitor)).toBe(true);
    guests.stop();
  });

  test("who offends again and again is kept out for a while, and then forgiven", () => {
    let now = 1_000_000;
    const guests = new Guests(() => now);
    const { connection, visitor } = fakeConnection("ada");
    for (let count = 0; count < OFFENCES.most; count += 1) {
      expect(guests.mayEnter(visitor)).toBe(true);
      guests.offend(connection);
    }
    expect(guests.mayEnter(visitor)).toBe(false);
    now += OFFENCES.keptOutMs + 1;
    expect(guests.mayEnter(visitor)).toBe(true);
    now += OFFENCES.rememberedMs;
    guests.tidy();
    guests.offend(connection);
    expect(guests.mayEnter(visitor)).toBe(true);
    guests.stop();
  });
});

describe("on a running server", () => {
  const stage = setStage();

  test("a repeated attacker is told to come back later; their colleague is not", async () => {
    const mallory = await addPerson(stage.server.database, "Mallory");
    const notebookId = await stage.notebook([
      [stage.ada, "owner"],
      [mallory, "author"],
    ]);
    const honest = await stage.write(stage.ada, notebookId);
    for (let count = 0; count < OFFENCES.most; count += 1) {
      const socket = await stage.raw(mallory, notebookId);
      socket.send(Uint8Array.of(42));
      expect(await socket.closedWith()).toBe(closeCode.malformed);
    }
    const at = { port: stage.server.port, notebookId };
    expect(await upgradeStatus({ ...at, cookie: mallory.cookie })).toBe(429);
    expect(await upgradeStatus({ ...at, cookie: stage.ada.cookie })).toBe(101);
    expect(honest.closes).toEqual([]);
  });

  test("large changes with nothing new in them, sent over and over, keep nobody else waiting for long", async () => {
    const mallory = await addPerson(stage.server.database, "Mallory");
    const notebookId = await stage.notebook([[mallory, "owner"]]);
    const elsewhere = await stage.write(stage.ada, await stage.notebook());
    const encoder = encoding.createEncoder();
    for (const value of [1, 250_000, 99, 0]) encoding.writeVarUint(encoder, value);
    for (let count = 0; count < 250_000; count += 1)
      for (const value of [0, 1]) encoding.writeVarUint(encoder, value);
    encoding.writeVarUint(encoder, 0);
    const known = update(encoding.toUint8Array(encoder));
    const sockets = await Promise.all(Array.from({ length: 8 }, () => stage.raw(mallory, notebookId)));
    for (let round = 0; round < 10; round += 1) for (const socket of sockets) socket.send(known);
    const waits: number[] = [];
    for (let letter = 0; letter < 30; letter += 1) {
      const start = performance.now();
      elsewhere.type("x");
      await elsewhere.allSaved();
      waits.push(performance.now() - start);
    }
    // They were slowed down in the middle: not one of them has been through all of theirs by now.
    expect(sockets.some((socket) => socket.saved() < 10)).toBe(true);
    console.info(`longest wait ${Math.max(...waits).toFixed(0)} ms`);
    expect(elsewhere.closes).toEqual([]);
  });
});
