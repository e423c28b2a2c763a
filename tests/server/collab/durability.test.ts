/** What is committed when: "saved", broadcasts, offline edits, a store that is slow, away or forgetful. */
import { afterEach, describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { openDocumentStore } from "../../../server/collab/document-store.ts";
import { pino } from "pino";
import { openDatabase, rows } from "../../../server/data/database.ts";
import { openRaw, step1, step2, update } from "./raw-socket.ts";
import { makeSlow, type Door, type SlowStore } from "./slow-store.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { openWriter, paragraphOf, textOf, type Writer } from "./writer.ts";

let store: SlowStore;
const stage = setStage({
  retry: { firstMs: 10, longestMs: 40 },
  with: (database, databaseUrl) => ({
    store: (store = makeSlow(openDocumentStore({ database, databaseUrl, log: pino({ level: "silent" }) }))),
  }),
});
const doors: readonly Door[] = ["load", "append", "readAfter", "saveState", "quarantine"];
afterEach(() => {
  for (const door of doors) {
    store.fail(door, null);
    store.open(door);
  }
});

const stored = async (notebookId: string) => {
  const document = new Y.Doc();
  for (const { update: bytes } of await rows<{ update: Buffer }>(
    stage.server.database,
    "select update from document_updates where notebook_id = ? order by seq",
    [notebookId],
  ))
    Y.applyUpdate(document, bytes);
  return textOf(document);
};
const roomOf = (notebookId: string) => stage.server.collab.rooms.find(notebookId);
const gone = (writer: Writer) => !writer.provider.wsconnected;
const connectionLost = Object.assign(new Error("the connection was lost"), { code: "ECONNRESET" });

describe("saved means committed", () => {
  test("nothing is acknowledged or shown while it is not", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    await first.allSaved();
    const before = first.saved();
    store.shut("append");
    const calls = store.calls("append");
    first.type("in between");
    await until("it is being stored", () => store.calls("append") > calls);
    const joining = await stage.write(stage.cleo, notebookId);
    expect([first.saved(), second.text(), joining.text()]).toEqual([before, "", ""]);
    store.open("append");
    await first.allSaved();
    expect(await stored(notebookId)).toBe("in between");
    await until("the others see it", () => second.text() === "in between" && joining.text() === "in between");
  });

  test("each time the count rises, that many are stored", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    const frames: string[] = [];
    let text = "";
    for (const letter of "power counting is a matter of bookkeeping") {
      writer.type(letter);
      text += letter;
      frames[writer.sent()] = text;
      await new Promise(setImmediate);
      const expected = frames[writer.saved()] ?? "";
      expect((await stored(notebookId)).startsWith(expected)).toBe(true);
    }
    await writer.allSaved();
    expect(await stored(notebookId)).toBe(text);
  });

  test("many updates share one insert, in the order they came", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    await writer.allSaved();
    store.shut("append");
    const calls = store.calls("append");
    const letters = Array.from({ length: 300 }, (_, index) => String.fromCharCode(97 + (index % 26)));
    for (const letter of letters) writer.type(letter);
    await until("all have arrived", () => store.calls("append") > calls);
    const seen = await stage.raw(stage.ben, notebookId);
    seen.send(step1());
    store.open("append");
    await writer.allSaved();
    expect(store.calls("append") - calls).toBeLessThan(20);
    expect(await stored(notebookId)).toBe(letters.join(""));
    await until("the other has all of it", () => textOf(seen.document) === letters.join(""));
  });

  test("a deletion counts too, though it changes no state vector", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("abcdef");
    await writer.allSaved();
    const before = writer.saved();
    writer.erase(3);
    await until("it is saved", () => writer.saved() === before + 1);
    expect(await stored(notebookId)).toBe("def");
  });

  test("writers are slowed down when the store is, and nothing is lost", async () => {
    const notebookId = await stage.notebook();
    const socket = await stage.raw(stage.ada, notebookId);
    store.shut("append");
    const document = new Y.Doc();
    document.on("update", (bytes: Uint8Array) => socket.send(update(bytes)));
    const fragment = document.getXmlFragment(FRAGMENT);
    // One long string would measure how Yjs splits strings.
    for (let index = 0; index < 1_000; index += 1) {
      const paragraph = new Y.XmlElement("paragraph");
      paragraph.setAttribute("text", `${index}`.padEnd(9_000, "."));
      fragment.insert(index, [paragraph]);
    }
    await until("the network is full", () => socket.socket.bufferedAmount > 0);
    const full = socket.socket.bufferedAmount;
    expect(full).toBeGreaterThan(1_000_000);
    store.open("append");
    await until("all is stored", () => socket.saved() === 1_000, 25_000);
    const sequence = await rows<{ seq: string }>(
      stage.server.database,
      "select seq from document_updates where notebook_id = ? order by seq",
      [notebookId],
    );
    expect(sequence.map(({ seq }) => Number(seq))).toEqual(
      Array.from({ length: 1_000 }, (_, index) => index + 1),
    );
  });
});

