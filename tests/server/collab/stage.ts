/** A server with Ada (owner), Ben (author), Cleo (reader) and Dora (stranger), and ways to open sockets for them. */
import { afterAll, afterEach, beforeAll } from "vitest";
import { pino } from "pino";
import type { Role } from "../../../client/contract/roles.ts";
import { openDocumentStore, type DocumentStore } from "../../../server/collab/document-store.ts";
import { createTestDatabase, type TestDatabase } from "../database.ts";
import { addNotebook, addPerson, type CastPerson } from "./cast.ts";
import { startCollabServer, type CollabServer, type Parts } from "./collab-server.ts";
import { openRaw, type RawOptions, type RawSocket } from "./raw-socket.ts";
import { openWriter, type Writer, type WriterOptions } from "./writer.ts";

export interface Stage {
  readonly testDatabase: TestDatabase;
  server: CollabServer;
  /** A store beside the server's, as another process would have it. */
  readonly store: DocumentStore;
  readonly ada: CastPerson;
  readonly ben: CastPerson;
  readonly cleo: CastPerson;
  readonly dora: CastPerson;
  notebook(people?: readonly (readonly [CastPerson, Role])[]): Promise<string>;
  /** Synced when it resolves. */
  write(person: CastPerson, notebookId: string, more?: Partial<WriterOptions>): Promise<Writer>;
  raw(person: CastPerson | null, notebookId: string, more?: Partial<RawOptions>): Promise<RawSocket>;
}

export function setStage(parts: Parts = {}): Stage {
  const opened: { stop(): void }[] = [];
  const stage = {} as { -readonly [Name in keyof Stage]: Stage[Name] }; // filled before the first test
  beforeAll(async () => {
    stage.testDatabase = await createTestDatabase();
    stage.server = await startCollabServer(stage.testDatabase.url, parts);
    const { database } = stage.server;
    stage.store = openDocumentStore({
      database,
      databaseUrl: stage.testDatabase.url,
      log: pino({ level: "silent" }),
    });
    stage.ada = await addPerson(database, "Ada");
    stage.ben = await addPerson(database, "Ben");
    stage.cleo = await addPerson(database, "Cleo");
    stage.dora = await addPerson(database, "Dora");
    stage.notebook = (people) =>
      addNotebook(
        database,
        people ?? [
          [stage.ada, "owner"],
          [stage.ben, "author"],
          [stage.cleo, "reader"],
        ],
      );
    stage.write = async (person, notebookId, more) => {
      const writer = openWriter({ port: stage.server.port, notebookId, cookie: person.cookie, ...more });
      opened.push(writer);
      await writer.synced();
      return writer;
    };
    stage.raw = async (person, notebookId, more) => {
      const socket = await openRaw({ port: stage.server.port, notebookId, cookie: person?.cookie, ...more });
      opened.push(socket);
      return socket;
    };
  });
  afterEach(() => {
    for (const each of opened.splice(0)) each.stop();
  });
  afterAll(async () => {
    await stage.store.stop();
    await stage.server.stop();
    await stage.testDatabase.drop();
  });
  return stage;
}
