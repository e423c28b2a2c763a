import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import { pino } from "pino";
import * as Y from "yjs";
import { FRAGMENT } from "../../../client/contract/collab.ts";
import { block, paragraph, type DocumentNode } from "../../../server/commands/document-builder.ts";
import { openCompute, type Compute } from "../../../server/compute/open-compute.ts";
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