describe("content that is there already", () => {
  test("is acknowledged and not stored again", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("once");
    writer.erase(1);
    await writer.allSaved();
    const count = async () =>
      (
        await rows(stage.server.database, "select 1 from document_updates where notebook_id = ?", [
          notebookId,
        ])
      ).length;
    const before = await count();
    const socket = await stage.raw(stage.ben, notebookId);
    socket.send(step2(Y.encodeStateAsUpdate(writer.document)));
    await until("it is acknowledged", () => socket.saved() === 1);
    expect(await count()).toBe(before);
  });

  test("is acknowledged only once what it repeats is committed", async () => {
    const notebookId = await stage.notebook();
    const document = new Y.Doc();
    paragraphOf(document).insert(0, "twice");
    const content = Y.encodeStateAsUpdate(document);
    const first = await stage.raw(stage.ada, notebookId);
    const second = await stage.raw(stage.ada, notebookId);
    store.shut("append");
    const calls = store.calls("append");
    first.send(update(content));
    await until("it is being stored", () => store.calls("append") > calls);
    second.send(step2(content));
    second.send(step1());
    await until("it has been read", () => second.frames.some(({ step }) => step === 1));
    expect(second.saved()).toBe(0);
    store.open("append");
    await until("both are acknowledged", () => first.saved() === 1 && second.saved() === 1);
  });
});

describe("typing offline", () => {
  test("arrives on return and merges with what others wrote", async () => {
    const notebookId = await stage.notebook();
    const away = await stage.write(stage.ada, notebookId);
    const here = await stage.write(stage.ben, notebookId);
    away.type("start ");
    await until("both have it", () => here.text() === "start ");
    away.provider.disconnect();
    await until("she is away", () => gone(away));
    away.type("from the train ");
    here.type("from the office ");
    away.erase(2);
    away.provider.connect();
    await until("both have both", () => away.text() === here.text() && here.text().includes("train"));
    expect(here.text()).toContain("from the office");
    expect(here.text().startsWith("art")).toBe(true);
    await away.allSaved();
    expect(await stored(notebookId)).toBe(here.text());
  });

  test("a frame that comes before what it builds on waits for it", async () => {
    const notebookId = await stage.notebook();
    const document = new Y.Doc();
    paragraphOf(document).insert(0, "kept on this device ");
    const before = Y.encodeStateVector(document);
    paragraphOf(document).insert(20, "typed at once");
    const socket = await stage.raw(stage.ada, notebookId);
    socket.send(update(Y.encodeStateAsUpdate(document, before)));
    socket.send(step1());
    await until("it has been read", () => socket.frames.some(({ step }) => step === 1));
    expect([socket.saved(), await stored(notebookId)]).toEqual([0, ""]);
    socket.send(step2(Y.encodeStateAsUpdate(document)));
    await until("both are acknowledged", () => socket.saved() === 2);
    expect(await stored(notebookId)).toBe("kept on this device typed at once");
  });
});

