import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { LinearForm } from "#engine/exact/linear-form.ts";
import { Rational } from "#engine/exact/rational.ts";

/** Documentation of the form `@example call(…) // "text"`, or `// 0.9066…` for a number known by its first digits. */
const engine = join(import.meta.dirname, "../../../client/engine");
const examples = readdirSync(engine, { recursive: true, encoding: "utf8" })
  .filter((file) => file.endsWith(".ts"))
  .flatMap((file) =>
    [
      ...readFileSync(join(engine, file), "utf8").matchAll(
        /@example (?<call>\w.*?) \/\/ (?<result>".*"|-?\d[\d.]*…?)(?: \*\/)?$/gm,
      ),
    ].map(({ groups }) => ({ file, call: groups?.["call"] ?? "", result: groups?.["result"] ?? "" })),
  )
  // An example may speak of a value it does not spell out; then the test beside its function runs it.
  .filter(({ call }) => !/…|\b(fields|vocabulary|parsed)\b(?!:)/.test(call));

describe("the examples in the engine's documentation", () => {
  it("are found", () => {
    expect(examples.length).toBeGreaterThan(15);
  });
  it.each(examples)("$file: $call is $result", async ({ file, call, result }) => {
    const module: object = await import(join(engine, file));
    const scope = { Rational, LinearForm, ...module };
    // The text comes from our own sources.
    // eslint-disable-next-line @typescript-eslint/no-implied-eval
    const found: unknown = new Function(...Object.keys(scope), `return ${call};`)(...Object.values(scope));
    if (result.endsWith("…")) expect(String(found)).toContain(result.slice(0, -1));
    else expect(found).toEqual(JSON.parse(result));
  });
});
