/** Two server processes on one database: people of both write together, and either may be killed. */
import { setTimeout as sleep } from "node:timers/promises";
import pg from "pg";
import { afterAll, afterEach, beforeAll, describe, expect, test } from "vitest";
import * as Y from "yjs";
import { openDatabase, rows, type Database } from "../../../server/data/database.ts";
import type { OpenRoom } from "../../../server/collab/room-state.ts";
import { announceAccessChange } from "../../../server/policies/access-changes.ts";
import { createTestDatabase, type TestDatabase } from "../database.ts";
import { addNotebook, addPerson, type CastPerson } from "./cast.ts";
import { startChild, type Child } from "./child.ts";
import { startCollabServer } from "./collab-server.ts";
import { until } from "./until.ts";
import { openWriter, textOf, type Writer } from "./writer.ts";

let testDatabase: TestDatabase;
let database: Database;
let ada: CastPerson;
let ben: CastPerson;
let here: Child;
let there: Child;
const open: Writer[] = [];

beforeAll(async () => {
  testDatabase = await createTestDatabase();
  database = openDatabase(testDatabase.url);
  ada = await addPerson(database, "Ada");
  ben = await addPerson(database, "Ben");
  [here, there] = await Promise.all([startChild(testDatabase.url), startChild(testDatabase.url)]);
});
afterEach(() => {
  for (const writer of open.splice(0)) writer.stop();
});
afterAll(async () => {
  await Promise.all([here.end("SIGKILL"), there.end("SIGKILL")]);
  await database.destroy();
  await testDatabase.drop();
});

const notebook = () =>
  addNotebook(database, [
    [ada, "owner"],
    [ben, "author"],
  ]);
async function write(child: Child, person: CastPerson, notebookId: string): Promise<Writer> {
  const writer = openWriter({ port: child.port, notebookId, cookie: person.cookie });
  open.push(writer);
  await writer.synced();
  return writer;
}
/** Both of them in one notebook, each at another process, with a first word that both have. */
async function pair() {
  const notebookId = await notebook();
  const first = await write(here, ada, notebookId);
  const second = await write(there, ben, notebookId);
  first.type("*");
  await until("the other has it", () => second.text() === "*");
  return { notebookId, first, second };
}
async function stored(notebookId: string): Promise<string> {
  const document = new Y.Doc();
  const found = await rows<{ update: Buffer }>(
    database,
    `select u.update from document_updates u where u.notebook_id = ? order by u.seq`,
    [notebookId],
  );
  for (const { update } of found) Y.applyUpdate(document, update);
  return textOf(document);
}
const listeners = (how: "cut" | "count") =>
  rows(
    database,
    `select ${how === "cut" ? "pg_terminate_backend(pid)" : "pid"} from pg_stat_activity
      where datname = current_database() and application_name like 'subleading listens to rows%'`,
  );

