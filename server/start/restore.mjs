/**
 * `npm run restore -- FILE`: the installation becomes what it was when the file was made, in one transaction; servers
 * may go on running. Pages that are open keep what they hold, and send it again: shut them first to go back for good.
 */
import { existsSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { runTool, withOwnDatabase } from "./database-tools.mjs";
import { Advice, endWith, say } from "./say.mjs";

export function restore(address, file) {
  if (!existsSync(file)) throw new Advice(`There is no file ${file}.`);
  const folder = mkdtempSync(join(tmpdir(), "subleading-restore-"));
  const script = join(folder, "everything.sql");
  try {
    // Written out whole before anything is touched: a file that is broken in the middle changes nothing.
    runTool(address, "pg_restore", ["--no-owner", "--no-acl", `--file=${script}`, file]);
    runTool(address, "psql", [
      "--no-psqlrc",
      "--quiet",
      "--single-transaction",
      "--set=ON_ERROR_STOP=1",
      "--command=drop schema public cascade",
      `--file=${script}`,
    ]);
  } finally {
    rmSync(folder, { recursive: true });
  }
  // Servers notice that their connections are gone, look at what is stored, and load every notebook afresh.
  runTool(address, "psql", [
    "--no-psqlrc",
    "--quiet",
    "--command",
    `select pg_terminate_backend(pid) from pg_stat_activity
      where datname = current_database() and application_name like 'subleading%' and pid <> pg_backend_pid()`,
  ]);
}

if (process.argv[1] === import.meta.filename) {
  try {
    const [file] = process.argv.slice(2);
    if (!file) throw new Advice("Say what from: npm run restore -- FILE");
    await withOwnDatabase((address) => restore(address, file));
    say("everything is as it was when the file was made; people sign in again");
  } catch (error) {
    endWith(error);
  }
}
