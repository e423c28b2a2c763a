import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { Notebook, NotebookList, NotebookResults } from "#contract/api.ts";
import { removeDeletedForGood } from "../../server/commands/deleted-notebooks.ts";
import { firstRow, rows } from "../../server/data/database.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, type World } from "./http-world.ts";

let world: World;
let wren: Browser;
beforeAll(async () => {
  world = await createWorld();
});
afterAll(() => world.stop());
beforeEach(async () => {
  wren = await world.signIn("wren-lantern");
});

const shelf = async (browser: Browser, query = "") =>
  ((await browser.get(`/api/notebooks${query}`)).body as NotebookList).notebooks;
const made = async (body: object) => (await wren.post("/api/notebooks", body)).body as Notebook;

describe("a copy of a notebook", () => {
  it("has text, blocks and results, one owner, and nobody else's rights or links", async () => {
    const original = await made({ title: "Lantern", template: "lantern" });
    await wren.post(`/api/notebooks/${original.id}/invitations`, { to: "otto-lantern", role: "author" });
    const answer = await wren.post(`/api/notebooks/${original.id}/copies`, {});
    expect(answer.status).toBe(201);
    const copy = answer.body as Notebook;
    expect(copy).toMatchObject({
      title: "Copy of Lantern",
      role: "owner",
      schemaVersion: original.schemaVersion,
    });
    expect(copy.people.map(({ login }) => login)).toEqual(["wren-lantern"]);
    const results = async (id: string) =>
      ((await wren.get(`/api/notebooks/${id}/results`)).body as NotebookResults).results.map(
        ({ blockId, key }) => ({ blockId, key }),
      );
    expect(await results(copy.id)).toEqual(await results(original.id));
    expect((await results(copy.id)).length).toBeGreaterThan(3);
    const sizes = await rows<{ bytes: number }>(
      world.database,
      "select length(state) as bytes from document_states where notebook_id in (?, ?)",
      [original.id, copy.id],
    );
    expect(sizes.map(({ bytes }) => bytes > 2_000)).toEqual([true, true]);
  });

  it("is not to be had of a notebook that was deleted", async () => {
    const { id } = await made({});
    await wren.delete(`/api/notebooks/${id}`);
    expect((await wren.post(`/api/notebooks/${id}/copies`, {})).status).toBe(404);
  });
});

describe("a deleted notebook", () => {
  it("stands among the deleted ones and can be brought back by its owner, with its people", async () => {
    const { id } = await made({ title: "Gone and back" });
    await wren.post(`/api/notebooks/${id}/invitations`, { to: "otto-lantern", role: "author" });
    await wren.delete(`/api/notebooks/${id}`);
    expect((await shelf(wren)).map((row) => row.id)).not.toContain(id);
    const [deleted] = (await shelf(wren, "?show=deleted")).filter((row) => row.id === id);
    expect(deleted?.deletedAt).not.toBeNull();
    expect((await wren.get(`/api/notebooks/${id}`)).status).toBe(404);

    expect((await wren.post(`/api/notebooks/${id}/restoration`, {})).status).toBe(200);
    expect((await shelf(wren)).map((row) => row.id)).toContain(id);
    expect((await shelf(wren, "?show=deleted")).map((row) => row.id)).not.toContain(id);
    expect((await wren.get(`/api/notebooks/${id}`)).status).toBe(200);
  });

  it("goes for good after 30 days, and not a day before", async () => {
    const [old, young] = [await made({ title: "Old" }), await made({ title: "Young" })];
    await world.database.raw(
      "update notebooks set deleted_at = now() - interval '30 days 1 minute' where id = ?",
      [old.id],
    );
    await world.database.raw("update notebooks set deleted_at = now() - interval '29 days' where id = ?", [
      young.id,
    ]);
    expect((await shelf(wren, "?show=deleted")).map((row) => row.id)).not.toContain(old.id);
    expect((await wren.post(`/api/notebooks/${old.id}/restoration`, {})).status).toBe(404);
    expect(await removeDeletedForGood(world.database)).toBe(1);
    const left = await firstRow(world.database, "select 1 from notebooks where id = ?", [old.id]);
    expect(left).toBeUndefined();
    expect((await shelf(wren, "?show=deleted")).map((row) => row.id)).toContain(young.id);
  });
});

describe("the search of the shelf", () => {
  it("finds what stands in the text, and shows the words around it", async () => {
    const { id } = await made({ title: "Nothing to see", template: "lantern" });
    const [found] = (await shelf(wren, "?search=INVENTED")).filter((row) => row.id === id);
    expect(found?.excerpt).toContain("invented");
    expect(found?.excerpt?.length).toBeLessThanOrEqual(140);
    expect((await shelf(wren, "?search=Nothing%20to%20see"))[0]?.excerpt).toBeNull();
    expect(await shelf(wren, "?search=no%20such%20word%20anywhere")).toEqual([]);
  });

  it("takes % and _ for themselves", async () => {
    expect(await shelf(wren, "?search=%25_%25")).toEqual([]);
  });
});
