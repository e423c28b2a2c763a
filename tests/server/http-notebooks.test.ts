import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { Notebook, NotebookList, NotebookResults, NotebookRow } from "#contract/api.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { rows } from "../../server/data/database.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, type World } from "./http-world.ts";

let world: World;
let wren: Browser;
let otto: Browser;
beforeAll(async () => {
  world = await createWorld();
  wren = await world.signIn("wren-lantern");
  otto = await world.signIn("otto-lantern");
});
afterAll(() => world.stop());
beforeEach(async () => {
  await rows(world.database, "delete from notebooks");
});

async function make(browser: Browser, title: string): Promise<Notebook> {
  const answer = await browser.post<Notebook>("/api/notebooks", { title });
  expect(answer.status).toBe(201);
  return answer.body;
}
const titles = (list: NotebookList) => list.notebooks.map(({ title }) => title);
const nowhere = "/api/notebooks/00000000-0000-4000-8000-000000000000";

describe("making a notebook", () => {
  it("makes its maker the owner", async () => {
    const notebook = await make(wren, "Counting the Lantern");
    expect(notebook).toEqual({
      id: notebook.id,
      title: "Counting the Lantern",
      role: "owner",
      schemaVersion: SCHEMA_VERSION,
      people: [{ id: wren.id, login: "wren-lantern", name: "Wren Lantern" }],
      archivedAt: null,
    });
    expect((await wren.get(`/api/notebooks/${notebook.id}`)).body).toEqual(notebook);
  });

  it("has a title for who gives none", async () => {
    expect((await wren.post("/api/notebooks", {})).body.title).toBe("Untitled notebook");
  });

  it("fills it from the template, with results that were computed and pins that hold", async () => {
    const { id } = (await wren.post("/api/notebooks", { title: "Mine", template: "lantern" })).body;
    const { results } = (await wren.get<NotebookResults>(`/api/notebooks/${id}/results`)).body;
    expect(results.length).toBeGreaterThanOrEqual(5);
    for (const { blockId, evaluation } of results) expect(evaluation.problems, blockId).toEqual([]);
    const [row] = (await wren.get<NotebookList>("/api/notebooks")).body.notebooks;
    expect(row).toMatchObject({ title: "Mine", pinsMoved: 0, pinsLoose: 0 });
    expect(row?.premisesLine).toMatch(/^d = 4 · 2 fields · \d+ terms$/);
  });

  it("keeps nothing of one that could not be filled", async () => {
    await rows(world.database, "alter table document_states add constraint full_up check (false) not valid");
    try {
      const answer = await wren.post("/api/notebooks", { title: "Half", template: "lantern" });
      expect([answer.status, answer.body.type]).toEqual([500, "urn:subleading:unexpected"]);
      expect(answer.text).not.toMatch(/constraint|document_states/);
    } finally {
      await rows(world.database, "alter table document_states drop constraint full_up");
    }
    expect((await wren.get("/api/notebooks")).body.notebooks).toEqual([]);
  });

  it.each([
    ["an unknown field", { title: "a", createdBy: "b" }, "not known: createdBy"],
    ["an id of one's own", { id: "00000000-0000-4000-8000-000000000000", title: "a" }, "not known: id"],
    ["an empty title", { title: "   " }, "“title” may not be empty"],
    ["a title that is no text", { title: 5 }, "“title” must be given as string"],
    ["a title too long", { title: "a".repeat(301) }, "“title” may have at most 300 characters"],
    ["an unknown template", { template: "other" }, "must be one of blank, lantern"],
    ["a character that cannot be stored", { title: "a\0b" }, "cannot be stored (U+0000)"],
    ["a list", [], "The request must be given as object"],
  ])("refuses %s", async (_what, body, words) => {
    const answer = await wren.post("/api/notebooks", body);
    expect(answer.status).toBe(422);
    expect(answer.headers.get("content-type")).toMatch(/^application\/problem\+json/);
    expect(answer.body).toMatchObject({ type: "urn:subleading:invalid", status: 422, title: "Not valid" });
    expect(answer.body.detail).toContain(words);
  });

  it.each([
    ["no JSON", '{"title":', 400, "malformed"],
    ["a bare word", '"title"', 400, "malformed"],
    ["a flood", JSON.stringify({ title: "a".repeat(70_000) }), 413, "too-large"],
  ])("refuses %s", async (_what, rawBody, status, code) => {
    const answer = await wren.post("/api/notebooks", undefined, {
      rawBody,
      headers: { "content-type": "application/json" },
    });
    expect([answer.status, answer.body.type]).toEqual([status, `urn:subleading:${code}`]);
  });

  it("reads nothing but JSON", async () => {
    const answer = await wren.post("/api/notebooks", new URLSearchParams({ title: "a" }));
    expect([answer.status, answer.body.type]).toEqual([415, "urn:subleading:unsupported-media"]);
  });
});

