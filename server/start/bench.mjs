/** `npm run bench`: measures and prints figures with their ratios; it judges nothing. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, chmodSync, rmSync } from "node:fs";
import { join } from "node:path";
import { ensureDependencies } from "./dependencies.mjs";
import { root } from "./place.mjs";
import { endWith, say } from "./say.mjs";

const benches = [
  ...["delivery", "many-notebooks", "opening", "reconnect-storm"],
  ...["evaluation", "basis-times", "bundle"],
];

// Ctrl-C reaches the bench that runs, which ends; we then clean up.
let interrupted = false;
process.on("SIGINT", () => (interrupted = true));

try {
  ensureDependencies();
  const { ensureChromium } = await import("./debian.mjs");
  const { ensureClientBuild } = await import("./client-build.mjs");
  const { ensureCluster } = await import("./postgres.mjs");
  ensureClientBuild();
  const folder = mkdtempSync("/var/tmp/subleading-bench-");
  chmodSync(folder, 0o711);
  // A real store is measured: fsync stays on.
  const cluster = await ensureCluster({ folder: join(folder, "postgres") });
  const env = {
    ...process.env,
    SUBLEADING_TEST_DATABASE_URL: cluster.url("postgres"),
    CHROMIUM_PATH: ensureChromium(),
    // What a bench or its browser puts aside goes with everything else.
    TMPDIR: folder,
  };
  let failed = false;
  try {
    for (const bench of benches) {
      say(`tests/bench/${bench}.ts`);
      const { status, signal } = spawnSync(process.execPath, ["--import", "tsx", `tests/bench/${bench}.ts`], {
        cwd: root,
        stdio: "inherit",
        env,
      });
      failed ||= status !== 0;
      if (signal || interrupted) break;
    }
    if (!interrupted) {
      say("the long versions of the tests that kill servers and take the database away");
      const tests = ["kill", "crowd-kill", "postgres-gone"].map(
        (name) => `tests/server/collab/${name}.test.ts`,
      );
      const runner = join(root, "node_modules/vitest/vitest.mjs");
      const { status } = spawnSync(process.execPath, [runner, "run", "--project", "server", ...tests], {
        cwd: root,
        stdio: "inherit",
        env: { ...env, KILL_ROUNDS: "10", CROWD_ROUNDS: "5", GONE_MS: "20000" },
      });
      failed ||= status !== 0;
    }
  } finally {
    cluster.remove();
    rmSync(folder, { recursive: true, force: true });
  }
  process.exit(failed ? 1 : 0);
} catch (error) {
  endWith(error);
}