describe("the store goes away", () => {
  test("for a while: people are told, nothing is lost, and order is kept", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    store.fail("append", { error: connectionLost });
    first.type("one ");
    await until("they are told", () => second.notices.some(({ about }) => about === "store-unreachable"));
    first.type("two ");
    first.type("three");
    expect(second.text()).toBe("");
    store.fail("append", null);
    await until("they are told", () => second.notices.at(-1)?.about === "store-back");
    await first.allSaved();
    await until("the other sees it", () => second.text() === "one two three");
    expect(await stored(notebookId)).toBe("one two three");
  });

  test("in the middle of an answer: what was committed is not stored twice", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    store.fail("append", { error: connectionLost, after: true });
    first.type("committed, but the answer is lost");
    await until("they are told", () => second.notices.some(({ about }) => about === "store-unreachable"));
    store.fail("append", null);
    await first.allSaved();
    await until("the other sees it", () => second.text() === "committed, but the answer is lost");
    const sequence = await rows<{ seq: string }>(
      stage.server.database,
      "select seq from document_updates where notebook_id = ? order by seq",
      [notebookId],
    );
    expect(new Set(sequence.map(({ seq }) => seq)).size).toBe(sequence.length);
    expect(await stored(notebookId)).toBe("committed, but the answer is lost");
  });

  test("every connection of the database is cut: it comes back by itself", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    const name = new URL(stage.testDatabase.url).pathname.slice(1);
    const admin = openDatabase(process.env["SUBLEADING_TEST_DATABASE_URL"]!, { most: 1 });
    try {
      await admin.raw(`alter database ${name} with allow_connections false`);
      await admin.raw("select pg_terminate_backend(pid) from pg_stat_activity where datname = ?", [name]);
      first.type("typed while it was away");
      await until("they are told", () => second.notices.some(({ about }) => about === "store-unreachable"));
      expect(second.text()).toBe("");
      await admin.raw(`alter database ${name} with allow_connections true`);
      await first.allSaved();
      await until("the other sees it", () => second.text() === "typed while it was away");
      // The tests' own connections were cut too; each says so once.
      await until("every connection is a new one", async () => {
        const asked = Array.from({ length: 10 }, () => stage.server.database.raw("select 1"));
        return (await Promise.allSettled(asked)).every(({ status }) => status === "fulfilled");
      });
      expect(await stored(notebookId)).toBe("typed while it was away");
    } finally {
      await admin.destroy();
    }
  });

  test("with a complaint that never passes: the room is loaded afresh and the authors send again", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    store.fail("append", { error: Object.assign(new Error("a constraint says no"), { code: "23514" }) });
    writer.type("kept by its author");
    await until("the room is given up", () => writer.closes.some(({ code }) => code === closeCode.failed));
    store.fail("append", null);
    await until("it is connected again", () => writer.provider.synced);
    await writer.allSaved();
    expect(await stored(notebookId)).toBe("kept by its author");
  });
});

describe("another process writes too", () => {
  test("its rows are taken in before one's own, and nobody's are lost", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("here ");
    await writer.allSaved();
    const elsewhere = new Y.Doc();
    Y.applyUpdate(elsewhere, Y.encodeStateAsUpdate(writer.document));
    const before = Y.encodeStateVector(elsewhere);
    paragraphOf(elsewhere).insert(5, "there ");
    const other = stage.store;
    const last = async () =>
      Number(
        (
          await rows<{ last_seq: string }>(
            stage.server.database,
            "select last_seq from notebooks where id = ?",
            [notebookId],
          )
        )[0]!.last_seq,
      );
    const outcome = await other.append({
      notebookId,
      after: await last(),
      updates: [{ update: Y.encodeStateAsUpdate(elsewhere, before), personId: stage.ben.id }],
      schema: { lowest: 1, highest: 1 },
    });
    expect(outcome!.stored).toBe(true);
    const third = await stage.write(stage.cleo, notebookId);
    writer.type("again");
    await writer.allSaved();
    await until("all see all", () => third.text() === writer.text() && third.text().includes("there "));
    expect(await stored(notebookId)).toBe(writer.text());
  });

  test("two writing at once give gapless numbers, each row once", async () => {
    const notebookId = await stage.notebook();
    const other = stage.store;
    const loops = Array.from({ length: 4 }, async (_, writer) => {
      let after = 0;
      for (let count = 0; count < 15;) {
        const document = new Y.Doc();
        document.getXmlFragment(FRAGMENT).insert(0, [new Y.XmlElement(`from-${writer}-${count}`)]);
        const outcome = await other.append({
          notebookId,
          after,
          updates: [{ update: Y.encodeStateAsUpdate(document), personId: stage.ada.id }],
          schema: { lowest: 1, highest: 1 },
        });
        after = outcome!.lastSeq;
        if (outcome!.stored) count += 1;
      }
    });
    await Promise.all(loops);
    const sequence = await rows<{ seq: string }>(
      stage.server.database,
      "select seq from document_updates where notebook_id = ? order by seq",
      [notebookId],
    );
    expect(sequence.map(({ seq }) => Number(seq))).toEqual(
      Array.from({ length: 60 }, (_, index) => index + 1),
    );
  });
});

