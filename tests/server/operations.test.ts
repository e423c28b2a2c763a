/** What whoever runs the server relies on: backup and restore, metrics, what is thrown away, and how it stops. */
import { once } from "node:events";
import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import express from "express";
import { pino } from "pino";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as Y from "yjs";
import { prune } from "../../server/commands/prune.ts";
import { openDatabase, rows } from "../../server/data/database.ts";
import { healthRoutes } from "../../server/http/health.ts";
import { Metrics } from "../../server/metrics/metrics.ts";
import { backUp } from "../../server/start/backup.mjs";
import { restore } from "../../server/start/restore.mjs";
import { setStage } from "./collab/stage.ts";
import { until } from "./collab/until.ts";
import { createWorld, type World } from "./http-world.ts";

describe("a backup of a live system", () => {
  const stage = setStage();
  const folder = mkdtempSync(join(tmpdir(), "subleading-test-backup-"));
  const file = join(folder, "everything");
  afterAll(() => rmSync(folder, { recursive: true }));

  it("brings back everything but sessions, while the server runs and people are in the notebook", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    first.type("before");
    await first.allSaved();
    const table = Buffer.from("p;X0\n1;2\n");
    await stage.server.database.raw(
      `insert into attachments (notebook_id, sha256, name, media_type, bytes, size)
       values (?, sha256(?), 'table.csv', 'text/csv', ?, ?)`,
      [notebookId, table, table, table.length],
    );
    backUp(stage.testDatabase.url, file);
    expect(statSync(file).mode & 0o077).toBe(0);
    first.type(" and after");
    await first.allSaved();
    const later = await stage.notebook();
    first.provider.disconnect();

    restore(stage.testDatabase.url, file);
    const database = stage.server.database;
    // The pool finds out connection by connection that they were ended.
    await until("the server's connections are new", async () => {
      const asked = Array.from({ length: 10 }, () => database.raw("select 1"));
      return (await Promise.allSettled(asked)).every(({ status }) => status === "fulfilled");
    });
    const ids = (await rows<{ id: string }>(database, "select id from notebooks")).map(({ id }) => id);
    expect(ids).toEqual([notebookId]);
    expect(ids).not.toContain(later);
    expect(await rows(database, "select 1 from sessions")).toEqual([]);
    expect(await rows(database, "select name, bytes from attachments")).toEqual([
      { name: "table.csv", bytes: table },
    ]);
    const document = new Y.Doc();
    for (const { update } of await stage.store.readAfter(notebookId, 0)) Y.applyUpdate(document, update);
    expect(document.getXmlFragment("prose").toJSON()).toBe("<paragraph>before</paragraph>");

    // A second time, from what was restored: the layout came back whole.
    backUp(stage.testDatabase.url, file);
    restore(stage.testDatabase.url, file);
  });

  it("that is broken changes nothing, and says so", () => {
    backUp(stage.testDatabase.url, file);
    const whole = readFileSync(file);
    writeFileSync(file, whole.subarray(0, whole.length / 2));
    expect(() => restore(stage.testDatabase.url, file)).toThrow(/pg_restore failed/);
    expect(() => restore(stage.testDatabase.url, join(folder, "none"))).toThrow(/There is no file/);
  });
});