describe("changing a notebook", () => {
  it("renames it and says by whom it was changed", async () => {
    const { id } = await make(wren, "Old");
    const answer = await wren.patch(`/api/notebooks/${id}`, { title: " New " });
    expect([answer.status, answer.body.title]).toEqual([200, "New"]);
    const list = (await wren.get<NotebookList>("/api/notebooks")).body;
    expect(list.notebooks[0]).toMatchObject({ title: "New", lastChangedBy: "Wren Lantern" });
  });

  it("archives and restores it, and changes nothing in between", async () => {
    const { id } = await make(wren, "Done");
    expect((await wren.patch(`/api/notebooks/${id}`, { archived: true })).body.archivedAt).toMatch(/^\d{4}-/);
    const refused = await wren.patch(`/api/notebooks/${id}`, { title: "Changed" });
    expect([refused.status, refused.body.type]).toEqual([409, "urn:subleading:archived"]);
    const restored = await wren.patch(`/api/notebooks/${id}`, { archived: false, title: "Changed" });
    expect(restored.body).toMatchObject({ archivedAt: null, title: "Changed" });
  });

  it("assigns no field but those it names", async () => {
    const { id } = await make(wren, "Safe");
    for (const field of [
      "id",
      "schema_version",
      "schemaVersion",
      "deleted_at",
      "last_seq",
      "role",
      "createdBy",
    ])
      expect((await wren.patch(`/api/notebooks/${id}`, { title: "x", [field]: 1 })).status, field).toBe(422);
    expect((await wren.get(`/api/notebooks/${id}`)).body.title).toBe("Safe");
  });

  it("takes a deleted one from every shelf and address", async () => {
    const { id } = await make(wren, "Gone");
    expect((await wren.delete(`/api/notebooks/${id}`)).status).toBe(204);
    expect((await wren.get(`/api/notebooks/${id}`)).status).toBe(404);
    expect((await wren.delete(`/api/notebooks/${id}`)).status).toBe(404);
    expect((await wren.get("/api/notebooks")).body.notebooks).toEqual([]);
    const [{ deleted } = { deleted: null }] = await rows<{ deleted: boolean }>(
      world.database,
      "select deleted_at is not null as deleted from notebooks where id = ?",
      [id],
    );
    expect(deleted).toBe(true);
  });

  it("answers alike for what does not exist and what one may not see", async () => {
    const { id } = await make(wren, "Private");
    const strange = await otto.get(`/api/notebooks/${id}`);
    const missing = await otto.get(nowhere);
    const misspelt = await otto.get("/api/notebooks/not-an-id");
    expect([strange.status, strange.body]).toEqual([404, missing.body]);
    expect([misspelt.status, misspelt.body]).toEqual([404, missing.body]);
  });

  it("records who did what", async () => {
    const { id } = await make(wren, "Recorded");
    await wren.patch(`/api/notebooks/${id}`, { title: "Renamed" });
    await wren.patch(`/api/notebooks/${id}`, { archived: true });
    await wren.delete(`/api/notebooks/${id}`);
    const events = await rows<{ what: string }>(
      world.database,
      "select what from events where notebook_id = ? and person_id = ? order by id",
      [id, wren.id],
    );
    expect(events.map(({ what }) => what)).toEqual([
      "notebook-created",
      "notebook-renamed",
      "notebook-archived",
      "notebook-deleted",
    ]);
  });
});

