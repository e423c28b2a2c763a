/** Each rule of the house is broken on purpose, in files that exist only while this test runs. */
import { spawnSync } from "node:child_process";
import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join, resolve } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";

const root = resolve(import.meta.dirname, "../..");
const breaches = [
  ["engine-stays-pure", "client/engine/breach-of-rules/a.ts", 'import "react";\n'],
  ["engine-only-parses-with-mathjs", "client/engine/breach-of-rules/b.ts", 'import "mathjs";\n'],
  ["mathjs-has-one-door", "client/engine/breach-of-rules/k.ts", 'import "mathjs/number";\n'],
  ["odex-has-one-door", "client/engine/breach-of-rules/l.ts", 'import "#odex";\n'],
  ["mathjs-stays-in-the-engine", "client/ui/breach-of-rules/c.ts", 'import "mathjs/number";\n'],
  [
    "server-takes-only-shared-code",
    "server/breach-of-rules/d.ts",
    'import "../../client/app/breach-of-rules/target.ts";\n',
  ],
  [
    "client-never-imports-server",
    "client/app/breach-of-rules/e.ts",
    'import "../../../server/breach-of-rules/target.ts";\n',
  ],
  [
    "shared-code-stays-shared",
    "client/contract/breach-of-rules/f.ts",
    'import "../../app/breach-of-rules/target.ts";\n',
  ],
  [
    "fakes-are-for-tests-and-start",
    "server/breach-of-rules/g.ts",
    'import "../../fakes/breach-of-rules/target.ts";\n',
  ],
  ["pages-do-not-import-each-other", "client/pages/breach-one/h.ts", 'import "../breach-two/target.ts";\n'],
  ["no-circles", "client/app/breach-of-rules/i.ts", 'import "./j.ts";\nexport const i = 1;\n'],
] as const;
const targets = [
  ["client/app/breach-of-rules/target.ts", "export const target = 1;\n"],
  ["server/breach-of-rules/target.ts", "export const target = 1;\n"],
  ["fakes/breach-of-rules/target.ts", "export const target = 1;\n"],
  ["client/pages/breach-two/target.ts", "export const target = 1;\n"],
  ["client/app/breach-of-rules/j.ts", 'import "./i.ts";\nexport const j = 1;\n'],
] as const;
const folders = [...breaches.map(([, file]) => file), ...targets.map(([file]) => file)].map((file) =>
  join(root, dirname(file)),
);

function place(file: string, text: string): void {
  mkdirSync(dirname(join(root, file)), { recursive: true });
  writeFileSync(join(root, file), text);
}

function removeBreaches(): void {
  for (const folder of folders) rmSync(folder, { recursive: true, force: true });
}

interface Violation {
  readonly from: string;
  readonly rule: { readonly name: string };
}

describe("import boundaries", () => {
  let violations: readonly Violation[] = [];
  beforeAll(() => {
    for (const [file, text] of targets) place(file, text);
    for (const [, file, text] of breaches) place(file, text);
    const cruise = join(root, "node_modules/dependency-cruiser/bin/dependency-cruise.mjs");
    const args = [
      "--config",
      "tests/lint/boundaries.cjs",
      "--output-type",
      "json",
      ...new Set(folders.map((folder) => folder)),
    ];
    const { stdout } = spawnSync(process.execPath, [cruise, ...args], {
      cwd: root,
      encoding: "utf8",
      maxBuffer: 1e8,
    });
    removeBreaches();
    violations = (JSON.parse(stdout) as { summary: { violations: Violation[] } }).summary.violations;
  });
  afterAll(removeBreaches);

  test.each(breaches)("%s is reported when broken", (rule, file) => {
    expect(
      violations.filter((violation) => violation.from === file).map((violation) => violation.rule.name),
    ).toContain(rule);
  });
});

describe("lint in the engine", () => {
  const forbidden = [
    ["a clock", "export const now = () => Date.now();\n", "no-restricted-globals"],
    ["unseeded randomness", "export const draw = () => Math.random();\n", "no-restricted-properties"],
    [
      "a swallowed error",
      "export function f(g: () => void): void {\n  try {\n    g();\n  } catch {}\n}\n",
      "no-empty",
    ],
    [
      "mathjs beyond its parser",
      'import { evaluate } from "mathjs/number";\nexport const two: unknown = evaluate("1 + 1");\n',
      "no-restricted-imports",
    ],
  ] as const;

  test.each(forbidden)("%s is refused", (_name, text, rule) => {
    const file = "client/engine/breach-of-lint.ts";
    place(file, text);
    const lint = join(root, "node_modules/eslint/bin/eslint.js");
    const args = ["--config", "tests/lint/eslint.config.js", "--format", "json", file];
    const { stdout } = spawnSync(process.execPath, [lint, ...args], { cwd: root, encoding: "utf8" });
    rmSync(join(root, file));
    const [report] = JSON.parse(stdout) as { messages: { ruleId: string }[] }[];
    expect(report?.messages.map((message) => message.ruleId)).toContain(rule);
  });
});

describe("types in the engine", () => {
  test("neither DOM nor Node.js names exist", () => {
    const file = "client/engine/breach-of-types.ts";
    place(file, "export const title: string = document.title;\nexport const id: number = process.pid;\n");
    const { stdout } = spawnSync(
      process.execPath,
      ["node_modules/typescript-native/bin/tsc", "-p", "client/engine", "--noEmit"],
      { cwd: root, encoding: "utf8" },
    );
    rmSync(join(root, file));
    expect(stdout).toMatch(/breach-of-types\.ts\(1,.*'document'/);
    expect(stdout).toMatch(/breach-of-types\.ts\(2,.*'process'/);
  });
});
