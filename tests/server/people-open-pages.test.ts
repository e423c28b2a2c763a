/** What becomes of a page that is open when its person's access changes: within a second, over the whole server. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { closeCode } from "#contract/collab.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, eventually, type World } from "./http-world.ts";
import { assembleCast, setScene, type Cast, type Scene, type Who } from "./roles-scene.ts";
import { HandSocket } from "./roles-socket.ts";

const A_SECOND_MS = 1_000;

let world: World;
let cast: Cast;
let owner: Browser;
let scene: Scene;
let token: string;
beforeAll(async () => {
  world = await createWorld();
  cast = await assembleCast(world);
  owner = cast.browsers.get("owner")!;
});
afterAll(() => world.stop());
beforeEach(async () => {
  const set = await setScene(world, cast, "referee link");
  scene = set.scene;
  token = set.actor.token;
});

const at = (path: string) => `/api/notebooks/${scene.notebookId}${path}`;
const idOf = (who: Who) => cast.browsers.get(who)!.id;
async function openPage(who: Who, browser = cast.browsers.get(who)!): Promise<HandSocket> {
  const socket = await HandSocket.open({ who, browser, token }, scene);
  if (!(socket instanceof HandSocket)) throw new Error(`Refused: ${socket}`);
  return socket;
}
/** How long it takes from the answer to the request until the page knows. */
async function measure(change: Promise<{ status: number }>, isKnown: () => boolean): Promise<number> {
  expect((await change).status).toBeLessThan(300);
  const begun = performance.now();
  await eventually(() => (isKnown() ? true : null));
  return performance.now() - begun;
}
const isReadOnly = (page: HandSocket) => page.notices().some(({ about }) => about === "read-only");
const isWritable = (page: HandSocket) => page.notices().some(({ about }) => about === "writable");

describe("an open page", () => {
  it("is read-only once its person is demoted, and writable again once promoted", async () => {
    const page = await openPage("author");
    const demote = owner.put(at(`/people/${idOf("author")}`), { role: "reader" });
    expect(await measure(demote, () => isReadOnly(page))).toBeLessThan(A_SECOND_MS);
    const promote = owner.put(at(`/people/${idOf("author")}`), { role: "author" });
    expect(await measure(promote, () => isWritable(page))).toBeLessThan(A_SECOND_MS);
    await page.close();
  });

  it("is cut once its person is removed, and others' pages stay", async () => {
    const [page, other] = [await openPage("author"), await openPage("reader")];
    const remove = owner.delete(at(`/people/${idOf("author")}`));
    expect(await measure(remove, () => page.closedWith !== null)).toBeLessThan(A_SECOND_MS);
    expect([page.closedWith, other.closedWith]).toEqual([closeCode.forbidden, null]);
    expect(
      await HandSocket.open({ who: "author", browser: cast.browsers.get("author")!, token }, scene),
    ).toBe("not-found");
    await other.close();
  });

  it("is read-only while the notebook is archived", async () => {
    const page = await openPage("author");
    const archive = owner.patch(at(""), { archived: true });
    expect(await measure(archive, () => isReadOnly(page))).toBeLessThan(A_SECOND_MS);
    const restore = owner.patch(at(""), { archived: false });
    expect(await measure(restore, () => isWritable(page))).toBeLessThan(A_SECOND_MS);
    await page.close();
  });

  it("is told of a new title", async () => {
    const page = await openPage("reader");
    const rename = owner.patch(at(""), { title: "Another" });
    const isTold = () => page.notices().some(({ about }) => about === "notebook");
    expect(await measure(rename, isTold)).toBeLessThan(A_SECOND_MS);
    await page.close();
  });

  it("is cut when the notebook is deleted, a referee's too", async () => {
    const [page, referee] = [await openPage("reader"), await openPage("referee link")];
    const remove = owner.delete(at(""));
    const areCut = () => page.closedWith !== null && referee.closedWith !== null;
    expect(await measure(remove, areCut)).toBeLessThan(A_SECOND_MS);
    expect([page.closedWith, referee.closedWith]).toEqual([closeCode.notFound, closeCode.notFound]);
  });

  it("is cut when its session is signed out, and not when another one is", async () => {
    const [here, there] = [await world.signIn("otto-lantern"), await world.signIn("otto-lantern")];
    const [page, other] = [await openPage("author", here), await openPage("author", there)];
    const signOut = here.post("/auth/sign-out");
    expect(await measure(signOut, () => page.closedWith !== null)).toBeLessThan(A_SECOND_MS);
    expect([page.closedWith, other.closedWith]).toEqual([closeCode.signedOut, null]);
    await other.close();
  });

  it("of a referee is cut when the link is revoked", async () => {
    const page = await openPage("referee link");
    const revoke = owner.delete(at(`/referee-links/${scene.linkId}`));
    expect(await measure(revoke, () => page.closedWith !== null)).toBeLessThan(A_SECOND_MS);
    expect(page.closedWith).toBe(closeCode.forbidden);
  });

  it("of a referee is cut when the link expires", async () => {
    const soon = new Date(Date.now() + 3_000).toISOString();
    const created = await owner.post(at("/referee-links"), { name: "Brief", expiresAt: soon });
    token = created.body.token;
    const page = await openPage("referee link");
    await eventually(() => (page.closedWith === null ? null : true));
    expect(page.closedWith).toBe(closeCode.forbidden);
    expect(Date.now() - Date.parse(soon)).toBeLessThan(A_SECOND_MS);
  });
});
