/** Installs the npm packages of the lock file when they are missing or the lock file has changed. */
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { root } from "./place.mjs";
import { Advice, say } from "./say.mjs";

export function ensureDependencies() {
  const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
  if (major < 20 || (major === 20 && minor < 19))
    throw new Advice(`Subleading needs Node.js 20.19 or newer; this is ${process.versions.node}.`);
  const lock = createHash("sha256")
    .update(readFileSync(join(root, "package-lock.json")))
    .digest("hex");
  const mark = join(root, "node_modules", ".installed-lock");
  if (existsSync(mark) && readFileSync(mark, "utf8") === lock) return;
  say("installing the packages of package-lock.json");
  const { status } = spawnSync("npm", ["ci", "--no-audit", "--no-fund"], {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
  });
  if (status !== 0)
    throw new Advice("npm ci did not succeed; its words are above. Nothing else was changed.");
  writeFileSync(mark, lock);
}
