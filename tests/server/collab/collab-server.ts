/** A real HTTP server with co-editing on it, sessions and access changes included, and nothing else. */
import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { pino, type Logger } from "pino";
import { attachCollab, type Collab, type CollabDependencies } from "../../../server/collab/attach-collab.ts";
import { readConfiguration, type Configuration } from "../../../server/configuration.ts";
import { openDatabase, type Database } from "../../../server/data/database.ts";
import { openSessions } from "../../../server/http/sessions.ts";
import { listenForAccessChanges } from "../../../server/policies/access-changes.ts";

export const sessionSecret = "a secret for tests only, long enough";
/** What pages of this server say as their Origin. */
export const publicUrl = "http://notebooks.test";

export interface CollabServer {
  readonly port: number;
  readonly database: Database;
  readonly collab: Collab;
  stop(): Promise<void>;
}

export type Parts = Partial<
  Omit<CollabDependencies, "configuration" | "database" | "sessions" | "accessChanges" | "log">
> & {
  readonly log?: Logger;
  readonly port?: number;
  /** Made of the database, which exists only once the server starts. */
  readonly with?: (database: Database, databaseUrl: string) => Partial<CollabDependencies>;
};

function configurationFor(databaseUrl: string): Configuration {
  const outcome = readConfiguration({
    NODE_ENV: "test",
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: sessionSecret,
    GITHUB_CLIENT_ID: "unused",
    GITHUB_CLIENT_SECRET: "unused",
  });
  if (!outcome.ok) throw new Error(outcome.problems.map(({ words }) => words).join(" "));
  return outcome.configuration;
}

export async function startCollabServer(databaseUrl: string, parts: Parts = {}): Promise<CollabServer> {
  const { with: made, port = 0, ...given } = parts;
  const log = given.log ?? pino({ level: process.env["TEST_LOG_LEVEL"] ?? "silent" });
  const database = openDatabase(databaseUrl, { log });
  const configuration = configurationFor(databaseUrl);
  const sessions = openSessions(configuration, publicUrl, log);
  const accessChanges = await listenForAccessChanges(databaseUrl, log);
  const server = createServer((_request, response) => response.writeHead(404).end());
  const collab = attachCollab(server, {
    publicUrl,
    lingerMs: 50,
    ...given,
    ...made?.(database, databaseUrl),
    configuration,
    database,
    log,
    sessions,
    accessChanges,
  });
  await new Promise<void>((resolve) => server.listen(port, "127.0.0.1", resolve));
  return {
    port: (server.address() as AddressInfo).port,
    database,
    collab,
    stop: async () => {
      await collab.stop();
      await new Promise((resolve) => server.close(resolve));
      await accessChanges.stop();
      await sessions.stop();
      await database.destroy();
    },
  };
}
