/** One throw-away cluster for all server tests of a run; each test file makes databases of its own in it. */
import { mkdtempSync, rmSync } from "node:fs";
import { chmodSync } from "node:fs";
import { join } from "node:path";
// Start-up code is plain JavaScript, since it runs before anything is installed.
import { ensureCluster } from "../../server/start/postgres.mjs";

export async function setup(): Promise<() => void> {
  const given = process.env["SUBLEADING_TEST_DATABASE_URL"];
  if (given) return () => undefined;
  const folder = mkdtempSync("/var/tmp/subleading-test-");
  chmodSync(folder, 0o711);
  const cluster = await ensureCluster({ folder: join(folder, "postgres"), testing: true });
  process.env["SUBLEADING_TEST_DATABASE_URL"] = cluster.url("postgres");
  return () => {
    cluster.remove();
    rmSync(folder, { recursive: true, force: true });
  };
}
