/**
 * Twenty people type, 250 keystrokes a second and then 3,000, and the server is killed and stopped meanwhile: whatever
 * one of them was shown of another, or told to be saved, is there afterwards, and nothing older is missing.
 * KILL_SEED repeats a run; CROWD_ROUNDS makes it longer.
 */
import { setTimeout as sleep } from "node:timers/promises";
import { afterAll, beforeAll, expect, test } from "vitest";
import { FRAGMENT } from "../../../client/contract/collab.ts";
import { openDatabase, type Database } from "../../../server/data/database.ts";
import { createTestDatabase, type TestDatabase } from "../database.ts";
import { addNotebook, addPerson, type CastPerson } from "./cast.ts";
import { startChild, type Child } from "./child.ts";
import { seededRandom } from "./seeded-random.ts";
import { until } from "./until.ts";
import { openWriter, paragraphOf, type Writer } from "./writer.ts";

const PEOPLE = 20;
const rounds = Number(process.env["CROWD_ROUNDS"] ?? "1");
const seed = Number(process.env["KILL_SEED"] ?? Date.now() % 1_000_000);
const random = seededRandom(seed);

let testDatabase: TestDatabase;
let database: Database;
let people: CastPerson[];
let child: Child;

beforeAll(async () => {
  testDatabase = await createTestDatabase();
  database = openDatabase(testDatabase.url);
  people = [];
  for (let index = 0; index < PEOPLE; index += 1) people.push(await addPerson(database, `Typist ${index}`));
  child = await startChild(testDatabase.url);
});
afterAll(async () => {
  await child.end("SIGKILL");
  await database.destroy();
  await testDatabase.drop();
});

interface Typist {
  readonly name: string;
  readonly writer: Writer;
  /** How many of their own marks the server said are committed. */
  savedMarks(): number;
  stop(): void;
}

/** Types marks `name.0;`, `name.1;` at the end of one paragraph, each mark one keystroke and one frame. */
function typist(writer: Writer, name: string, everyMs: number, atOnce: number): Typist {
  let typed = 0;
  const text = paragraphOf(writer.document);
  const frames: { readonly socket: number; readonly frame: number }[] = [];
  const timer = setInterval(() => {
    for (let count = 0; count < atOnce; count += 1) {
      const before = writer.sent();
      text.insert(text.length, `${name}.${typed};`);
      typed += 1;
      // Nothing is sent once the socket is gone.
      if (writer.sent() > before) frames.push({ socket: writer.sockets(), frame: writer.sent() });
    }
  }, everyMs);
  return {
    name,
    writer,
    savedMarks: () => frames.filter(({ socket, frame }) => frame <= writer.savedOn(socket)).length,
    stop: () => clearInterval(timer),
  };
}

function marksOf(text: string, name: string): number[] {
  return text
    .split(";")
    .filter((mark) => mark.startsWith(`${name}.`))
    .map((mark) => Number(mark.slice(name.length + 1)))
    .sort((a, b) => a - b);
}

const cases = [
  { what: "250 keystrokes a second", authors: PEOPLE, everyMs: 80, atOnce: 1, signal: "SIGKILL" },
  { what: "3,000 changes a second", authors: 4, everyMs: 10, atOnce: 8, signal: "SIGKILL" },
  { what: "3,000 changes a second", authors: 4, everyMs: 10, atOnce: 8, signal: "SIGTERM" },
] as const;

test.each(cases)(
  `at $what, then $signal (KILL_SEED=${seed})`,
  async ({ authors, everyMs, atOnce, signal }) => {
    console.info(`KILL_SEED=${seed} CROWD_ROUNDS=${rounds}`);
    for (let round = 0; round < rounds; round += 1) {
      const notebookId = await addNotebook(
        database,
        people.map((person) => [person, "author"] as const),
      );
      const port = child.port;
      const writers = people
        .slice(0, Math.max(2, authors))
        .map((person) => openWriter({ port, notebookId, cookie: person.cookie }));
      await Promise.all(writers.map((writer) => writer.synced()));
      writers[0]?.type(";");
      await until("all have the paragraph", () =>
        writers.every(({ document }) => document.getXmlFragment(FRAGMENT).length === 1),
      );
      const typists = writers.map((writer, index) => typist(writer, `t${index}`, everyMs, atOnce));
      await sleep(700 + random() * 600); // typing, not waiting for anything
      await child.end(signal);
      for (const each of typists) each.stop();

      // Of each author: the most that anyone else was shown, and what they were told is saved.
      const texts = writers.map((writer) => writer.text());
      const shown = typists.map(({ name }, author) =>
        texts.flatMap((text, reader) => (reader === author ? [] : marksOf(text, name))),
      );
      const saved = typists.map((each) => each.savedMarks());
      expect(shown.some((marks) => marks.length > 0)).toBe(true);
      for (const writer of writers) writer.stop();

      child = await startChild(testDatabase.url);
      const fresh = openWriter({ port: child.port, notebookId, cookie: people[0]!.cookie });
      await fresh.synced();
      const text = fresh.text();
      for (const [author, { name }] of typists.entries()) {
        const kept = marksOf(text, name);
        expect(kept).toEqual(kept.map((_, index) => index));
        expect(kept.length).toBeGreaterThanOrEqual(Math.max(-1, ...(shown[author] ?? [])) + 1);
        expect(kept.length).toBeGreaterThanOrEqual(saved[author] ?? 0);
      }
      fresh.stop();
    }
  },
  120_000 + rounds * 60_000,
);
