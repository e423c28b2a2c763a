/** Frames that no honest page sends: their sender is closed, and nobody else notices. */
import { randomBytes } from "node:crypto";
import * as encoding from "lib0/encoding";
import { beforeAll, describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT, messageType } from "../../../client/contract/collab.ts";
import { firstRow } from "../../../server/data/database.ts";
import { addPerson, type CastPerson } from "./cast.ts";
import { presence, presenceIn, step1, step2, sync, update } from "./raw-socket.ts";
import { seededRandom } from "./seeded-random.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { paragraphOf } from "./writer.ts";

const stage = setStage();

/** Someone new for every attack: who goes on attacking is kept out (guests.test.ts). */
async function scene() {
  const mallory = await addPerson(stage.server.database, "Mallory");
  const notebookId = await stage.notebook([
    [stage.ada, "owner"],
    [stage.cleo, "reader"],
    [mallory, "author"],
  ]);
  return { mallory, notebookId };
}

const documentWith = (change: (document: Y.Doc) => void): Uint8Array => {
  const document = new Y.Doc();
  change(document);
  return Y.encodeStateAsUpdate(document);
};
const sentence = (text: string) => documentWith((document) => paragraphOf(document).insert(0, text));

/** An update written by hand: so many clients with their structs, then deletions. */
function handmade(write: (encoder: encoding.Encoder) => void): Uint8Array {
  const encoder = encoding.createEncoder();
  write(encoder);
  return encoding.toUint8Array(encoder);
}
const numbers = (...values: number[]) =>
  handmade((encoder) => values.forEach((value) => encoding.writeVarUint(encoder, value)));

/** Two items, each to the right of the other: no order of integration exists. */
const circle = handmade((encoder) => {
  encoding.writeVarUint(encoder, 2);
  for (const [client, other] of [
    [1, 2],
    [2, 1],
  ] as const) {
    for (const value of [1, client, 0]) encoding.writeVarUint(encoder, value);
    encoding.writeUint8(encoder, 0x84); // a string with an origin
    for (const value of [other, 0]) encoding.writeVarUint(encoder, value);
    encoding.writeVarString(encoder, "x");
  }
  encoding.writeVarUint(encoder, 0);
});
/** An item whose origin is itself. */
const itself = handmade((encoder) => {
  for (const value of [1, 1, 1, 0]) encoding.writeVarUint(encoder, value);
  encoding.writeUint8(encoder, 0x84);
  for (const value of [1, 0]) encoding.writeVarUint(encoder, value);
  encoding.writeVarString(encoder, "x");
  encoding.writeVarUint(encoder, 0);
});

const hostile: readonly (readonly [string, () => Uint8Array, number])[] = [
  ["nothing", () => new Uint8Array(0), closeCode.malformed],
  ["noise", () => randomBytes(2_000), closeCode.malformed],
  ["an unknown message", () => Uint8Array.of(42), closeCode.malformed],
  ["an unknown sync step", () => Uint8Array.of(0, 9, 0), closeCode.malformed],
  ["our own messages", () => Uint8Array.of(messageType.saved, 5), closeCode.malformed],
  ["a message cut short", () => sync(2, sentence("x")).subarray(0, 12), closeCode.malformed],
  [
    "a message with something behind it",
    () => Buffer.concat([update(sentence("x")), Buffer.of(7)]),
    closeCode.malformed,
  ],
  ["a state vector that lies about its size", () => sync(0, numbers(2 ** 31)), closeCode.malformed],
  ["a step 2 of noise", () => step2(randomBytes(500)), closeCode.malformed],
  ["an update of noise", () => update(randomBytes(500)), closeCode.malformed],
  [
    "an update that promises a billion structs",
    () => update(numbers(1, 1_000_000_000, 7, 0)),
    closeCode.malformed,
  ],
  ["a struct that follows itself", () => update(itself), closeCode.malformed],
  ["a struct of no length", () => update(numbers(1, 1, 7, 0, 0, 0, 0)), closeCode.malformed],
  ["a clock beyond all typing", () => update(numbers(1, 1, 7, 0, 0, 2 ** 50, 0)), closeCode.malformed],
  ["a deletion of nothing", () => update(numbers(0, 1, 7, 1, 0, 0)), closeCode.malformed],
  [
    "another root than the document's",
    () => update(documentWith((document) => document.getMap("other").set("a", 1))),
    closeCode.malformed,
  ],
  [
    "a document in the document",
    () =>
      update(
        documentWith((document) => {
          const element = new Y.XmlElement("paragraph");
          document.getXmlFragment(FRAGMENT).insert(0, [element]);
          element.setAttribute("inner", new Y.Doc() as unknown as string);
        }),
      ),
    closeCode.malformed,
  ],
  ["presence of noise", () => Uint8Array.of(1, 5, 9, 9, 9, 9, 9), closeCode.malformed],
  [
    "presence of thousands at once",
    () => presence(...Array.from({ length: 5_000 }, (_, clock) => [5, clock, {}] as const)),
    closeCode.malformed,
  ],
  [
    "a change of a million parts",
    () =>
      update(
        handmade((encoder) => {
          for (const value of [1, 1_000_000, 99, 0]) encoding.writeVarUint(encoder, value);
          for (let count = 0; count < 1_000_000; count += 1)
            for (const value of [0, 1]) encoding.writeVarUint(encoder, value);
          encoding.writeVarUint(encoder, 0);
        }),
      ),
    closeCode.malformed,
  ],
  [
    "a state vector of a client that is not there, from the future, cut short",
    () => sync(0, numbers(3, 5, 2 ** 40)),
    closeCode.malformed,
  ],
  ["a change of 5 MB", () => update(sentence("x".repeat(5_000_000))), closeCode.tooLarge],
  ["more than the socket takes", () => update(sentence("x".repeat(9_000_000))), 1009],
];

