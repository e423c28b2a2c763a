/**
 * Small updates that would keep Yjs at work for minutes: they are stopped midway, set aside, and their sender is
 * closed. Nobody else waits a second, and nothing of anyone else is lost.
 */
import * as encoding from "lib0/encoding";
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { rows } from "../../../server/data/database.ts";
import { step1, update, type RawSocket } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { paragraphOf } from "./writer.ts";

const stage = setStage();

type Write = (...values: (number | string)[]) => void;
/** An update of one client by hand: numbers as varUint, texts as varString. Info bytes are below 128 or two bytes. */
function structs(client: number, clock: number, count: number, write: (write: Write) => void): Uint8Array {
  const encoder = encoding.createEncoder();
  const put: Write = (...values) => {
    for (const value of values)
      if (typeof value === "string") encoding.writeVarString(encoder, value);
      else encoding.writeVarUint(encoder, value);
  };
  put(1, count, client, clock);
  write(put);
  put(0);
  return encoding.toUint8Array(encoder);
}
/** Bits of the info byte (yjs, src/structs/Item.js): 0x40 names a right neighbour; 4 is text, 7 a node. */
const TEXT = 4;
const NODE = 7;
const RIGHT = 0x40;
const ELEMENT = 3;

/** Each text names the beginning as its left neighbour, and a right one farther off than the one before. */
function farNeighbours(count: number): Uint8Array {
  return structs(7, 0, count + 1, (put) => {
    put(TEXT, 1, FRAGMENT, "r".repeat(count));
    for (let index = 0; index < count; index += 1) put(RIGHT | TEXT, 7, index, "a");
  });
}

/** Element in element. */
function nested(depth: number): Uint8Array {
  return structs(8, 0, depth, (put) => {
    put(NODE, 1, FRAGMENT, ELEMENT, "p");
    for (let index = 1; index < depth; index += 1) put(NODE, 0, 8, index - 1, ELEMENT, "p");
  });
}

/** One long text and many attributes of one writer, then every second letter deleted. */
function tornText(count: number): readonly Uint8Array[] {
  const document = new Y.Doc();
  document.clientID = 9;
  const text = paragraphOf(document);
  const clock = Y.getState(document.store, 9);
  text.insert(0, "r".repeat(2 * count));
  const element = document.getXmlFragment(FRAGMENT).get(0) as Y.XmlElement;
  document.transact(() => {
    for (let index = 0; index < count; index += 1) element.setAttribute(`name${index}`, "value");
  });
  const encoder = encoding.createEncoder();
  for (const value of [0, 1, 9, count]) encoding.writeVarUint(encoder, value);
  for (let index = 0; index < count; index += 1) {
    encoding.writeVarUint(encoder, clock + 2 * index);
    encoding.writeVarUint(encoder, 1);
  }
  return [Y.encodeStateAsUpdate(document), encoding.toUint8Array(encoder)];
}

async function open(socket: RawSocket): Promise<void> {
  socket.send(step1());
  await until("it is synced", () => socket.frames.some(({ step }) => step === 1));
}

const laborious: readonly (readonly [string, () => readonly Uint8Array[]])[] = [
  ["neighbours named far apart", () => [farNeighbours(20_000)]],
  ["nesting of three thousand nodes", () => [nested(3_000)]],
  ["a text torn at forty thousand places", () => tornText(40_000)],
];

describe.each(laborious)("%s", (_name, frames) => {
  test("closes the sender; others go on, and nothing of theirs is lost", async () => {
    const notebookId = await stage.notebook();
    const honest = await stage.write(stage.ada, notebookId);
    honest.type("before. ");
    await honest.allSaved();
    const elsewhere = await stage.notebook();
    const [writer, reader] = [
      await stage.write(stage.ada, elsewhere),
      await stage.write(stage.cleo, elsewhere),
    ];
    const socket = await stage.raw(stage.ben, notebookId);
    await open(socket);
    // Made before the clock runs: server and test share a process.
    const made = frames();
    const watch = { isOn: true };
    const watching = (async () => {
      for (let letters = 1; watch.isOn; letters += 1) {
        writer.type("x");
        await until("the other notebook goes on", () => reader.text().length === letters);
      }
    })();
    for (const frame of made) socket.send(update(frame));
    honest.type("meanwhile. ");
    expect(await socket.closedWith()).toBe(closeCode.malformed);
    await honest.allSaved();
    watch.isOn = false;
    await watching;

    const again = await stage.write(stage.cleo, notebookId);
    expect(again.text()).toContain("before. ");
    expect(again.text()).toContain("meanwhile. ");
    expect(honest.closes.filter(({ code }) => code < 4500)).toEqual([]);
    const aside = await rows(
      stage.server.database,
      "select person_id from document_updates where notebook_id = ? and quarantined_at is not null",
      [notebookId],
    );
    expect(aside).toEqual([{ person_id: stage.ben.id }]);
  });
});

test("what is set aside was shown to nobody, so that nobody sends it back", async () => {
  const notebookId = await stage.notebook();
  const honest = await stage.write(stage.ada, notebookId);
  const socket = await stage.raw(stage.ben, notebookId);
  await open(socket);
  socket.send(update(farNeighbours(20_000)));
  expect(await socket.closedWith()).toBe(closeCode.malformed);
  honest.type("on it goes");
  await honest.allSaved();
  expect(Y.getState(honest.document.store, 7)).toBe(0);
});

test("thousands of paragraphs changed at once are taken, and others do not wait a second", async () => {
  const notebookId = await stage.notebook();
  const elsewhere = await stage.notebook();
  const writer = await stage.write(stage.ada, elsewhere);
  const document = new Y.Doc();
  const texts = Array.from({ length: 20_000 }, () => new Y.XmlText());
  const paragraphs = texts.map((text) => {
    const paragraph = new Y.XmlElement("paragraph");
    paragraph.insert(0, [text]);
    return paragraph;
  });
  document.getXmlFragment(FRAGMENT).insert(0, paragraphs);
  const first = Y.encodeStateAsUpdate(document);
  const before = Y.encodeStateVector(document);
  document.transact(() => texts.forEach((text) => text.insert(0, "x")));
  const socket = await stage.raw(stage.ben, notebookId);
  await open(socket);
  socket.send(update(first));
  await until("they are saved", () => socket.saved() === 1);
  socket.send(update(Y.encodeStateAsUpdate(document, before)));
  writer.type("meanwhile");
  await writer.allSaved();
  await until("they are saved", () => socket.saved() === 2);
});

test("twenty people who wrote the same paragraph offline are all taken in", async () => {
  const notebookId = await stage.notebook();
  const base = new Y.Doc();
  paragraphOf(base).insert(0, "the beginning and the end");
  const socket = await stage.raw(stage.ben, notebookId);
  await open(socket);
  const start = Y.encodeStateAsUpdate(base);
  socket.send(update(start));
  for (let person = 0; person < 20; person += 1) {
    const copy = new Y.Doc();
    Y.applyUpdate(copy, start);
    const text = paragraphOf(copy);
    for (let word = 0; word < 200; word += 1) text.insert((word * 7919) % text.length, `${word} `);
    socket.send(update(Y.encodeStateAsUpdate(copy, Y.encodeStateVector(base))));
  }
  await until("all are saved", () => socket.saved() === 21);
  expect(socket.closed()).toBeNull();
});