describe("the shelf", () => {
  /** Made in SQL: many, and with times that differ by microseconds or not at all. */
  async function fill(count: number, owner: Browser, changedAt: string): Promise<void> {
    await rows(
      world.database,
      `with made as (
         insert into notebooks (title, changed_at)
         select 'Notebook ' || lpad(i::text, 4, '0'), ${changedAt} from generate_series(1, ?::int) i returning id
       ) insert into notebook_people (notebook_id, person_id, role) select id, ?, 'owner' from made`,
      [count, owner.id],
    );
  }
  async function readAll(browser: Browser, query: string): Promise<readonly NotebookRow[]> {
    const found: NotebookRow[] = [];
    let cursor: string | null = null;
    do {
      const after: string = cursor === null ? "" : `&cursor=${cursor}`;
      const page: NotebookList = (await browser.get(`/api/notebooks?${query}${after}`)).body;
      found.push(...page.notebooks);
      cursor = page.nextCursor;
    } while (cursor !== null);
    return found;
  }

  it("shows only what one takes part in", async () => {
    await make(wren, "Hers");
    await make(otto, "His");
    expect(titles((await wren.get("/api/notebooks")).body)).toEqual(["Hers"]);
  });

  it.each([
    ["a microsecond apart", "now() - make_interval(secs => i / 1e6)"],
    ["at the same moment", "now()"],
  ])("pages through notebooks changed %s, each once, newest first", async (_how, changedAt) => {
    await fill(123, wren, changedAt);
    for (const sort of ["changed", "title"]) {
      const found = await readAll(wren, `sort=${sort}`);
      expect(new Set(found.map(({ id }) => id)).size).toBe(123);
      expect(found).toHaveLength(123);
    }
    const byTitle = (await readAll(wren, "sort=title")).map(({ title }) => title);
    expect(byTitle).toEqual([...byTitle].sort());
    if (changedAt.includes("interval")) {
      const byChange = (await readAll(wren, "sort=changed")).map(({ title }) => title);
      expect(byChange).toEqual([...byChange].sort());
    }
  });

  it("asks the database the same number of questions for one notebook as for fifty", async () => {
    let questions = 0;
    const count = () => (questions += 1);
    world.server.services.database.on("query", count);
    await fill(1, wren, "now()");
    await wren.get("/api/notebooks");
    const forOne = questions;
    await fill(49, wren, "now()");
    questions = 0;
    expect((await wren.get("/api/notebooks")).body.notebooks).toHaveLength(50);
    world.server.services.database.off("query", count);
    expect(questions).toBe(forOne);
  });

  it("finds by title and by people, taking % and _ for themselves", async () => {
    await make(wren, "Growth of 100% errors");
    const { id } = await make(wren, "Plain_name");
    await make(wren, "Plainer name");
    await wren.post(`/api/notebooks/${id}/invitations`, { to: "otto-lantern", role: "reader" });
    const search = async (text: string) =>
      titles(
        (await wren.get(`/api/notebooks?${new URLSearchParams({ search: text, sort: "title" }).toString()}`))
          .body,
      );
    expect(await search("growth")).toEqual(["Growth of 100% errors"]);
    expect(await search("%")).toEqual(["Growth of 100% errors"]);
    expect(await search("n_n")).toEqual(["Plain_name"]);
    expect(await search("_")).toEqual(["Plain_name"]);
    expect(await search("otto")).toEqual(["Plain_name"]);
    expect(await search("\\")).toEqual([]);
    expect(await search("')--")).toEqual([]);
    expect((await wren.get("/api/notebooks?search=%00")).status).toBe(422);
  });

  it("keeps archived ones apart, and finds those whose pins need a look", async () => {
    const { id } = await make(wren, "Archived");
    await wren.patch(`/api/notebooks/${id}`, { archived: true });
    const moved = await make(wren, "Moved");
    await rows(world.database, "update notebooks set pins_moved = 2 where id = ?", [moved.id]);
    await make(wren, "Quiet");
    expect(titles((await wren.get("/api/notebooks?show=archived")).body)).toEqual(["Archived"]);
    expect(titles((await wren.get("/api/notebooks?sort=title")).body)).toEqual(["Moved", "Quiet"]);
    const attention = (await wren.get<NotebookList>("/api/notebooks?attention=moved")).body;
    expect(attention.notebooks).toMatchObject([{ title: "Moved", pinsMoved: 2, pinsLoose: 0 }]);
  });

  const anId = "00000000-0000-4000-8000-000000000000";
  it.each([
    ["both", "x"],
    ["both", ""],
    ["both", "{}"],
    ["both", "[]"],
    ["both", '["2020","x"]'],
    ["both", JSON.stringify(["\0", anId])],
    ["changed", JSON.stringify(["not a time", anId])],
    ["changed", JSON.stringify(["2026-13-45T00:00:00.000000Z", anId])],
    ["changed", JSON.stringify(["2026-12-01T00:00:00.000000Z'--", anId])],
  ])("refuses, in %s orders, the cursor %j, which it did not write", async (which, cursor) => {
    for (const sort of which === "both" ? ["changed", "title"] : [which]) {
      const query = new URLSearchParams({ sort, cursor: Buffer.from(cursor).toString("base64url") });
      const answer = await wren.get(`/api/notebooks?${query.toString()}`);
      expect([answer.status, answer.body.type]).toEqual([422, "urn:subleading:invalid"]);
    }
  });

  it("refuses an unknown order", async () => {
    expect((await wren.get("/api/notebooks?sort=size")).status).toBe(422);
  });
});
