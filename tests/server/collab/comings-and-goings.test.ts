/** Loading, leaving and closing while the store is slow: one state machine per notebook. */
import { describe, expect, test } from "vitest";
import { openRaw } from "./raw-socket.ts";
import { connectionLost, setSlowStage } from "./slow-stage.ts";
import { until } from "./until.ts";
import { openWriter } from "./writer.ts";

const { stage, store, stored, roomOf } = setSlowStage();

describe("a slow store and people who come and go", () => {
  const at = (notebookId: string) => ({ port: stage.server.port, notebookId, cookie: stage.ada.cookie });

  test("one who leaves before the document is loaded pins nothing", async () => {
    const notebookId = await stage.notebook();
    store().shut("load");
    const calls = store().calls("load");
    const leaving = openWriter(at(notebookId));
    await until("it is being loaded", () => store().calls("load") > calls);
    leaving.stop();
    store().open("load");
    await until("the room is closed", () => roomOf(notebookId) === undefined);
  });

  test("one who leaves early does not take the room from one who stays", async () => {
    const notebookId = await stage.notebook();
    store().shut("load");
    const leaving = openWriter(at(notebookId));
    const staying = openWriter(at(notebookId));
    await until("it is being loaded", () => roomOf(notebookId)?.state === "loading");
    leaving.stop();
    store().open("load");
    await staying.synced();
    staying.type("still here");
    await staying.allSaved();
    expect(roomOf(notebookId)!.state).toBe("open");
    staying.stop();
  });

  test("nobody is told that a document is synced before the store was read", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    first.type("there all along");
    await first.allSaved();
    first.stop();
    await until("the room is closed", () => roomOf(notebookId) === undefined);
    store().shut("load");
    const later = openWriter(at(notebookId));
    await until("it is being loaded", () => roomOf(notebookId)?.state === "loading");
    expect([later.provider.wsconnected, later.provider.synced]).toEqual([false, false]);
    store().open("load");
    await later.synced();
    expect(later.text()).toBe("there all along");
    later.stop();
  });

  test("a failed load is an error and not an empty document; the next one succeeds", async () => {
    const notebookId = await stage.notebook();
    const first = await stage.write(stage.ada, notebookId);
    first.type("there all along");
    await first.allSaved();
    first.stop();
    await until("the room is closed", () => roomOf(notebookId) === undefined);
    store().fail("load", { error: connectionLost });
    await expect(openRaw(at(notebookId))).rejects.toThrow("503");
    expect(roomOf(notebookId)).toBeUndefined();
    store().fail("load", null);
    const later = await stage.write(stage.ada, notebookId);
    expect(later.text()).toBe("there all along");
  });

  test("an author who leaves before their typing is stored still has it stored, also for who comes meanwhile", async () => {
    const notebookId = await stage.notebook();
    const author = await stage.write(stage.ada, notebookId);
    await author.allSaved();
    store().shut("append");
    const calls = store().calls("append");
    author.type("last words");
    await until("it is being stored", () => store().calls("append") > calls);
    author.stop();
    await until("the room is being closed", () => roomOf(notebookId)?.state === "draining");
    const coming = await stage.write(stage.ben, notebookId);
    expect(roomOf(notebookId)!.state).toBe("open");
    store().open("append");
    await until("they see it", () => coming.text() === "last words");
    expect(await stored(notebookId)).toBe("last words");
  });

  test("coming back while the room is being tidied up keeps it open, and it closes in the end", async () => {
    const notebookId = await stage.notebook();
    const author = await stage.write(stage.ada, notebookId);
    for (let index = 0; index < 30; index += 1) {
      author.type(`${index} `);
      await author.allSaved();
    }
    store().shut("saveState");
    const calls = store().calls("saveState");
    author.stop();
    await until("it is being compacted", () => store().calls("saveState") > calls);
    for (let visit = 0; visit < 3; visit += 1) {
      const coming = await stage.write(stage.ben, notebookId);
      expect(roomOf(notebookId)!.state).toBe("open");
      coming.stop();
      await until("it is left again", () => roomOf(notebookId)?.state === "draining");
    }
    store().open("saveState");
    await until("the room is closed", () => roomOf(notebookId) === undefined);
  });
});
