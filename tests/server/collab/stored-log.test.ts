/** What is made of the stored log: rows that do not apply, compaction, and the end of a server. */
import { randomBytes } from "node:crypto";
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { buildDocument } from "../../../server/collab/build-document.ts";
import { compactHere, compactNotebook } from "../../../server/collab/compaction.ts";
import { firstRow, rows } from "../../../server/data/database.ts";
import { pino } from "pino";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { startCollabServer } from "./collab-server.ts";
import { seededRandom } from "./seeded-random.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { openWriter, paragraphOf, textOf } from "./writer.ts";

const stage = setStage();
const log = pino({ level: "silent" });
const roomOf = (notebookId: string) => stage.server.collab.rooms.find(notebookId);

async function putRow(notebookId: string, update: Uint8Array): Promise<number> {
  const row = await firstRow<{ seq: string }>(
    stage.server.database,
    `with raised as (update notebooks set last_seq = last_seq + 1 where id = ? returning id, last_seq)
     insert into document_updates (notebook_id, seq, update) select id, last_seq, ? from raised returning seq`,
    [notebookId, Buffer.from(update)],
  );
  return Number(row!.seq);
}
const quarantined = async (notebookId: string) =>
  (
    await rows<{ seq: string }>(
      stage.server.database,
      "select seq from document_updates where notebook_id = ? and quarantined_at is not null order by seq",
      [notebookId],
    )
  ).map(({ seq }) => Number(seq));

/** Typing of several people with deletions and formats: one update per change, as they would be stored. */
function someTyping(seed: number, changes: number): { updates: Uint8Array[]; document: Y.Doc } {
  const random = seededRandom(seed);
  const documents = Array.from({ length: 3 }, () => new Y.Doc());
  const updates: Uint8Array[] = [];
  const [first] = documents as [Y.Doc];
  paragraphOf(first);
  updates.push(Y.encodeStateAsUpdate(first));
  for (const document of documents) {
    if (document !== first) Y.applyUpdate(document, updates[0]!);
    document.on("update", (update: Uint8Array, origin: unknown) => {
      if (origin === "sent") return;
      updates.push(update);
      for (const other of documents) if (other !== document) Y.applyUpdate(other, update, "sent");
    });
  }
  for (let change = 0; change < changes; change += 1) {
    const text = paragraphOf(documents[Math.floor(random() * 3)]!);
    const place = Math.floor(random() * text.length);
    if (random() < 0.25 && text.length > 10) text.delete(place, Math.min(5, text.length - place));
    else if (random() < 0.1 && text.length > 10)
      text.format(place, Math.min(4, text.length - place), { bold: random() < 0.5 });
    else text.insert(place, `${change} `);
  }
  return { updates, document: first };
}

describe("a row that does not apply", () => {
  test.each([
    ["noise", () => randomBytes(50)],
    ["an update cut short", () => someTyping(1, 5).updates[0]!.subarray(0, 9)],
  ])("%s: is set aside and reported, and the notebook opens with all the rest", async (_name, bad) => {
    const notebookId = await stage.notebook();
    const { updates, document } = someTyping(7, 20);
    const badRows: number[] = [];
    for (const [index, update] of updates.entries()) {
      if (index === 5 || index === 9) badRows.push(await putRow(notebookId, bad()));
      await putRow(notebookId, update);
    }
    const writer = await stage.write(stage.ada, notebookId);
    expect(writer.document.getXmlFragment(FRAGMENT).toJSON()).toBe(
      document.getXmlFragment(FRAGMENT).toJSON(),
    );
    expect(await quarantined(notebookId)).toEqual(badRows);
    const event = await firstRow<{ details: { rows: { seq: number }[] } }>(
      stage.server.database,
      "select details from events where notebook_id = ? and what = 'document.row-quarantined'",
      [notebookId],
    );
    expect(event!.details.rows.map(({ seq }) => seq).sort((a, b) => a - b)).toEqual(badRows);
    writer.type("and on it goes");
    await writer.allSaved();
  });
});

