/** Who may open a socket on a notebook. */
import { randomUUID } from "node:crypto";
import { describe, expect, test } from "vitest";
import { accessScene } from "./access-scene.ts";
import { addRefereeLink } from "./cast.ts";
import { upgradeStatus } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { openWriter } from "./writer.ts";

const stage = setStage();
const { remove } = accessScene(stage);

describe("opening a socket", () => {
  const cases: readonly (readonly [string, () => Promise<Parameters<typeof upgradeStatus>[0]>, number])[] = [
    ["its owner", async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie }), 101],
    ["a reader", async () => ({ ...at(await stage.notebook()), cookie: stage.cleo.cookie }), 101],
    [
      "a page that names no origin",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, origin: null }),
      101,
    ],
    ["someone signed out", async () => at(await stage.notebook()), 401],
    [
      "a made-up session",
      async () => ({ ...at(await stage.notebook()), cookie: "subleading=s%3Anobody.nothing" }),
      401,
    ],
    ["a stranger", async () => ({ ...at(await stage.notebook()), cookie: stage.dora.cookie }), 404],
    [
      "a page of another site",
      async () => ({
        ...at(await stage.notebook()),
        cookie: stage.ada.cookie,
        origin: "http://elsewhere.test",
      }),
      403,
    ],
    ["a notebook that does not exist", async () => ({ ...at(randomUUID()), cookie: stage.ada.cookie }), 404],
    ["no notebook at all", async () => ({ ...at("x"), path: "/collab/../x", cookie: stage.ada.cookie }), 404],
    ["another address", async () => ({ ...at("x"), path: "/elsewhere", cookie: stage.ada.cookie }), 404],
    [
      "a schema that is no number",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, schema: "one" }),
      400,
    ],
    ["a referee", async () => withToken(await stage.notebook()), 101],
    [
      "a referee with a link of another notebook",
      async () => ({ ...(await withToken(await stage.notebook())), notebookId: await stage.notebook() }),
      404,
    ],
    ["a guessed token", async () => ({ ...at(await stage.notebook()), token: "x".repeat(43) }), 404],
    ["an expired link", async () => withToken(await stage.notebook(), new Date(Date.now() - 1_000)), 403],
    [
      "a member with a bad token",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, token: "bad" }),
      404,
    ],
  ];
  const at = (notebookId: string) => ({ port: stage.server.port, notebookId });
  const withToken = async (notebookId: string, expiresAt?: Date) => ({
    ...at(notebookId),
    token: (await addRefereeLink(stage.server.database, notebookId, expiresAt ? { expiresAt } : {})).token,
  });

  test.each(cases)("%s", async (_who, wish, status) => {
    const options = await wish();
    expect(await upgradeStatus(options)).toBe(status);
    // Who is refused has made no room.
    if (status !== 101) expect(stage.server.collab.rooms.find(options.notebookId)).toBeUndefined();
  });

  test("a revoked link, a deleted notebook, a removed person", async () => {
    const notebookId = await stage.notebook();
    const { token, id } = await addRefereeLink(stage.server.database, notebookId);
    await stage.server.database.raw("update referee_links set revoked_at = now() where id = ?", [id]);
    expect(await upgradeStatus({ ...at(notebookId), token })).toBe(403);
    await remove(notebookId, stage.ben);
    expect(await upgradeStatus({ ...at(notebookId), cookie: stage.ben.cookie })).toBe(404);
    await stage.server.database.raw("update notebooks set deleted_at = now() where id = ?", [notebookId]);
    expect(await upgradeStatus({ ...at(notebookId), cookie: stage.ada.cookie })).toBe(404);
  });
});

test("someone who is refused never gets further by trying again", async () => {
  const notebookId = await stage.notebook();
  const dora = openWriter({ port: stage.server.port, notebookId, cookie: stage.dora.cookie });
  await until("she has tried several times", () => dora.sockets() >= 3);
  expect(dora.provider.synced).toBe(false);
  dora.stop();
});
