import { createHash } from "node:crypto";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { RefereeLinkCreated, RefereeView } from "#contract/api.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { rows } from "../../server/data/database.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, eventually, type World } from "./http-world.ts";

let world: World;
let wren: Browser;
let notebookId: string;
const at = (path: string) => `/api/notebooks/${notebookId}${path}`;

beforeAll(async () => {
  world = await createWorld();
  wren = await world.signIn("wren-lantern");
  await world.signIn("otto-lantern");
});
afterAll(() => world.stop());
beforeEach(async () => {
  notebookId = (await wren.post("/api/notebooks", { title: "Lantern" })).body.id;
});

async function create(wish: object = {}): Promise<RefereeLinkCreated> {
  const answer = await wren.post<RefereeLinkCreated>(at("/referee-links"), { name: "Journal", ...wish });
  expect(answer.status).toBe(201);
  return answer.body;
}
const open = (token: string) =>
  world.stranger().get<RefereeView & { type: string; detail: string }>(`/api/referee/${token}`);
const links = async () => (await wren.get(at("/referee-links"))).body;

describe("a referee link", () => {
  it("has 256 random bits, of which only the hash is kept", async () => {
    const [one, other] = [await create(), await create()];
    expect(one.token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(one.token).not.toBe(other.token);
    const stored = await rows<{ token_hash: Buffer }>(
      world.database,
      "select token_hash from referee_links where id = ?",
      [one.link.id],
    );
    expect(stored[0]?.token_hash).toEqual(createHash("sha256").update(one.token).digest());
    const everything = await rows(
      world.database,
      "select (select string_agg(l::text, '') from referee_links l) || (select string_agg(e::text, '') from events e) as text",
    );
    expect(JSON.stringify(everything)).not.toContain(one.token);
  });

  it("opens the notebook for someone without an account", async () => {
    const { token } = await create();
    await wren.post(at("/invitations"), { to: "otto-lantern", role: "author" });
    await wren.post(at("/invitations"), { to: "ines-tern", role: "reader" });
    expect((await open(token)).body).toEqual({
      notebookId,
      title: "Lantern",
      authors: ["Wren Lantern", "Otto Lantern"],
      schemaVersion: SCHEMA_VERSION,
      expiresAt: null,
      results: [],
    });
  });

  it("gives the stored results, and names nobody when authors are hidden", async () => {
    await rows(
      world.database,
      `insert into results (key, engine_version, inputs, value) values (?, '1', '{}', ?)`,
      [
        `key-${notebookId}`,
        JSON.stringify({ value: null, problems: [], notices: [], scalars: [], working: [] }),
      ],
    );
    await rows(
      world.database,
      "insert into notebook_results (notebook_id, block_id, key, changed_by) values (?, 'b', ?, ?)",
      [notebookId, `key-${notebookId}`, wren.id],
    );
    const named = (await open((await create()).token)).body;
    expect(named.results).toMatchObject([
      { blockId: "b", key: `key-${notebookId}`, changedBy: "Wren Lantern" },
    ]);
    const hidden = await open((await create({ hideAuthors: true })).token);
    expect(hidden.body).toMatchObject({ authors: null, results: [{ blockId: "b", changedBy: null }] });
    expect(hidden.text).not.toMatch(/wren|lantern@|Wren/);
  });

  it("says when it was last opened", async () => {
    const { token, link } = await create();
    expect(link.lastOpenedAt).toBeNull();
    await open(token);
    const [{ lastOpenedAt }] = await links();
    expect(Date.now() - Date.parse(lastOpenedAt)).toBeLessThan(60_000);
  });

  it("says in plain words that it was closed, and is announced at once", async () => {
    const { token, link } = await create();
    const heard: object[] = [];
    const forget = world.server.services.accessChanges.onAccessChange((change) => {
      if (change.about === "referee-link") heard.push(change);
    });
    const revoked = await wren.delete(at(`/referee-links/${link.id}`));
    expect(revoked.body).toMatchObject({ id: link.id, revokedAt: expect.stringMatching(/^\d{4}-/) });
    await eventually(() => (heard.length > 0 ? true : null));
    forget();
    expect(heard).toEqual([{ about: "referee-link", notebookId, refereeLinkId: link.id }]);
    const answer = await open(token);
    expect([answer.status, answer.body.type]).toEqual([410, "urn:subleading:gone"]);
    expect(answer.body.detail).toBe("The authors have closed this link. Ask them for a new one.");
    const again = await wren.delete(at(`/referee-links/${link.id}`));
    expect(again.body.revokedAt).toBe(revoked.body.revokedAt);
  });

  it("says that it has expired", async () => {
    const { token, link } = await create({ expiresAt: new Date(Date.now() + 3_600_000).toISOString() });
    expect((await open(token)).status).toBe(200);
    await rows(world.database, "update referee_links set expires_at = now() where id = ?", [link.id]);
    const answer = await open(token);
    expect([answer.status, answer.body.detail]).toEqual([
      410,
      "This link has expired. Ask the authors for a new one.",
    ]);
  });

  it("says that the notebook was withdrawn", async () => {
    const { token } = await create();
    await wren.delete(at(""));
    const answer = await open(token);
    expect([answer.status, answer.body.detail]).toEqual([
      410,
      "The notebook behind this link has been withdrawn by its authors.",
    ]);
  });

  it.each([
    ["in the past", { expiresAt: "2020-01-01T00:00:00Z" }, "The link would have expired already"],
    ["without zone", { expiresAt: "2099-01-01T00:00:00" }, "“expiresAt” is not a valid datetime"],
    ["no time at all", { expiresAt: "soon" }, "“expiresAt” is not a valid datetime"],
    ["with a token of one's own", { token: "a" }, "not known: token"],
    ["without a name", { name: " " }, "“name” may not be empty"],
  ])("is not made with an expiry or body %s", async (_what, wish, words) => {
    const answer = await wren.post(at("/referee-links"), { name: "Journal", ...wish });
    expect(answer.status).toBe(422);
    expect(answer.body.detail).toContain(words);
  });

  it("of one notebook is not revoked through another", async () => {
    const { link, token } = await create();
    const other = (await wren.post("/api/notebooks", {})).body.id;
    expect((await wren.delete(`/api/notebooks/${other}/referee-links/${link.id}`)).status).toBe(404);
    expect((await open(token)).status).toBe(200);
  });

  it.each(["x", "A".repeat(43), "A".repeat(5000), "..%2f.."])("is not the guess %j", async (token) => {
    const answer = await open(token);
    expect([answer.status, answer.body.type]).toEqual([404, "urn:subleading:not-found"]);
    expect(answer.body.detail).toContain("Check that the address was copied whole");
  });

  it("is no character that cannot be stored", async () => {
    expect((await open("%00")).status).toBe(404);
  });
});