describe("what nobody needs any more", () => {
  const stage = setStage();
  const key = (letter: string) => letter.repeat(64);

  it("goes after 90 days: folded rows, and results that no notebook and no pin names", async () => {
    const { database } = stage.server;
    const notebookId = await stage.notebook();
    const document = new Y.Doc();
    const updates: Uint8Array[] = [];
    document.on("update", (update: Uint8Array) => updates.push(update));
    const pin = new Y.XmlElement("pin");
    document.getXmlFragment("prose").insert(0, [pin]);
    pin.setAttribute("key", key("a"));
    document.getXmlFragment("prose").insert(1, [new Y.XmlElement("paragraph")]);
    for (const [index, update] of updates.entries())
      await database.raw(
        "insert into document_updates (notebook_id, seq, update, committed_at) values (?, ?, ?, now() - interval '91 days')",
        [notebookId, index + 1, Buffer.from(update)],
      );
    await database.raw("update notebooks set last_seq = ? where id = ?", [updates.length, notebookId]);
    await database.raw("insert into document_states (notebook_id, seq, state) values (?, 2, ?)", [
      notebookId,
      Buffer.from(Y.mergeUpdates(updates.slice(0, 2))),
    ]);
    for (const [letter, days] of [
      ["a", 91],
      ["b", 91],
      ["c", 91],
      ["d", 89],
    ] as const)
      await database.raw(
        `insert into results (key, engine_version, inputs, value, created_at)
         values (?, '2', '{}', '{}', now() - make_interval(days => ?))`,
        [key(letter), days],
      );
    await database.raw("insert into notebook_results (notebook_id, block_id, key) values (?, 'one', ?)", [
      notebookId,
      key("b"),
    ]);

    expect(await prune(database)).toEqual({ rows: 2, results: 1, attachments: 0 });
    const left = await rows<{ key: string }>(database, "select r.key from results r order by r.key");
    expect(left.map((result) => result.key)).toEqual([key("a"), key("b"), key("d")]);
    const writer = await stage.write(stage.ada, notebookId);
    expect(writer.document.getXmlFragment("prose").toJSON()).toBe(document.getXmlFragment("prose").toJSON());
    expect(await prune(database)).toEqual({ rows: 0, results: 0, attachments: 0 });
  });
});

describe("metrics", () => {
  const token = "a token for tests only, long enough";
  let world: World;
  beforeAll(async () => {
    world = await createWorld({ environment: { METRICS_TOKEN: token } });
  });
  afterAll(() => world.stop());

  it("are written as Prometheus reads them", () => {
    const metrics = new Metrics();
    metrics.counter("things_total", "Things.").add({ name: 'a "b"\n\\' }, 2);
    metrics.gauge("warmth", "How warm.", () => 1.5);
    const times = metrics.histogram("took_seconds", "Time.", [0.1, 1]);
    times.observe(0.05);
    times.observe(0.5);
    // Lines as in "Exposition formats" of the Prometheus documentation, version 0.0.4.
    expect(metrics.text()).toBe(
      [
        "# HELP things_total Things.",
        "# TYPE things_total counter",
        'things_total{name="a \\"b\\"\\n\\\\"} 2',
        "# HELP warmth How warm.",
        "# TYPE warmth gauge",
        "warmth 1.5",
        "# HELP took_seconds Time.",
        "# TYPE took_seconds histogram",
        'took_seconds_bucket{le="0.1"} 1',
        'took_seconds_bucket{le="1"} 2',
        'took_seconds_bucket{le="+Inf"} 2',
        "took_seconds_sum 0.55",
        "took_seconds_count 2",
        "",
      ].join("\n"),
    );
  });

  it("are there on loopback, and not for who comes through a proxy or with a wrong token", async () => {
    const ask = (headers: Record<string, string> = {}) =>
      fetch(`${world.server.address}/metrics`, { headers });
    await fetch(`${world.server.address}/api/me`);
    const answer = await ask();
    expect(answer.status).toBe(200);
    expect(answer.headers.get("content-type")).toContain("text/plain; version=0.0.4");
    const text = await answer.text();
    for (const name of [
      "process_cpu_seconds_total",
      "subleading_sockets 0",
      "subleading_request_seconds_bucket",
    ])
      expect(text).toContain(name);
    expect((await ask({ "x-forwarded-for": "192.0.2.1" })).status).toBe(404);
    expect((await ask({ authorization: "Bearer something else, long enough" })).status).toBe(404);
    const told = await ask({ authorization: `Bearer ${token}`, "x-forwarded-for": "192.0.2.1" });
    expect(told.status).toBe(200);
  });
});

it("a server that is stopping is alive and not ready", async () => {
  const stopping = new AbortController();
  const log = pino({ level: "silent" });
  const database = openDatabase(process.env["SUBLEADING_TEST_DATABASE_URL"]!, { most: 1 });
  const server = express()
    .use(healthRoutes({ database, log, stopping: stopping.signal }))
    .listen(0, "127.0.0.1");
  await once(server, "listening");
  const { port } = server.address() as AddressInfo; // it listens on a port
  const statusOf = async (path: string) => (await fetch(`http://127.0.0.1:${port}${path}`)).status;
  expect(await statusOf("/readyz")).toBe(200);
  stopping.abort();
  expect([await statusOf("/healthz"), await statusOf("/readyz")]).toEqual([200, 503]);
  server.close();
  server.closeAllConnections();
  await database.destroy();
});
