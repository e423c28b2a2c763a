/** Builds the client when its sources have changed since the last build. */
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { root } from "./place.mjs";
import { Advice, say } from "./say.mjs";

function digestOfSources() {
  const digest = createHash("sha256");
  const visit = (path) => {
    if (statSync(path).isDirectory()) for (const name of readdirSync(path).sort()) visit(join(path, name));
    else digest.update(path).update(readFileSync(path));
  };
  for (const part of ["client", "fonts", "vite.config.ts", "package-lock.json"]) visit(join(root, part));
  return digest.digest("hex");
}

export function ensureClientBuild() {
  const mark = join(root, "dist", "client.built-from");
  const digest = digestOfSources();
  const page = join(root, "dist", "client", "index.html");
  if (existsSync(page) && existsSync(mark) && readFileSync(mark, "utf8") === digest) return;
  say("building the client");
  const { status } = spawnSync(
    process.execPath,
    [join(root, "node_modules/vite/bin/vite.js"), "build", "--logLevel", "warn"],
    {
      cwd: root,
      stdio: ["ignore", "inherit", "inherit"],
    },
  );
  if (status !== 0) throw new Advice("The client does not build; the words of the build are above.");
  writeFileSync(mark, digest);
}
