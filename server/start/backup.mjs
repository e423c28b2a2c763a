/** `npm run backup -- FILE`: everything of a running installation, as of one moment, into one file. */
import { chmodSync, closeSync, existsSync, openSync, renameSync, rmSync } from "node:fs";
import { runTool, withOwnDatabase } from "./database-tools.mjs";
import { Advice, endWith, say } from "./say.mjs";

/** Sessions open doors, and which process holds what is of the moment: neither belongs into a file that is kept. */
const leftOut = ["sessions", "server_processes", "notebook_holders"];

/** A file that is there stays until the new one is whole. */
export function backUp(address, file) {
  const part = `${file}.part`;
  // Made before anything is in it, for nobody else to read.
  closeSync(openSync(part, "w", 0o600));
  chmodSync(part, 0o600);
  try {
    runTool(address, "pg_dump", [
      "--format=custom",
      "--no-owner",
      "--no-acl",
      "--schema=public",
      ...leftOut.map((table) => `--exclude-table-data=${table}`),
      `--file=${part}`,
    ]);
    renameSync(part, file);
  } finally {
    if (existsSync(part)) rmSync(part);
  }
}

if (process.argv[1] === import.meta.filename) {
  try {
    const [file] = process.argv.slice(2);
    if (!file) throw new Advice("Say where to: npm run backup -- FILE");
    await withOwnDatabase((address) => backUp(address, file));
    say(`everything is in ${file}`);
  } catch (error) {
    endWith(error);
  }
}
