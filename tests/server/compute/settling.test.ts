import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import { pino } from "pino";
import * as Y from "yjs";
import { FRAGMENT } from "../../../client/contract/collab.ts";
import { block, paragraph, type DocumentNode } from "../../../server/commands/document-builder.ts";
import { openCompute, type Compute } from "../../../server/compute/open-compute.ts";
import {
  ComputeBusy,
  ComputeFailed,
  ComputeTimeout,
  openComputePool,
} from "../../../server/compute/compute-pool.ts";
import { Rest } from "../../../server/compute/rest.ts";
import { settleJson } from "../../../server/compute/settle-document.ts";
import { seedDocument } from "../../../server/compute/seed-document.ts";
import { firstRow, rows } from "../../../server/data/database.ts";
import { storedResults } from "../../../server/data/stored-results.ts";
import { addNotebook, addPerson, type CastPerson } from "../collab/cast.ts";
import { startCollabServer, type CollabServer } from "../collab/collab-server.ts";
import { until } from "../collab/until.ts";
import { openWriter, type Writer } from "../collab/writer.ts";
import { createTestDatabase, type TestDatabase } from "../database.ts";

let testDatabase: TestDatabase;
let server: CollabServer;
let compute: Compute;
const silent = pino({ level: process.env["TEST_LOG_LEVEL"] ?? "silent" });
let ada: CastPerson;
let ben: CastPerson;
const writers: Writer[] = [];

beforeAll(async () => {
  testDatabase = await createTestDatabase();
  server = await startCollabServer(testDatabase.url, {
    with: (database) => {
      compute = openCompute({ database, log: silent, times: { quietMs: 30, longestMs: 200 } });
      return { observers: [compute.observer], compact: (task) => compute.compact(task) };
    },
  });
  ada = await addPerson(server.database, "Ada");
  ben = await addPerson(server.database, "Ben");
});
afterEach(() => {
  for (const writer of writers.splice(0)) writer.stop();
});
afterAll(async () => {
  await server.stop();
  await compute.stop();
  await testDatabase.drop();
});

const premises = (d: string) =>
  block("premises", "p1", "", {
    fields: { name: "Test theory", d },
    tables: {
      fields: [{ id: "f1", symbol: "\\phi", kind: "real scalar" }],
      terms: [{ id: "t1", term: "\\phi^4", coupling: "\\lambda" }],
    },
  });
const document = (...content: DocumentNode[]): DocumentNode => ({ type: "doc", content });

async function seeded(json: DocumentNode): Promise<string> {
  const notebookId = await addNotebook(server.database, [
    [ada, "owner"],
    [ben, "author"],
  ]);
  await server.database.transaction((transaction) => seedDocument(transaction, notebookId, json));
  return notebookId;
}
async function open(person: CastPerson, notebookId: string): Promise<Writer> {
  const writer = openWriter({ port: server.port, notebookId, cookie: person.cookie });
  writers.push(writer);
  await writer.synced();
  return writer;
}
function elementOf(writer: Writer, name: string): Y.XmlElement {
  const found = writer.document
    .getXmlFragment(FRAGMENT)
    .toArray()
    .find((node) => node instanceof Y.XmlElement && node.nodeName === name);
  if (!(found instanceof Y.XmlElement)) throw new Error(`no ${name} in the document`);
  return found;
}
const keysOf = async (notebookId: string) =>
  new Map((await storedResults(server.database, notebookId)).map(({ blockId, key }) => [blockId, key]));

test("seeding stores the document and its results, with nobody's name on them", async () => {
  const notebookId = await seeded(
    document(paragraph("Before."), premises("4"), block("scaling", "s1", "p1", {})),
  );
  const results = await storedResults(server.database, notebookId);
  expect(results.map(({ blockId, changedBy }) => [blockId, changedBy])).toEqual([
    ["p1", null],
    ["s1", null],
  ]);
  expect(results.map(({ evaluation }) => evaluation.problems)).toEqual([[], []]);
  const notebook = await firstRow<{ premises_line: string }>(
    server.database,
    "select premises_line from notebooks where id = ?",
    [notebookId],
  );
  expect(notebook?.premises_line).toBe("d = 4 · 1 field · 1 term");
});

