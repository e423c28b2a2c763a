/**
 * PostgreSQL crashes under people who type, stays away, and comes back. Two seconds here; GONE_MS makes it longer;
 * `npm run bench` takes 20.
 */
import { chmodSync, mkdtempSync, rmSync } from "node:fs";
import { join } from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { expect, test } from "vitest";
import { openDatabase } from "../../../server/data/database.ts";
import { migrateToLatest } from "../../../server/data/migrate.ts";
import { ensureCluster } from "../../../server/start/postgres.mjs";
import { addNotebook, addPerson } from "./cast.ts";
import { startCollabServer } from "./collab-server.ts";
import { until } from "./until.ts";
import { openWriter } from "./writer.ts";

const goneMs = Number(process.env["GONE_MS"] ?? "2000");

test(`PostgreSQL is gone for ${goneMs} ms: people are told, typing goes on, and everything arrives`, async () => {
  const folder = mkdtempSync("/var/tmp/subleading-test-gone-");
  chmodSync(folder, 0o711);
  // With fsync: what was committed must survive the crash.
  const cluster = await ensureCluster({ folder: join(folder, "postgres") });
  cluster.ensureDatabase("gone");
  const url = cluster.url("gone");
  const database = openDatabase(url, { most: 2 });
  await migrateToLatest(database);
  const ada = await addPerson(database, "Ada");
  const ben = await addPerson(database, "Ben");
  const notebookId = await addNotebook(database, [
    [ada, "owner"],
    [ben, "author"],
  ]);
  const server = await startCollabServer(url);
  const [first, second] = [ada, ben].map(({ cookie }) =>
    openWriter({ port: server.port, notebookId, cookie }),
  );
  if (first === undefined || second === undefined) throw new Error("there are two");
  await Promise.all([first.synced(), second.synced()]);
  first.type("*");
  await until("the other has it", () => second.text() === "*");
  let typed = 1;
  const timer = setInterval(() => {
    first.type("a");
    second.type("b");
    typed += 2;
  }, 30);

  cluster.halt();
  const left = typed;
  for (const writer of [first, second])
    await until("they are told that it is away", () =>
      writer.notices.some(({ about }) => about === "store-unreachable"),
    );
  const shown = second.text();
  await sleep(goneMs); // it stays away
  expect(typed).toBeGreaterThan(left);
  // What is not stored is shown to nobody else.
  expect(second.text().replaceAll("b", "")).toBe(shown.replaceAll("b", ""));
  // Other notices may follow at once, of what was missed meanwhile.
  const heard = first.notices.length;
  await cluster.restart();
  await until("they are told that it is back", () =>
    first.notices.slice(heard).some(({ about }) => about === "store-back"),
  );
  clearInterval(timer);
  await Promise.all([first.allSaved(), second.allSaved()]);
  await until("both have all", () => first.text() === second.text());
  expect(first.text()).toHaveLength(typed);
  const third = openWriter({ port: server.port, notebookId, cookie: ada.cookie });
  await third.synced();
  expect(third.text()).toBe(first.text());

  for (const writer of [first, second, third]) writer.stop();
  await server.stop();
  await database.destroy();
  cluster.remove();
  rmSync(folder, { recursive: true, force: true });
}, 120_000);
