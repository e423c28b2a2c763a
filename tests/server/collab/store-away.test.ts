/** The store goes away and comes back; another process writes beside this one. */
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { openDatabase, rows } from "../../../server/data/database.ts";
import { connectionLost, setSlowStage } from "./slow-stage.ts";
import { until } from "./until.ts";
import { paragraphOf } from "./writer.ts";

const { stage, store, stored } = setSlowStage();

describe("the store goes away", () => {
  test("for a while: people are told, nothing is lost, and order is kept", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    store().fail("append", { error: connectionLost });
    first.type("one ");
    await until("they are told", () => second.notices.some(({ about }) => about === "store-unreachable"));
    first.type("two ");
    first.type("three");
    expect(second.text()).toBe("");
    store().fail("append", null);
    await until("they are told", () => second.notices.at(-1)?.about === "store-back");
    await first.allSaved();
    await until("the other sees it", () => second.text() === "one two three");
    expect(await stored(notebookId)).toBe("one two three");
  });

  test("in the middle of an answer: what was committed is not stored twice", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    const second = await stage.write(stage.ben, notebookId);
    store().fail("append", { error: connectionLost, after: true });
    first.type("committed, but the answer is lost");
    await until("they are told", () => second.notices.some(({ about }) => about === "store-unreachable"));
    store().fail("append", null);
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

  test.each([
    ["a full disk", "53100"],
    ["a disk that refuses to write", "58030"],
  ])("with %s: people are told, and it is stored once there is room", async (_what, code) => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    store().fail("append", { error: Object.assign(new Error("could not write"), { code }) });
    writer.type("kept");
    await until("they are told", () => writer.notices.some(({ about }) => about === "store-unreachable"));
    store().fail("append", null);
    await writer.allSaved();
    expect(writer.closes).toEqual([]);
    expect(await stored(notebookId)).toBe("kept");
  });

  test("with a complaint that never passes: the room is loaded afresh and the authors send again", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    store().fail("append", { error: Object.assign(new Error("a constraint says no"), { code: "23514" }) });
    writer.type("kept by its author");
    await until("the room is given up", () => writer.closes.some(({ code }) => code === closeCode.failed));
    store().fail("append", null);
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
      schema: { lowest: SCHEMA_VERSION, highest: SCHEMA_VERSION },
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
          schema: { lowest: SCHEMA_VERSION, highest: SCHEMA_VERSION },
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