describe("a slow store and people who come and go", () => {
  const at = (notebookId: string) => ({ port: stage.server.port, notebookId, cookie: stage.ada.cookie });

  test("one who leaves before the document is loaded pins nothing", async () => {
    const notebookId = await stage.notebook();
    store.shut("load");
    const calls = store.calls("load");
    const leaving = openWriter(at(notebookId));
    await until("it is being loaded", () => store.calls("load") > calls);
    leaving.stop();
    store.open("load");
    await until("the room is closed", () => roomOf(notebookId) === undefined);
  });

  test("one who leaves early does not take the room from one who stays", async () => {
    const notebookId = await stage.notebook();
    store.shut("load");
    const leaving = openWriter(at(notebookId));
    const staying = openWriter(at(notebookId));
    await until("it is being loaded", () => roomOf(notebookId)?.state === "loading");
    leaving.stop();
    store.open("load");
    await staying.synced();
    staying.type("still here");
    await staying.allSaved();
    expect(roomOf(notebookId)!.state).toBe("open");
    staying.stop();
  });

  test("nobody is told that a document is synced before the store was read", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    first.type("there all along");
    await first.allSaved();
    first.stop();
    await until("the room is closed", () => roomOf(notebookId) === undefined);
    store.shut("load");
    const later = openWriter(at(notebookId));
    await until("it is being loaded", () => roomOf(notebookId)?.state === "loading");
    expect([later.provider.wsconnected, later.provider.synced]).toEqual([false, false]);
    store.open("load");
    await later.synced();
    expect(later.text()).toBe("there all along");
    later.stop();
  });

  test("a failed load is an error and not an empty document; the next one succeeds", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    first.type("there all along");
    await first.allSaved();
    first.stop();
    await until("the room is closed", () => roomOf(notebookId) === undefined);
    store.fail("load", { error: connectionLost });
    await expect(openRaw(at(notebookId))).rejects.toThrow("503");
    expect(roomOf(notebookId)).toBeUndefined();
    store.fail("load", null);
    const later = await stage.write(stage.ada, notebookId);
    expect(later.text()).toBe("there all along");
  });

  test("an author who leaves before their typing is stored still has it stored, also for who comes meanwhile", async () => {
    const notebookId = await stage.notebook();
    const author = await stage.write(stage.ada, notebookId);
    await author.allSaved();
    store.shut("append");
    const calls = store.calls("append");
    author.type("last words");
    await until("it is being stored", () => store.calls("append") > calls);
    author.stop();
    await until("the room is being closed", () => roomOf(notebookId)?.state === "draining");
    const coming = await stage.write(stage.ben, notebookId);
    expect(roomOf(notebookId)!.state).toBe("open");
    store.open("append");
    await until("they see it", () => coming.text() === "last words");
    expect(await stored(notebookId)).toBe("last words");
  });

  test("coming back while the room is being tidied up keeps it open, and it closes in the end", async () => {
    const notebookId = await stage.notebook();
    const author = await stage.write(stage.ada, notebookId);
    for (let index = 0; index < 30; index += 1) {
      author.type(`${index} `);
      await author.allSaved();
    }
    store.shut("saveState");
    const calls = store.calls("saveState");
    author.stop();
    await until("it is being compacted", () => store.calls("saveState") > calls);
    for (let visit = 0; visit < 3; visit += 1) {
      const coming = await stage.write(stage.ben, notebookId);
      expect(roomOf(notebookId)!.state).toBe("open");
      coming.stop();
      await until("it is left again", () => roomOf(notebookId)?.state === "draining");
    }
    store.open("saveState");
    await until("the room is closed", () => roomOf(notebookId) === undefined);
  });
});