let quietNotebookId: string;
beforeAll(async () => {
  quietNotebookId = await stage.notebook();
});

describe.each(hostile)("%s", (_name, frame, code) => {
  test("closes its sender and leaves the others undisturbed", async () => {
    const { mallory, notebookId } = await scene();
    const honest = await stage.write(stage.ada, notebookId);
    const colleague = await stage.write(stage.cleo, notebookId);
    const elsewhere = await stage.write(stage.ada, quietNotebookId);
    const socket = await stage.raw(mallory, notebookId);
    socket.send(frame());
    honest.type("meanwhile");
    elsewhere.type("x");
    await until("the others go on", () => colleague.text() === "meanwhile");
    await elsewhere.allSaved();
    expect(await socket.closedWith()).toBe(code);
    expect(socket.closed()?.reason).not.toBe(code === 1009 ? null : "");
    expect([...honest.closes, ...colleague.closes, ...elsewhere.closes]).toEqual([]);
    const row = await firstRow<{ count: string }>(
      stage.server.database,
      "select count(*) from document_updates where notebook_id = ? and person_id = ?",
      [notebookId, mallory.id],
    );
    expect(row!.count).toBe("0");
  });
});

test("text instead of bytes closes its sender", async () => {
  const socket = await stage.raw(stage.ben, await stage.notebook());
  socket.socket.send("hello");
  expect(await socket.closedWith()).toBe(closeCode.malformed);
});

test("a broken WebSocket frame ends that socket and not the process", async () => {
  const socket = await stage.raw(stage.ben, await stage.notebook());
  const { _socket: stream } = socket.socket as unknown as { _socket: NodeJS.WritableStream };
  stream.write(Buffer.from([0xff, 0xff, 0xff, 0xff]));
  await until("it is closed", () => socket.closed() !== null);
  expect((await stage.write(stage.ben, await stage.notebook())).provider.synced).toBe(true);
});

test("updates that wait for each other in a circle are kept back, refused in the end, and never stored", async () => {
  const notebookId = await stage.notebook();
  const socket = await stage.raw(stage.ben, notebookId);
  socket.send(update(circle));
  const honest = await stage.write(stage.ada, notebookId);
  honest.type("meanwhile");
  await honest.allSaved();
  expect(socket.saved()).toBe(0);
  const rooms = stage.server.collab.rooms.find(notebookId)!;
  expect(rooms.taking!.document.document.store.pendingStructs).toBeNull();
  rooms.tick(Date.now() + 60_000);
  await until("it is refused", () => socket.notices().some(({ about }) => about === "rejected"));
});

test("three thousand updates that name an unknown client stall nobody", async () => {
  const notebookId = await stage.notebook();
  const honest = await stage.write(stage.ada, notebookId);
  const colleague = await stage.write(stage.cleo, notebookId);
  const socket = await stage.raw(stage.ben, notebookId);
  for (let clock = 1; clock <= 3_000; clock += 1) socket.send(update(numbers(1, 1, 99, clock, 0, 1, 0)));
  const start = performance.now();
  honest.type("meanwhile");
  await until("the others go on", () => colleague.text() === "meanwhile");
  expect(performance.now() - start).toBeLessThan(1_000);
  expect(await socket.closedWith()).toBe(closeCode.malformed);
});