test("rows are read in the order in which they were stored", async () => {
  const notebookId = await stage.notebook();
  for (const update of someTyping(3, 120).updates) await putRow(notebookId, update);
  const { tail, lastSeq } = (await stage.store.load(notebookId))!;
  const inOrder = Array.from({ length: lastSeq }, (_, index) => index + 1);
  expect(tail.map(({ seq }) => seq)).toEqual(inOrder);
  expect((await stage.store.readAfter(notebookId, 8)).map(({ seq }) => seq)).toEqual(inOrder.slice(8));
});

describe("compaction", () => {
  test.each([11, 12, 13])("gives the same document as the rows (seed %i)", async (seed) => {
    const notebookId = await stage.notebook();
    const { updates, document } = someTyping(seed, 300);
    const { store } = stage;
    const options = { store, compact: compactHere, log };
    for (const [index, update] of updates.entries()) {
      await putRow(notebookId, update);
      if (index % 90 === 89) expect(await compactNotebook(notebookId, options)).toBe(90);
    }
    const stored = (await store.load(notebookId))!;
    expect(stored.tail.length).toBe(updates.length % 90);
    const built = buildDocument(stored.state, stored.tail).document;
    const fromRows = buildDocument(null, await store.readAfter(notebookId, 0)).document;
    const content = document.getXmlFragment(FRAGMENT).toJSON();
    for (const each of [built, fromRows]) {
      expect(each.getXmlFragment(FRAGMENT).toJSON()).toBe(content);
      expect(Y.encodeStateVector(each)).toEqual(Y.encodeStateVector(document));
      expect(each.store.pendingStructs).toBeNull();
    }
  });

  test("an older state never replaces a newer one", async () => {
    const notebookId = await stage.notebook();
    const { store } = stage;
    expect(await store.saveState(notebookId, 5, Uint8Array.of(0, 0))).toBe(true);
    expect(await store.saveState(notebookId, 4, Uint8Array.of(1, 1))).toBe(false);
    expect((await store.load(notebookId))!.state).toEqual(Buffer.from([0, 0]));
  });

  test("happens when a notebook closes, and what is typed meanwhile is not lost", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    for (let index = 0; index < 40; index += 1) {
      writer.type(`${index} `);
      if (index % 4 === 0) await writer.allSaved();
    }
    await writer.allSaved();
    const text = writer.text();
    writer.stop();
    await until("the room is closed", () => roomOf(notebookId) === undefined);
    const state = await firstRow<{ seq: string }>(
      stage.server.database,
      "select seq from document_states where notebook_id = ?",
      [notebookId],
    );
    expect(Number(state!.seq)).toBeGreaterThanOrEqual(40);
    const later = await stage.write(stage.ben, notebookId);
    expect(later.text()).toBe(text);
  });

  test("happens while people type", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    let typed = "";
    for (let index = 0; index < 1_100; index += 1) {
      writer.type(`${index} `);
      typed += `${index} `;
      if (index % 50 === 0) await writer.allSaved();
    }
    await writer.allSaved();
    await until("there is a state", async () => {
      const row = await firstRow(
        stage.server.database,
        "select 1 from document_states where notebook_id = ?",
        [notebookId],
      );
      return row !== undefined;
    });
    const { store } = stage;
    const stored = (await store.load(notebookId))!;
    expect(textOf(buildDocument(stored.state, stored.tail).document)).toBe(typed);
  });
});

describe("a server that stops", () => {
  test("stores what it took, says so, and closes every socket as going away", async () => {
    const server = await startCollabServer(stage.testDatabase.url);
    const notebookId = await stage.notebook();
    const writer = openWriter({ port: server.port, notebookId, cookie: stage.ada.cookie });
    await writer.synced();
    for (let index = 0; index < 200; index += 1) writer.type(`${index} `);
    await until("some of it is stored", () => writer.saved() > 0);
    await server.stop();
    await until("it is closed", () => writer.closes.length > 0);
    expect(writer.closes[0]!.code).toBe(closeCode.goingAway);
    const acknowledged = writer.savedOn(1);
    const later = await stage.write(stage.ben, notebookId);
    const kept = later
      .text()
      .split(" ")
      .filter((word) => word !== "");
    expect(kept.length).toBeGreaterThanOrEqual(acknowledged - 3);
    expect(kept).toEqual(Array.from({ length: kept.length }, (_, index) => String(index)));
    writer.stop();
  });
});
