/** The server as a process: reads the environment, migrates, serves until it is told to stop. */
import { seedDemonstration } from "./commands/seed-demonstration.ts";
import { readConfiguration, type Configuration } from "./configuration.ts";
import { createServer, type RunningServer } from "./create-server.ts";
import { openDatabase } from "./data/database.ts";
import { migrateToLatest } from "./data/migrate.ts";
import { wordsForStartupFailure } from "./startup-failures.ts";

async function prepareDatabase({ databaseUrl, demonstration }: Configuration): Promise<void> {
  const database = openDatabase(databaseUrl, { most: 2, name: "subleading migrations" });
  try {
    await migrateToLatest(database);
    if (demonstration) await seedDemonstration(database);
  } finally {
    await database.destroy();
  }
}

/** Null when it cannot start; what to do about it has then been said. */
async function start(): Promise<RunningServer | null> {
  const outcome = readConfiguration(process.env);
  if (!outcome.ok) {
    for (const { words } of outcome.problems) process.stderr.write(`${words}\n`);
    return null;
  }
  try {
    await prepareDatabase(outcome.configuration);
    return await createServer(outcome.configuration);
  } catch (error) {
    const words = wordsForStartupFailure(error, outcome.configuration);
    if (words === null) throw error;
    process.stderr.write(`${words}\n`);
    return null;
  }
}

const server = await start();
if (server === null) {
  process.exitCode = 1;
} else {
  server.services.log.info({ address: server.address }, "serving");
  // A parent that started us learns that we are ready, and takes us along when it goes.
  process.send?.({ ready: { address: server.address } });
  let stopping = false;
  const stop = (why: string) => {
    if (stopping) return;
    stopping = true;
    server.services.log.info({ why }, "stopping");
    server.stop().then(
      () => process.exit(0),
      (error: unknown) => {
        server.services.log.fatal({ err: error }, "stopping failed");
        process.exit(1);
      },
    );
  };
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) process.on(signal, () => stop(signal));
  process.on("disconnect", () => stop("the parent process ended"));
}