describe("a large update that waits", () => {
  /** Sixty thousand structs of client 99, from its clock 5 on. */
  const large = handmade((encoder) => {
    for (const value of [1, 60_000, 99, 5]) encoding.writeVarUint(encoder, value);
    for (let count = 0; count < 60_000; count += 1)
      for (const value of [0, 1]) encoding.writeVarUint(encoder, value);
    encoding.writeVarUint(encoder, 0);
  });
  const typing = () => {
    const document = new Y.Doc();
    const updates: Uint8Array[] = [];
    document.on("update", (bytes) => updates.push(bytes));
    const text = paragraphOf(document);
    for (let letter = 0; letter < 1_000; letter += 1) text.insert(0, "x");
    return updates;
  };

  test("is not looked at again with every letter that has nothing to do with it", async () => {
    const notebookId = await stage.notebook();
    const elsewhere = await stage.write(stage.ada, await stage.notebook());
    const socket = await stage.raw(stage.ben, notebookId);
    const updates = typing();
    socket.send(update(large));
    for (const bytes of updates) socket.send(update(bytes));
    const start = performance.now();
    elsewhere.type("meanwhile");
    await elsewhere.allSaved();
    expect(performance.now() - start).toBeLessThan(1_000);
    const { rooms } = stage.server.collab;
    await until(
      "the letters are stored",
      () => (rooms.find(notebookId)?.taking?.document.lastSeq ?? 0) === updates.length,
    );
  });

  test("is taken as soon as what it waits for is there", async () => {
    const socket = await stage.raw(stage.ben, await stage.notebook());
    socket.send(update(large));
    socket.send(update(numbers(1, 1, 99, 0, 0, 5, 0)));
    await until("both are saved", () => socket.saved() === 2);
  });

  test("closes its sender when it waits for one thing after another", async () => {
    const socket = await stage.raw(stage.ben, await stage.notebook());
    const clients = Array.from({ length: 40 }, (_, index) => 200 + index);
    const builds = handmade((encoder) => {
      for (const value of [1, clients.length, 99, 0]) encoding.writeVarUint(encoder, value);
      for (const client of clients) {
        encoding.writeUint8(encoder, 0x84); // a string with an origin
        for (const value of [client, 0]) encoding.writeVarUint(encoder, value);
        encoding.writeVarString(encoder, "x");
      }
      encoding.writeVarUint(encoder, 0);
    });
    socket.send(update(builds));
    for (const client of clients) socket.send(update(numbers(1, 1, client, 0, 0, 1, 0)));
    expect(await socket.closedWith()).toBe(closeCode.malformed);
  });
});

test("asking for the whole document again and again is too fast", async () => {
  const socket = await stage.raw(stage.cleo, await stage.notebook());
  for (let count = 0; count < 30; count += 1) socket.send(step1());
  expect(await socket.closedWith()).toBe(closeCode.tooFast);
});

test("updates spoiled at random never end the process, nor leave pending structs", async () => {
  const seed = Number(process.env["SPOIL_SEED"] ?? Date.now() % 1_000_000);
  console.info(`SPOIL_SEED=${seed}`);
  const random = seededRandom(seed);
  const attackers: CastPerson[] = [];
  for (let count = 0; count < 12; count += 1)
    attackers.push(await addPerson(stage.server.database, "Mallory"));
  const notebookId = await stage.notebook([
    [stage.ada, "owner"],
    ...attackers.map((person) => [person, "author"] as const),
  ]);
  const honest = await stage.write(stage.ada, notebookId);
  honest.type("some text to build on");
  await honest.allSaved();
  const good = Y.encodeStateAsUpdate(honest.document);
  for (let attempt = 0; attempt < 60; attempt += 1) {
    const bad = Uint8Array.from(good);
    for (let spoiled = 0; spoiled < 3; spoiled += 1)
      bad[Math.floor(random() * bad.length)] = Math.floor(random() * 256);
    const socket = await stage.raw(attackers[attempt % attackers.length]!, notebookId);
    socket.send(update(bad));
    socket.send(step1());
    await until(
      "it is answered or closed",
      () => socket.closed() !== null || socket.frames.some(({ step }) => step === 1),
    );
    socket.stop();
  }
  expect(honest.closes.filter(({ code }) => code < 4500)).toEqual([]);
  await until("it can be read", () => stage.server.collab.rooms.find(notebookId)?.taking != null);
  expect(
    stage.server.collab.rooms.find(notebookId)!.taking!.document.document.store.pendingStructs,
  ).toBeNull();
});

describe("presence", () => {
  test("too large a state, a list, or too many at once: not shown", async () => {
    const notebookId = await stage.notebook();
    const watcher = await stage.raw(stage.ada, notebookId);
    const socket = await stage.raw(stage.ben, notebookId);
    socket.send(presence([1, 1, { note: "x".repeat(5_000) }]));
    socket.send(presence([2, 1, ["list"]]));
    socket.send(presence([3, 1, { ok: true }], [4, 1, { ok: true }]));
    await until("the good one is seen", () => presenceIn(watcher).has(3));
    expect([...presenceIn(watcher).keys()]).toEqual([3]);
  });
});
