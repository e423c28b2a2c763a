/**
 * `npm test`: sets up what is missing and runs every check. Ports and data are private to the run.
 * The last line counts what the runners themselves reported; a check without a count of its own counts as one.
 */
import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { ensureDependencies } from "./dependencies.mjs";
import { root } from "./place.mjs";
import { endWith, say } from "./say.mjs";

const reports = mkdtempSync(join(tmpdir(), "subleading-reports-"));
const bin = (name) => join(root, "node_modules", name);
const node = (...args) =>
  spawnSync(process.execPath, args, { cwd: root, stdio: ["ignore", "inherit", "inherit"] }).status === 0;

const tally = { passed: 0, failed: 0 };
const failures = [];

function check(name, passed) {
  tally[passed ? "passed" : "failed"] += 1;
  if (!passed) failures.push(name);
}

/** Adds a runner's own counts; a runner that left no report, or failed without a failed test, is one failure. */
function count(name, succeeded, report, read) {
  const counted = existsSync(report) ? read(JSON.parse(readFileSync(report, "utf8"))) : null;
  if (!counted || counted.passed + counted.failed === 0) return check(`${name} (left no report)`, false);
  tally.passed += counted.passed;
  tally.failed += counted.failed;
  if (counted.failed > 0) failures.push(`${name}: ${counted.failed} failed`);
  else if (!succeeded) check(`${name} (failed outside its tests)`, false);
}

function runVitest() {
  const report = join(reports, "vitest.json");
  const succeeded = node(
    bin("vitest/vitest.mjs"),
    "run",
    "--reporter=dot",
    "--reporter=json",
    `--outputFile.json=${report}`,
  );
  // A file that does not even load has no failed test to be counted by.
  const unloaded = (json) =>
    json.testResults.filter((file) => file.status === "failed" && file.assertionResults.length === 0).length;
  count("tests", succeeded, report, (json) => ({
    passed: json.numPassedTests,
    failed: json.numFailedTests + unloaded(json),
  }));
}

function runBrowserTests() {
  const report = join(reports, "browser.json");
  process.env.PLAYWRIGHT_JSON_OUTPUT_FILE = report;
  const succeeded = node(
    bin("playwright/cli.js"),
    "test",
    "-c",
    "e2e/playwright.config.ts",
    "--reporter=line,json",
  );
  count("browser tests", succeeded, report, ({ stats }) => ({
    passed: stats.expected + stats.flaky,
    failed: stats.unexpected,
  }));
}

try {
  ensureDependencies();
  const { ensureChromium, ensurePostgres } = await import("./debian.mjs");
  const { ensureClientBuild } = await import("./client-build.mjs");
  ensurePostgres();
  process.env.CHROMIUM_PATH = ensureChromium();
  say("types");
  check("types", node("server/start/types.mjs"));
  say("lint and import boundaries");
  check("lint", node(bin("eslint/bin/eslint.js"), "--config", "tests/lint/eslint.config.js", "."));
  check(
    "import boundaries",
    node(
      bin("dependency-cruiser/bin/dependency-cruise.mjs"),
      "--config",
      "tests/lint/boundaries.cjs",
      "client",
      "server",
      "fakes",
    ),
  );
  check(
    "format",
    node(
      bin("prettier/bin/prettier.cjs"),
      "--check",
      "--log-level",
      "warn",
      "client",
      "server",
      "tests",
      "e2e",
      "fakes",
      "migrations",
    ),
  );
  ensureClientBuild();
  say("unit, published, client and server tests");
  runVitest();
  say("browser tests");
  runBrowserTests();
} catch (error) {
  endWith(error);
} finally {
  rmSync(reports, { recursive: true, force: true });
}
for (const failure of failures) process.stdout.write(`failed: ${failure}\n`);
process.stdout.write(`${tally.passed} passed, ${tally.failed} failed\n`);
process.exit(tally.failed === 0 ? 0 : 1);
