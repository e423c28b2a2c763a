/**
 * A whole server for one test file: database, stand-ins, and browsers that sign in over the real flow.
 * Everything has ports and data of its own and ends in `stop`.
 */
import { Writable } from "node:stream";
import { startOAuthFake, type OAuthFake, type OAuthFakeOptions } from "../../fakes/oauth.ts";
import { startSmtpFake, type SmtpFake, type SmtpFakeOptions } from "../../fakes/smtp.ts";
import { readConfiguration, type Configuration } from "../../server/configuration.ts";
import { createServer, type RunningServer } from "../../server/create-server.ts";
import { openDatabase, type Database } from "../../server/data/database.ts";
import { createTestDatabase } from "./database.ts";
import { Browser, signIn } from "./http-browser.ts";

export interface World {
  readonly server: RunningServer;
  readonly database: Database;
  readonly databaseUrl: string;
  readonly configuration: Configuration;
  readonly oauth: OAuthFake;
  readonly mailbox: SmtpFake;
  /** A browser of someone signed out. */
  stranger(): Browser;
  /** A browser signed in as one of the invented accounts. */
  signIn(login: string): Promise<Browser>;
  /** What the server has logged so far, as text. */
  logged(): string;
  stop(): Promise<void>;
}
export interface WorldOptions {
  readonly environment?: Readonly<Record<string, string>>;
  readonly oauth?: OAuthFakeOptions;
  readonly smtp?: SmtpFakeOptions;
  /** Leads the server to its database by another way than the test's own. */
  readonly through?: (databaseUrl: string) => string;
}

export async function createWorld(options: WorldOptions = {}): Promise<World> {
  const test = await createTestDatabase();
  const oauth = await startOAuthFake(options.oauth);
  const mailbox = await startSmtpFake(options.smtp);
  const outcome = readConfiguration({
    NODE_ENV: "test",
    DATABASE_URL: options.through?.(test.url) ?? test.url,
    PORT: "0",
    SESSION_SECRET: "a secret for tests only, long enough to be accepted",
    GITHUB_CLIENT_ID: oauth.clientId,
    GITHUB_CLIENT_SECRET: oauth.clientSecret,
    GITHUB_OAUTH_URL: oauth.oauthUrl,
    GITHUB_API_URL: oauth.apiUrl,
    SMTP_URL: mailbox.smtpUrl,
    MAILBOX_URL: mailbox.url,
    DEMONSTRATION: "yes",
    // Most tests begin with an empty shelf.
    WELCOME_NOTEBOOKS: "no",
    RATE_LIMIT_FACTOR: "1000",
    LOG_LEVEL: "debug",
    ...options.environment,
  });
  if (!outcome.ok) throw new Error(outcome.problems.map(({ words }) => words).join(" "));
  const { configuration } = outcome;
  const lines: string[] = [];
  const logDestination = new Writable({
    write: (chunk: Buffer, _encoding, done) => {
      lines.push(chunk.toString());
      done();
    },
  });
  const server = await createServer(configuration, { logDestination });
  const database = openDatabase(test.url, { most: 3, name: "subleading tests" });
  return {
    server,
    database,
    databaseUrl: test.url,
    configuration,
    oauth,
    mailbox,
    stranger: () => new Browser(server.address),
    signIn: async (login) => {
      const browser = new Browser(server.address);
      await signIn(browser, login);
      return browser;
    },
    logged: () => lines.join(""),
    stop: async () => {
      await server.stop();
      await oauth.stop();
      await mailbox.stop();
      await database.destroy();
      await test.drop();
    },
  };
}

/** Polls until the value is there. */
export async function eventually<Value>(
  look: () => Promise<Value | null> | Value | null,
  patienceMs = 10_000,
): Promise<Value> {
  const end = performance.now() + patienceMs;
  for (;;) {
    const value = await look();
    if (value !== null) return value;
    if (performance.now() > end) throw new Error(`Waited ${patienceMs} ms in vain until ${look.toString()}`);
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
}