test("a changed premise gives new results to all that stands on it, by name of who changed it", async () => {
  const notebookId = await seeded(document(premises("4"), block("scaling", "s1", "p1", {})));
  const before = await keysOf(notebookId);
  const [writer, reader] = [await open(ada, notebookId), await open(ben, notebookId)];
  elementOf(writer, "premises").setAttribute("d", "3");
  await until("the colleague is told", () => reader.notices.some(({ about }) => about === "results"));
  const after = await storedResults(server.database, notebookId);
  for (const { blockId, key, changedBy } of after) {
    expect(key).not.toBe(before.get(blockId));
    expect(changedBy).toBe("Ada");
  }
  // The old results stay: pins name them.
  const kept = await rows(server.database, "select key from results where key = any(?)", [
    [...before.values()],
  ]);
  expect(kept).toHaveLength(2);
});

const notebookRow = (notebookId: string) =>
  firstRow<{ pins_moved: number; pins_loose: number; changed_by: string | null; changed_at: Date }>(
    server.database,
    "select pins_moved, pins_loose, changed_by, changed_at from notebooks where id = ?",
    [notebookId],
  ).then((row) => row!);
const changersOf = async (notebookId: string) =>
  Object.fromEntries(
    (await storedResults(server.database, notebookId)).map(({ blockId, changedBy }) => [blockId, changedBy]),
  );

test("each result is by name of who touched its block, or else its premises", async () => {
  const notebookId = await seeded(
    document(premises("4"), block("scaling", "s1", "p1", {}), block("orderPlan", "o1", "p1", {})),
  );
  const [first, second] = [await open(ada, notebookId), await open(ben, notebookId)];
  elementOf(first, "premises").setAttribute("d", "6");
  elementOf(second, "orderPlan").setAttribute("target", "1e-3");
  await until("all three are new", async () =>
    Object.values(await changersOf(notebookId)).every((name) => name !== null),
  );
  await first.allSaved();
  await second.allSaved();
  await until("each has its name", async () => {
    const names = await changersOf(notebookId);
    return names["p1"] === "Ada" && names["s1"] === "Ada" && names["o1"] === "Ben";
  });
});

test("a change of a title gives no new result", async () => {
  const notebookId = await seeded(document(premises("4"), block("scaling", "s1", "p1", {})));
  const before = await keysOf(notebookId);
  const writer = await open(ada, notebookId);
  elementOf(writer, "scaling").setAttribute("title", "another title");
  await until("it has settled", async () => (await notebookRow(notebookId)).changed_by === ada.id);
  expect(await keysOf(notebookId)).toEqual(before);
  expect(writer.notices).toEqual([]);
});

test("when premises are deleted, what stood on them is in error by name of who deleted them", async () => {
  const notebookId = await seeded(document(premises("4"), block("scaling", "s1", "p1", {})));
  const writer = await open(ben, notebookId);
  writer.document.getXmlFragment(FRAGMENT).delete(0, 1);
  await until("its result is gone", async () => !(await keysOf(notebookId)).has("p1"));
  const [left] = await storedResults(server.database, notebookId);
  expect(left).toMatchObject({ blockId: "s1", changedBy: "Ben" });
  expect(left!.evaluation.value).toBeNull();
  expect(left!.evaluation.problems.map(({ code }) => code)).toEqual(["premises-deleted"]);
});

