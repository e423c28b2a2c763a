/** Files kept as they were read in: what may be kept, how it comes back, and when it goes. */
import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as Y from "yjs";
import type { Notebook } from "#contract/api.ts";
import { ATTACHMENT_CONTENT_TYPE, LARGEST_ATTACHMENT_BYTES } from "#contract/attachment-type.ts";
import type { Attachment } from "#contract/attachments.ts";
import { prune } from "../../server/commands/prune.ts";
import { rows } from "../../server/data/database.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, type World } from "./http-world.ts";

let world: World;
let wren: Browser;
beforeAll(async () => {
  world = await createWorld();
  wren = await world.signIn("wren-lantern");
});
afterAll(() => world.stop());

const made = async () => (await wren.post<Notebook>("/api/notebooks", { title: "Files" })).body.id;
const keep = (id: string, name: string, rawBody: string, headers: Record<string, string> = {}) =>
  wren.post<Attachment & { detail: string }>(
    `/api/notebooks/${id}/attachments?${new URLSearchParams({ name }).toString()}`,
    undefined,
    { rawBody, headers: { "content-type": ATTACHMENT_CONTENT_TYPE, ...headers } },
  );
const fetched = (id: string, attachment: string) =>
  wren.get(`/api/notebooks/${id}/attachments/${attachment}`);

describe("a file that is kept", () => {
  it("comes back byte for byte, to be saved and never to be shown", async () => {
    const id = await made();
    const table = "\uFEFFp (MeV);X0\r\n1,5;−2\r\n";
    const kept = await keep(id, 'größe "2".csv', table);
    expect(kept.status).toBe(201);
    expect(kept.body).toMatchObject({ name: 'größe "2".csv', size: Buffer.byteLength(table) });
    const back = await fetched(id, kept.body.id);
    expect(back.status).toBe(200);
    // `fetch` takes the byte-order mark off a text; all else must be there.
    expect(back.text).toBe(table.slice(1));
    expect(back.headers.get("content-length")).toBe(String(Buffer.byteLength(table)));
    expect(back.headers.get("content-type")).toBe("text/csv; charset=utf-8");
    expect(back.headers.get("content-disposition")).toMatch(
      /^attachment; filename=.*filename\*=UTF-8''gr%C3%B6%C3%9Fe/,
    );
    expect(back.headers.get("x-content-type-options")).toBe("nosniff");
    expect(back.headers.get("cache-control")).toBe("no-store");
  });

  it("called a page is text all the same", async () => {
    const id = await made();
    const kept = await keep(id, "page.html", "<script>alert(1)</script>");
    const back = await fetched(id, kept.body.id);
    expect(back.headers.get("content-type")).toBe("text/plain; charset=utf-8");
    expect(back.headers.get("content-disposition")).toMatch(/^attachment/);
  });

  it("twice is kept once", async () => {
    const id = await made();
    const [first, second] = [await keep(id, "a.csv", "x\n1\n"), await keep(id, "a.csv", "x\n1\n")];
    expect(second.body.id).toBe(first.body.id);
    expect((await keep(id, "b.csv", "x\n1\n")).body.id).not.toBe(first.body.id);
    const events = await rows(
      world.database,
      "select 1 from events where notebook_id = ? and what = 'attachment-kept'",
      [id],
    );
    expect(events).toHaveLength(2);
  });

  it("is not there in another notebook, and not behind an address that was made up", async () => {
    const [one, other] = [await made(), await made()];
    const { id } = (await keep(one, "a.csv", "x\n1\n")).body;
    expect((await fetched(other, id)).status).toBe(404);
    expect((await fetched(one, randomUUID())).status).toBe(404);
    expect((await fetched(one, "..%2F..%2Fetc")).status).toBe(404);
  });

  it("goes along with a copy of its notebook, under the id the document names, and stays there alone", async () => {
    const id = await made();
    const kept = await keep(id, "a.csv", "x\n1\n");
    const copy = (await wren.post<Notebook>(`/api/notebooks/${id}/copies`, {})).body.id;
    await world.database("notebooks").where({ id }).delete();
    expect((await fetched(copy, kept.body.id)).text).toBe("x\n1\n");
  });
});

