import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { createTestDatabase, type TestDatabase } from "../database.ts";
import { addNotebook, addPerson, type CastPerson } from "./cast.ts";
import { startCollabServer, type CollabServer } from "./collab-server.ts";
import { until } from "./until.ts";
import { openWriter } from "./writer.ts";

let testDatabase: TestDatabase;
let server: CollabServer;
let ada: CastPerson;
let ben: CastPerson;

beforeAll(async () => {
  testDatabase = await createTestDatabase();
  server = await startCollabServer(testDatabase.url);
  ada = await addPerson(server.database, "Ada");
  ben = await addPerson(server.database, "Ben");
});
afterAll(async () => {
  await server.stop();
  await testDatabase.drop();
});
const newNotebook = () =>
  addNotebook(server.database, [
    [ada, "owner"],
    [ben, "author"],
  ]);
const open = (person: CastPerson, notebookId: string) =>
  openWriter({ port: server.port, notebookId, cookie: person.cookie });

describe("two people in one notebook", () => {
  test("see each other's typing, and it is saved", async () => {
    const notebookId = await newNotebook();
    const first = open(ada, notebookId);
    const second = open(ben, notebookId);
    await first.synced();
    await second.synced();
    first.type("power counting");
    await until("the second sees it", () => second.text() === "power counting");
    second.type(" together");
    await until("the first sees it", () => first.text() === "power counting together");
    await first.allSaved();
    await second.allSaved();
    first.stop();
    second.stop();
    await until("the room is closed", () => server.collab.rooms.find(notebookId) === undefined);
    const later = open(ben, notebookId);
    await later.synced();
    expect(later.text()).toBe("power counting together");
    later.stop();
  });
});
