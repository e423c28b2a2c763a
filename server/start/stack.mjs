/** Everything Subleading needs to run: database, stand-ins for hosted services, server. */
import { randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { startChild } from "./child.mjs";
import { freePort } from "./ports.mjs";
import { ensureCluster } from "./postgres.mjs";
import { say } from "./say.mjs";

/** Kept between starts, so that sessions survive a restart. */
function sessionSecret(folder) {
  const path = join(folder, "session-secret");
  if (!existsSync(path)) writeFileSync(path, randomBytes(32).toString("base64url"), { mode: 0o600 });
  return readFileSync(path, "utf8");
}

/**
 * @param {{
 *   folder: string, testing?: boolean, port?: number, publicPort?: number, output?: "inherit" | "ignore",
 *   watch?: boolean, env?: Record<string, string>
 * }} wish  `folder` holds all data; `publicPort` is the port people use when it is not the server's own
 */
export async function startStack({
  folder,
  testing = false,
  port = 0,
  publicPort,
  output = "inherit",
  watch = false,
  env = {},
}) {
  mkdirSync(folder, { recursive: true });
  const given = { ...process.env, ...env };
  const cluster = given.DATABASE_URL
    ? null
    : await ensureCluster({ folder: join(folder, "postgres"), testing });
  cluster?.ensureDatabase("subleading");
  const serverPort = await freePort(port);
  const publicUrl = given.PUBLIC_URL ?? `http://localhost:${publicPort ?? serverPort}`;
  const needsFakes = !given.GITHUB_CLIENT_ID || !given.SMTP_URL;
  const fakes = needsFakes
    ? await startChild("the stand-ins for sign-in and mail", "fakes/main.ts", {
        env: { PUBLIC_URL: publicUrl },
        output,
      })
    : null;
  // The stand-ins answer with the variables that point the server at them; what was given by hand wins.
  const settings = {
    // Requests are not what someone at a terminal wants to see; say LOG_LEVEL=info to see them.
    LOG_LEVEL: given.LOG_LEVEL ?? "warn",
    NODE_ENV: testing ? "test" : "production",
    ...(fakes?.ready.env ?? {}),
    DATABASE_URL: cluster ? cluster.url("subleading") : given.DATABASE_URL,
    SESSION_SECRET: given.SESSION_SECRET ?? sessionSecret(folder),
    PORT: String(serverPort),
    PUBLIC_URL: publicUrl,
    ...env,
  };
  const startServer = () => startChild("the server", "server/main.ts", { env: settings, output, watch });
  let server = await startServer();
  const stop = async () => {
    await server.stop();
    await fakes?.stop();
    if (testing) cluster?.remove();
    else cluster?.stop();
  };
  return {
    url: publicUrl,
    databaseUrl: settings.DATABASE_URL,
    serverPort,
    mailboxUrl: fakes?.ready.mailboxUrl ?? null,
    cluster,
    serverProcess: () => server.process,
    /** Ends the server with a signal and starts it again on the same port and data. */
    restartServer: async (signal = "SIGTERM") => {
      await server.stop(signal);
      server = await startServer();
    },
    stop,
  };
}

/** Stops the stack once on Ctrl-C or SIGTERM, whatever it is doing. */
export function stopOnSignal(stop) {
  let stopping = false;
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      say("stopping");
      stop().then(
        () => process.exit(0),
        (error) => {
          process.stderr.write(`${error.stack}\n`);
          process.exit(1);
        },
      );
    });
}