test("pins that moved and pins that are loose are counted for the shelf", async () => {
  const blocks = [premises("4"), block("scaling", "s1", "p1", {})];
  const { blocks: settled } = settleJson(document(...blocks), new Map());
  // A number that depends on d.
  const inThree = settleJson(document(premises("3"), blocks[1]!), new Map()).blocks[1]!.evaluation.scalars;
  const scalar = settled[1]!.evaluation.scalars.find(
    ({ id, value }) =>
      JSON.stringify(inThree.find((other) => other.id === id)?.value) !== JSON.stringify(value),
  )!;
  const pin = (pinId: string, scalarId: string): DocumentNode => ({
    type: "pin",
    attrs: {
      pinId,
      blockId: "s1",
      scalar: scalarId,
      resultKey: settled[1]!.key,
      value: JSON.stringify(scalar.value),
      text: "shown",
      format: "",
    },
  });
  const notebookId = await seeded(
    document(...blocks, paragraph("It is ", pin("one", scalar.id), pin("two", "no/such"))),
  );
  expect(await notebookRow(notebookId)).toMatchObject({ pins_moved: 0, pins_loose: 1 });
  const writer = await open(ada, notebookId);
  elementOf(writer, "premises").setAttribute("d", "3");
  await until("the pin has moved", async () => (await notebookRow(notebookId)).pins_moved === 1);
  expect((await notebookRow(notebookId)).pins_loose).toBe(1);
});

test("typing prose says who changed the notebook last, and evaluates nothing", async () => {
  const notebookId = await seeded(document(paragraph("Before."), premises("4")));
  const before = await notebookRow(notebookId);
  const writer = await open(ben, notebookId);
  writer.type(" After.");
  await until("it has settled", async () => (await notebookRow(notebookId)).changed_by === ben.id);
  expect((await notebookRow(notebookId)).changed_at.getTime()).toBeGreaterThan(before.changed_at.getTime());
  expect(writer.notices).toEqual([]);
});

test("results that are missing when a notebook is opened are made, by nobody's name", async () => {
  const notebookId = await seeded(document(premises("5"), block("scaling", "s1", "p1", {})));
  const before = await keysOf(notebookId);
  await server.database.raw("delete from notebook_results where notebook_id = ?", [notebookId]);
  await server.database.raw("delete from results where key = any(?)", [[...before.values()]]);
  const writer = await open(ada, notebookId);
  await until("they are there again", async () => (await keysOf(notebookId)).size === 2);
  expect(await keysOf(notebookId)).toEqual(before);
  expect(await changersOf(notebookId)).toEqual({ p1: null, s1: null });
  await until("the page is told", () => writer.notices.some(({ about }) => about === "results"));
});

test("a stored result is never changed", async () => {
  const json = document(premises("4"));
  const notebookId = await seeded(json);
  const [result] = await storedResults(server.database, notebookId);
  const marked = { ...result!.evaluation, notices: [{ code: "a-mark", path: [], facts: {} }] };
  await server.database.raw("update results set value = ? where key = ?", [
    JSON.stringify(marked),
    result!.key,
  ]);
  const other = await seeded(json);
  expect((await storedResults(server.database, other))[0]!.evaluation).toEqual(marked);
  await server.database.raw("update results set value = ? where key = ?", [
    JSON.stringify(result!.evaluation),
    result!.key,
  ]);
});

test("text that PostgreSQL cannot keep, and names that it cannot index, harm nothing", async () => {
  const notebookId = await seeded(document(premises("4")));
  const writer = await open(ada, notebookId);
  writer.document.transact(() => {
    const element = elementOf(writer, "premises");
    element.setAttribute("d", "4\0\ud800");
    const strange = new Y.XmlElement("scaling");
    strange.setAttribute("blockId", "x".repeat(10_000));
    const named = new Y.XmlElement("scaling");
    named.setAttribute("blockId", "n\0");
    writer.document.getXmlFragment(FRAGMENT).push([strange, named]);
  });
  await until("what can be stored is", async () => (await keysOf(notebookId)).has("n\ufffd"));
  expect([...(await keysOf(notebookId)).keys()]).toEqual(["n\ufffd", "p1"]);
});

