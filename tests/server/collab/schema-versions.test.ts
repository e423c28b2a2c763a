/** Editors older and newer than the stored document. */
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { firstRow } from "../../../server/data/database.ts";
import { accessScene } from "./access-scene.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";

const stage = setStage();
const { storedRows } = accessScene(stage);

describe("an editor with an older schema", () => {
  const setSchema = (notebookId: string, version: number) =>
    stage.server.database.raw("update notebooks set schema_version = ? where id = ?", [version, notebookId]);

  test.each([
    ["older", SCHEMA_VERSION],
    ["not said", null],
  ])("%s: is told to reload and sees no document", async (_name, schema) => {
    const notebookId = await stage.notebook();
    await setSchema(notebookId, SCHEMA_VERSION + 1);
    const socket = await stage.raw(stage.ada, notebookId, { schema });
    expect(await socket.closedWith()).toBe(closeCode.schemaTooOld);
    expect(socket.frames).toEqual([]);
    expect(stage.server.collab.rooms.find(notebookId)).toBeUndefined();
  });

  test("a newer editor raises the schema with its first change, and older ones are cut", async () => {
    const notebookId = await stage.notebook();
    const older = await stage.raw(stage.ben, notebookId, { schema: SCHEMA_VERSION });
    const newer = await stage.write(stage.ada, notebookId, { schema: SCHEMA_VERSION + 2 });
    const version = async () =>
      (await firstRow<{ schema_version: number }>(
        stage.server.database,
        "select schema_version from notebooks where id = ?",
        [notebookId],
      ))!.schema_version;
    expect(await version()).toBe(1);
    expect(older.closed()).toBeNull();
    newer.document.getXmlFragment(FRAGMENT).insert(0, [new Y.XmlElement("novelty")]);
    expect(await older.closedWith()).toBe(closeCode.schemaTooOld);
    expect(await version()).toBe(SCHEMA_VERSION + 2);
    expect(newer.closes).toEqual([]);
  });

  test("raised by another process: what an older editor sends is not stored, and it is cut", async () => {
    const notebookId = await stage.notebook();
    const older = await stage.write(stage.ada, notebookId);
    await setSchema(notebookId, SCHEMA_VERSION + 1);
    older.type("by an older page");
    await until("it is cut", () => older.closes.some(({ code }) => code === closeCode.schemaTooOld));
    expect(await storedRows(notebookId)).toBe(0);
  });
});
