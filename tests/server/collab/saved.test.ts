/** "Saved" means committed, and nothing is shown before; what is typed offline arrives. */
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { FRAGMENT } from "../../../client/contract/collab.ts";
import { rows } from "../../../server/data/database.ts";
import { step1, step2, update } from "./raw-socket.ts";
import { setSlowStage } from "./slow-stage.ts";
import { until } from "./until.ts";
import { paragraphOf, textOf, type Writer } from "./writer.ts";

const { stage, store, stored } = setSlowStage();
const gone = (writer: Writer) => !writer.provider.wsconnected;

describe("saved means committed", () => {
  test("nothing is acknowledged or shown while it is not", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    await first.allSaved();
    const before = first.saved();
    store().shut("append");
    const calls = store().calls("append");
    first.type("in between");
    await until("it is being stored", () => store().calls("append") > calls);
    const joining = await stage.write(stage.cleo, notebookId);
    expect([first.saved(), second.text(), joining.text()]).toEqual([before, "", ""]);
    store().open("append");
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
    store().shut("append");
    const calls = store().calls("append");
    const letters = Array.from({ length: 300 }, (_, index) => String.fromCharCode(97 + (index % 26)));
    for (const letter of letters) writer.type(letter);
    await until("all have arrived", () => store().calls("append") > calls);
    const seen = await stage.raw(stage.ben, notebookId);
    seen.send(step1());
    store().open("append");
    await writer.allSaved();
    expect(store().calls("append") - calls).toBeLessThan(20);
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
    store().shut("append");
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
    store().open("append");
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
    store().shut("append");
    const calls = store().calls("append");
    first.send(update(content));
    await until("it is being stored", () => store().calls("append") > calls);
    second.send(step2(content));
    second.send(step1());
    await until("it has been read", () => second.frames.some(({ step }) => step === 1));
    expect(second.saved()).toBe(0);
    store().open("append");
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
