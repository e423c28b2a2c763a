/** Type checks: the whole project, then the engine alone with neither DOM nor Node.js types. */
import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { root } from "./place.mjs";

const compiler = join(root, "node_modules/typescript-native/bin/tsc");
let failed = false;
for (const project of [".", "client/engine"]) {
  const { status } = spawnSync(process.execPath, [compiler, "-p", project, "--noEmit"], {
    cwd: root,
    stdio: "inherit",
  });
  failed ||= status !== 0;
}
process.exit(failed ? 1 : 0);