describe("people at two processes", () => {
  test("see each other's letters and presence, and both are told that theirs are saved", async () => {
    const { notebookId, first, second } = await pair();
    for (let letter = 0; letter < 40; letter += 1) {
      first.type("a");
      second.type("b");
      await sleep(5); // typing, not waiting for anything
    }
    await Promise.all([first.allSaved(), second.allSaved()]);
    await until("both have all", () => first.text().length === 81 && first.text() === second.text());
    expect(await stored(notebookId)).toBe(first.text());
    const numbers = await rows<{ seq: string }>(
      database,
      "select u.seq::text from document_updates u where u.notebook_id = ? order by u.seq",
      [notebookId],
    );
    expect(numbers.map(({ seq }) => Number(seq))).toEqual(numbers.map((_, index) => index + 1));

    first.awareness.setLocalStateField("at", "the third line");
    const shown = () =>
      [...second.awareness.getStates().values()].find((state) => state["at"] === "the third line");
    await until("presence crosses", () => shown() !== undefined);
    expect(shown()?.["user"]).toEqual({ id: ada.id, name: "Ada" });
    first.stop();
    await until("leaving crosses", () => shown() === undefined);
  });

  test("who comes later sees who is at the other process already", async () => {
    const notebookId = await notebook();
    const first = await write(here, ada, notebookId);
    first.awareness.setLocalStateField("at", "home");
    const second = await write(there, ben, notebookId);
    await until("the earlier is seen", () =>
      [...second.awareness.getStates().values()].some((state) => state["at"] === "home"),
    );
  });

  test("are told of results whichever process computed them", async () => {
    const notebookId = await notebook();
    // As the evaluation sees it: two servers beside each other, and the notebook as one of them has it open.
    const opened: OpenRoom[] = [];
    const [one, other] = await Promise.all([
      startCollabServer(testDatabase.url, { observers: [{ opened: (room) => void opened.push(room) }] }),
      startCollabServer(testDatabase.url),
    ]);
    const first = openWriter({ port: one.port, notebookId, cookie: ada.cookie });
    const second = openWriter({ port: other.port, notebookId, cookie: ben.cookie });
    open.push(first, second);
    await Promise.all([first.synced(), second.synced()]);
    await until("the one knows of the other", () => {
      opened[0]?.notify({ about: "results" });
      return second.notices.some(({ about }) => about === "results");
    });
    expect(first.notices.some(({ about }) => about === "results")).toBe(true);
    first.stop();
    second.stop();
    await Promise.all([one.stop(), other.stop()]);
  });

  test("lose what was taken from them at both", async () => {
    const { notebookId, first, second } = await pair();
    await database.transaction(async (transaction) => {
      await transaction.raw(
        "update notebook_people set role = 'reader' where notebook_id = ? and person_id = ?",
        [notebookId, ben.id],
      );
      await announceAccessChange(transaction, { about: "person", notebookId, personId: ben.id });
    });
    await until("it is told", () => second.notices.some(({ about }) => about === "read-only"));
    second.type("no more");
    await until("it is refused", () => second.notices.some(({ about }) => about === "rejected"));
    first.type("!");
    await first.allSaved();
    expect(await stored(notebookId)).toBe("*!");
  });
});

test("what was written while nothing could be announced is read afterwards", async () => {
  const { first, second } = await pair();
  for (let round = 0; round < 3; round += 1) {
    await listeners("cut");
    first.type(`${round}`);
    await first.allSaved();
  }
  await until("the listeners are back", async () => (await listeners("count")).length === 2);
  await until("the other has it", () => second.text() === "*012");
});

test("one process alone announces nothing", async () => {
  const notebookId = await notebook();
  const heard: string[] = [];
  const client = new pg.Client({ connectionString: testDatabase.url });
  client.on("notification", ({ channel }) => heard.push(channel));
  await client.connect();
  await client.query("listen rows");
  const first = await write(here, ada, notebookId);
  first.type("alone");
  await first.allSaved();
  await client.query("select 1");
  expect(heard).toEqual([]);
  const second = await write(there, ben, notebookId);
  first.type(" together");
  await until("it is announced", () => heard.length > 0);
  expect(second.closes).toEqual([]);
  await client.end();
});

test("either is killed while both are written at: nothing that was shown or saved is lost, and no holes", async () => {
  const notebookId = await notebook();
  const first = await write(here, ada, notebookId);
  const second = await write(there, ben, notebookId);
  first.type(";");
  await until("the other has it", () => second.text() === ";");
  const typed = { a: 0, b: 0 };
  const timers = [
    setInterval(() => first.type(`a${typed.a++};`), 40),
    setInterval(() => second.type(`b${typed.b++};`), 40),
  ];
  for (const victim of ["here", "there"] as const) {
    await sleep(300); // typing, not waiting for anything
    if (victim === "here") {
      await here.end("SIGKILL");
      here = await startChild(testDatabase.url, here.port);
    } else {
      await there.end("SIGKILL");
      there = await startChild(testDatabase.url, there.port);
    }
  }
  for (const timer of timers) clearInterval(timer);
  await Promise.all([first.allSaved(), second.allSaved()]);
  await until("both have all", () => first.text() === second.text());
  const fresh = await write(there, ada, notebookId);
  expect(fresh.text()).toBe(first.text());
  for (const name of ["a", "b"] as const) {
    const numbers = fresh
      .text()
      .split(";")
      .filter((mark) => mark.startsWith(name))
      .map((mark) => Number(mark.slice(1)));
    expect(numbers.sort((a, b) => a - b)).toEqual(Array.from({ length: typed[name] }, (_, index) => index));
  }
}, 180_000);