describe("what is not kept", () => {
  it.each([
    ["nothing", "a.csv", "", 422],
    ["what is no text", "a.csv", "a\0b", 422],
    ["a name with a path", "../a.csv", "x\n1\n", 422],
    ["no name", " ", "x\n1\n", 422],
    ["more than 10 MB", "a.csv", "1".repeat(LARGEST_ATTACHMENT_BYTES + 1), 413],
  ])("%s", async (_, name, text, status) => {
    const id = await made();
    const answer = await keep(id, name, text);
    expect([answer.status, answer.headers.get("content-type")]).toEqual([
      status,
      "application/problem+json; charset=utf-8",
    ]);
    expect(await rows(world.database, "select 1 from attachments where notebook_id = ?", [id])).toEqual([]);
  });

  it("what is sent without the page's token, from another site, or as something else", async () => {
    const id = await made();
    const address = `/api/notebooks/${id}/attachments?name=a.csv`;
    const headers = { "content-type": ATTACHMENT_CONTENT_TYPE };
    const statuses = [
      await wren.post(address, undefined, { rawBody: "x", headers, withoutToken: true }),
      await wren.post(address, undefined, {
        rawBody: "x",
        headers: { ...headers, origin: "https://example.com" },
      }),
      await wren.post(address, undefined, { rawBody: "x", headers: { "content-type": "text/csv" } }),
    ].map(({ status }) => status);
    expect(statuses).toEqual([403, 403, 415]);
  });

  it("what goes beyond 100 MB of one notebook, and what comes when it is archived", async () => {
    const id = await made();
    // Ten rows that say how large they are; the table checks that they do not lie.
    await world.database.raw(
      `insert into attachments (notebook_id, sha256, name, media_type, bytes, size)
       select ?, sha256(n::text::bytea), 'large', 'text/plain', convert_to(repeat('1', 9999999), 'UTF8'), 9999999
         from generate_series(1, 10) n`,
      [id],
    );
    expect((await keep(id, "a.csv", "0123456789\n")).status).toBe(413);
    expect((await keep(id, "a.csv", "012345678\n")).status).toBe(201);
    await wren.patch(`/api/notebooks/${id}`, { archived: true });
    expect((await keep(id, "a.csv", "x\n")).status).toBe(409);
  });
});

describe("uploads", () => {
  it("are counted: too many of them wait", async () => {
    const strict = await createWorld({ environment: { RATE_LIMIT_FACTOR: "0.05" } });
    const browser = await strict.signIn("wren-lantern");
    const address = `/api/notebooks/${randomUUID()}/attachments?name=a.csv`;
    const post = () =>
      browser.post(address, undefined, {
        rawBody: "x",
        headers: { "content-type": ATTACHMENT_CONTENT_TYPE },
      });
    const statuses = [await post(), await post(), await post()].map(({ status }) => status);
    await strict.stop();
    expect(statuses).toEqual([404, 404, 429]);
  });
});

describe("a file that no block names any more", () => {
  it("goes after 30 days; one that is named stays, in its notebook only", async () => {
    const [id, other] = [await made(), await made()];
    const named = (await keep(id, "named.csv", "x\n1\n")).body.id;
    const unnamed = (await keep(id, "unnamed.csv", "x\n2\n")).body.id;
    const young = (await keep(id, "young.csv", "x\n3\n")).body.id;
    const elsewhere = (await keep(other, "other.csv", "x\n4\n")).body.id;
    const document = new Y.Doc();
    const block = new Y.XmlElement("data");
    document.getXmlFragment("prose").insert(0, [block]);
    block.setAttribute("original", `${named} named.csv`);
    const paragraph = new Y.XmlText(elsewhere);
    document.getXmlFragment("prose").insert(1, [paragraph]);
    const seq = (await rows<{ last_seq: string }>(world.database, "select last_seq from notebooks where id = ?", [id]))[0]; // prettier-ignore
    await world.database.raw("insert into document_updates (notebook_id, seq, update) values (?, ?, ?)", [
      id,
      Number(seq?.last_seq) + 1,
      Buffer.from(Y.encodeStateAsUpdate(document)),
    ]);
    await world.database.raw(
      "update attachments set created_at = now() - interval '31 days' where notebook_id in (?, ?) and id <> ?",
      [id, other, young],
    );
    expect((await prune(world.database)).attachments).toBe(2);
    const statuses = [await fetched(id, named), await fetched(id, unnamed), await fetched(id, young), await fetched(other, elsewhere)]; // prettier-ignore
    expect(statuses.map(({ status }) => status)).toEqual([200, 404, 200, 404]);
  });
});
