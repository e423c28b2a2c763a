/** Debian's PostgreSQL programs, run on the database of the installation: the one given, or that of `npm start`. */
import { spawnSync } from "node:child_process";
import { existsSync } from "node:fs";
import { join } from "node:path";
import { ensurePostgres } from "./debian.mjs";
import { dataFolder, fallbackFolder } from "./place.mjs";
import { ensureCluster } from "./postgres.mjs";
import { Advice } from "./say.mjs";

/** Gives the address of the database to `work`; one that was not running runs for that long. */
export async function withOwnDatabase(work) {
  if (process.env.DATABASE_URL) return work(process.env.DATABASE_URL);
  const folders = [join(dataFolder, "postgres"), join(fallbackFolder(), "postgres")];
  if (!folders.some((folder) => existsSync(folder)))
    throw new Advice("There is no database here yet. Set DATABASE_URL, or run npm start first.");
  const cluster = await ensureCluster({ folder: join(dataFolder, "postgres") });
  try {
    cluster.ensureDatabase("subleading");
    work(cluster.url("subleading"));
  } finally {
    if (!cluster.wasRunning) cluster.stop();
  }
}

/** The address goes by the environment: what stands in a command line is there for every user of the machine to read. */
function settingsFrom(address) {
  const url = new URL(address);
  const sslmode = url.searchParams.get("sslmode");
  return {
    PGHOST: url.searchParams.get("host") ?? decodeURIComponent(url.hostname),
    PGPORT: url.port || "5432",
    PGUSER: decodeURIComponent(url.username),
    PGPASSWORD: decodeURIComponent(url.password),
    PGDATABASE: decodeURIComponent(url.pathname.slice(1)),
    PGAPPNAME: "subleading tools",
    ...(sslmode ? { PGSSLMODE: sslmode } : {}),
  };
}

/** Throws what the program has to say when it fails. */
export function runTool(address, name, args) {
  const { PATH, HOME } = process.env;
  const result = spawnSync(join(ensurePostgres(), name), args, {
    encoding: "utf8",
    maxBuffer: 64 * 1024 * 1024,
    stdio: ["ignore", "pipe", "pipe"],
    env: { PATH, HOME, LC_ALL: "C.UTF-8", ...settingsFrom(address) },
  });
  if (result.error) throw result.error;
  if (result.status !== 0) throw new Advice(`${name} failed: ${result.stderr.trim() || "it said nothing"}`);
  return result.stdout;
}