test("a document nested deeper than any call stack settles like another", async () => {
  const deep = new Y.Doc();
  let innermost = new Y.XmlElement("blockquote");
  deep.getXmlFragment(FRAGMENT).push([innermost]);
  deep.transact(() => {
    for (let level = 0; level < 30_000; level += 1) {
      const next = new Y.XmlElement("blockquote");
      innermost.insert(0, [next]);
      innermost = next;
    }
    const scaling = new Y.XmlElement("scaling");
    scaling.setAttribute("blockId", "deep");
    innermost.insert(0, [scaling]);
  });
  const pool = openComputePool();
  try {
    const settled = await pool.run({ task: "settle", document: Y.encodeStateAsUpdate(deep) }, 20_000);
    expect(settled.blocks.map(({ blockId }) => blockId)).toEqual(["deep"]);
  } finally {
    await pool.stop();
  }
});

test("a task waits for its turn without using up its time", async () => {
  const pool = openComputePool({ threads: 1, longestQueue: 1 });
  const empty = { task: "settle", document: Y.encodeStateAsUpdate(new Y.Doc()) } as const;
  const blocks = Array.from({ length: 400 }, (_, index) =>
    block("scaling", `s${index}`, "p1", { fields: { title: String(index) } }),
  );
  const long = { task: "file", body: { format: "none", blocks } } as const;
  try {
    await pool.run(empty, 20_000);
    const first = pool.run(long, 20_000);
    const second = pool.run(empty, 20_000);
    await expect(pool.run(empty, 20_000)).rejects.toThrow(ComputeBusy);
    await first;
    expect((await second).blocks).toEqual([]);
  } finally {
    await pool.stop();
  }
});

test("a notebook that takes too long rests, however often it is changed or opened, and others do not", () => {
  let now = 1_000;
  const rest = new Rest(() => now);
  expect(rest.remaining("slow")).toBe(0);
  rest.begin("slow");
  expect(rest.remaining("slow")).toBe(30_000);
  expect(rest.remaining("other")).toBe(0);
  now += 30_000;
  expect(rest.remaining("slow")).toBe(0);
  rest.begin("slow");
  expect(rest.remaining("slow")).toBe(60_000);
  rest.end("slow");
  rest.begin("slow");
  expect(rest.remaining("slow")).toBe(30_000);
});

test("what takes too long is ended, and the next is computed", async () => {
  const pool = openComputePool();
  try {
    const task = { task: "settle", document: Y.encodeStateAsUpdate(new Y.Doc()) } as const;
    await expect(pool.run(task, 0)).rejects.toThrow(ComputeTimeout);
    expect((await pool.run(task, 20_000)).blocks).toEqual([]);
    await expect(pool.run({ task: "compact", state: Uint8Array.of(9), rows: [] }, 20_000)).rejects.toThrow(
      ComputeFailed,
    );
  } finally {
    await pool.stop();
  }
});

const count = (to: string) =>
  block("basisCount", "count", "", { fields: { to }, tables: { fields: [{ id: "f", symbol: "phi" }] } });

test("long work is computed in the background, and named for whose edit asked for it", async () => {
  const notebookId = await seeded(document(count("6"), premises("4")));
  const writer = await open(ben, notebookId);
  elementOf(writer, "basisCount").setAttribute("to", "7");
  const stored = async () =>
    (await storedResults(server.database, notebookId)).find(({ blockId }) => blockId === "count");
  await until("the new count is stored", async () =>
    Boolean((await stored())?.evaluation.scalars.some(({ id }) => id === "total/7")),
  );
  expect((await stored())?.changedBy).toBe("Ben");
});

test("long work that somebody has asked for before is taken from the store", async () => {
  const first = await seeded(document(count("9")));
  const keyOf = async (notebookId: string) => (await keysOf(notebookId)).get("count");
  const known = await keyOf(first);
  const before = await rows(server.database, "select 1 from results where key = ?", [known!]);
  expect(before).toHaveLength(1);
  const second = await seeded(document(count("8")));
  const writer = await open(ada, second);
  elementOf(writer, "basisCount").setAttribute("to", "9");
  await until("the same key", async () => (await keyOf(second)) === known);
});
