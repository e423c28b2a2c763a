/**
 * What a second person has seen survives the death of the server, and nothing older than something kept is missing.
 * KILL_SEED repeats a run; KILL_ROUNDS makes it longer.
 */
import { setTimeout as sleep } from "node:timers/promises";
import { afterAll, beforeAll, expect, test } from "vitest";
import { openDatabase, type Database } from "../../../server/data/database.ts";
import { createTestDatabase, type TestDatabase } from "../database.ts";
import { addNotebook, addPerson, type CastPerson } from "./cast.ts";
import { startChild } from "./child.ts";
import { FRAGMENT } from "../../../client/contract/collab.ts";
import { until } from "./until.ts";
import { seededRandom } from "./seeded-random.ts";
import { openWriter, paragraphOf, textOf, type Writer } from "./writer.ts";

const KEYSTROKES_PER_SECOND = 30;
const rounds = Number(process.env["KILL_ROUNDS"] ?? "4");
const seed = Number(process.env["KILL_SEED"] ?? Date.now() % 1_000_000);

let testDatabase: TestDatabase;
let database: Database;
let ada: CastPerson;
let ben: CastPerson;
let cleo: CastPerson;
let notebookId: string;

beforeAll(async () => {
  testDatabase = await createTestDatabase();
  database = openDatabase(testDatabase.url);
  ada = await addPerson(database, "Ada");
  ben = await addPerson(database, "Ben");
  cleo = await addPerson(database, "Cleo");
  notebookId = await addNotebook(database, [
    [ada, "owner"],
    [ben, "author"],
    [cleo, "reader"],
  ]);
});
afterAll(async () => {
  await database.destroy();
  await testDatabase.drop();
});

/** Types numbered marks, one keystroke each, at random places; remembers which frame carried which. */
function typist(writer: Writer, name: string, random: () => number) {
  let typed = 0;
  const frames: { readonly mark: string; readonly socket: number; readonly frame: number }[] = [];
  const timer = setInterval(() => {
    const text = paragraphOf(writer.document);
    const marks = textOf(writer.document).split(";").slice(0, -1);
    const place = marks.slice(0, Math.floor(random() * (marks.length + 1))).join(";");
    const sentBefore = writer.sent();
    text.insert(place === "" ? 0 : place.length + 1, `${name}${typed};`);
    if (writer.sent() > sentBefore)
      frames.push({ mark: `${name}${typed}`, socket: writer.sockets(), frame: writer.sent() });
    typed += 1;
  }, 1_000 / KEYSTROKES_PER_SECOND);
  return {
    name,
    stop: () => clearInterval(timer),
    typed: () => typed,
    savedMarks: () =>
      frames.filter(({ socket, frame }) => frame <= writer.savedOn(socket)).map(({ mark }) => mark),
  };
}
const marksIn = (writer: Writer, name: string) =>
  writer
    .text()
    .split(";")
    .filter((mark) => mark.startsWith(name));

test(
  `two typing at ${KEYSTROKES_PER_SECOND} keystrokes a second, server killed in the middle (KILL_SEED=${seed})`,
  async () => {
    console.info(`KILL_SEED=${seed} KILL_ROUNDS=${rounds}`);
    const random = seededRandom(seed);
    for (let round = 0; round < rounds; round += 1) {
      const signal = round === rounds - 1 ? "SIGTERM" : "SIGKILL";
      const child = await startChild(testDatabase.url);
      const open = (person: CastPerson) =>
        openWriter({ port: child.port, notebookId, cookie: person.cookie });
      const [first, second, watcher] = [open(ada), open(ben), open(cleo)];
      await Promise.all([first.synced(), second.synced(), watcher.synced()]);
      const before = watcher
        .text()
        .split(";")
        .filter((mark) => mark !== "");
      if (round === 0) first.type("");
      // One paragraph for all, not one each.
      await until("all have the paragraph", () =>
        [first, second, watcher].every(({ document }) => document.getXmlFragment(FRAGMENT).length === 1),
      );
      const typists = [typist(first, `a${round}.`, random), typist(second, `b${round}.`, random)];
      await sleep(400 + random() * 900); // typing, not waiting for anything
      await child.end(signal);
      for (const each of typists) each.stop();

      const shown = new Set([
        ...before,
        ...watcher.text().split(";"),
        ...marksIn(first, `b${round}.`),
        ...marksIn(second, `a${round}.`),
        ...typists.flatMap((each) => each.savedMarks()),
      ]);
      shown.delete("");
      for (const each of [first, second, watcher]) each.stop();
      expect(shown.size).toBeGreaterThan(before.length);

      const restarted = await startChild(testDatabase.url);
      const fresh = openWriter({ port: restarted.port, notebookId, cookie: ada.cookie });
      await fresh.synced();
      const kept = new Set(
        fresh
          .text()
          .split(";")
          .filter((mark) => mark !== ""),
      );
      expect([...shown].filter((mark) => !kept.has(mark))).toEqual([]);
      for (const { name } of typists) {
        const numbers = [...kept]
          .filter((mark) => mark.startsWith(name))
          .map((mark) => Number(mark.slice(name.length)));
        expect(numbers.sort((a, b) => a - b)).toEqual(numbers.map((_, index) => index));
      }
      fresh.stop();
      expect(await restarted.end("SIGTERM")).toBe(0);
    }
  },
  60_000 + rounds * 15_000,
);

test("those who keep their page open across a kill have everything in the end", async () => {
  const random = seededRandom(seed + 1);
  let child = await startChild(testDatabase.url);
  const { port } = child;
  const open = (person: CastPerson) => openWriter({ port, notebookId, cookie: person.cookie });
  const [first, second] = [open(ada), open(ben)];
  await Promise.all([first.synced(), second.synced()]);
  const typists = [typist(first, "x", random), typist(second, "y", random)];
  for (let kill = 0; kill < 2; kill += 1) {
    await sleep(300 + random() * 500); // typing, not waiting for anything
    await child.end("SIGKILL");
    child = await startChild(testDatabase.url, port);
  }
  for (const each of typists) each.stop();
  await Promise.all([first.allSaved(), second.allSaved()]);
  const fresh = open(ada);
  await fresh.synced();
  for (const each of typists) {
    const numbers = marksIn(fresh, each.name).map((mark) => Number(mark.slice(1)));
    expect(numbers.sort((a, b) => a - b)).toEqual(Array.from({ length: each.typed() }, (_, index) => index));
  }
  expect(first.text()).toBe(fresh.text());
  for (const each of [first, second, fresh]) each.stop();
  expect(await child.end("SIGTERM")).toBe(0);
}, 60_000);
