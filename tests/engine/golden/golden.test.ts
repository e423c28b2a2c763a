import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { Worker } from "node:worker_threads";
import { describe, expect, it } from "vitest";
import type { ResultsFile } from "#contract/evaluate-file.ts";
import { evaluateGolden } from "./evaluate-golden.ts";

interface Golden {
  readonly file: unknown;
  readonly known: readonly {
    readonly block: string;
    readonly scalar: string;
    /** Exact values as canonical text, floats as numbers. */
    readonly value: string | number;
    /** Significant digits to which a float is known. */
    readonly digits?: number;
    readonly source: string;
  }[];
}

const goldenFiles = readdirSync(import.meta.dirname)
  .filter((name) => name.startsWith("known."))
  .map((name) => ({
    name,
    golden: JSON.parse(readFileSync(join(import.meta.dirname, name), "utf8")) as Golden,
  }));

/** A thread starts from JavaScript, so it first learns to load TypeScript. */
function evaluateInWorker(file: unknown): Promise<ResultsFile> {
  const program = `import("tsx/esm/api").then(({ register }) => { register(); return import(${JSON.stringify(
    pathToFileURL(join(import.meta.dirname, "golden-worker.ts")).href,
  )}); });`;
  return new Promise((resolve, reject) => {
    const worker = new Worker(program, { eval: true, workerData: file });
    worker.once("message", resolve);
    worker.once("error", reject);
  });
}

describe.each(goldenFiles)("the golden file $name", ({ golden }) => {
  it("says where every value comes from", () => {
    expect(golden.known.filter(({ source }) => source.trim() === "")).toEqual([]);
    expect(
      golden.known.filter(({ value, digits }) => (typeof value === "number") !== (digits !== undefined)),
    ).toEqual([]);
  });

  it.each(golden.known)("has $block $scalar = $value: $source", ({ block, scalar, value, digits = 12 }) => {
    const { results } = evaluateGolden(golden.file);
    const found = results
      .find(({ id }) => id === block)
      ?.evaluation.scalars.find(({ id }) => id === scalar)?.value;
    if (typeof value === "string") expect(found).toEqual({ type: "exact", text: value });
    else {
      expect(found).toMatchObject({ type: "number" });
      const size = found?.type === "number" ? found.value : NaN;
      expect(size.toPrecision(digits)).toBe(value.toPrecision(digits));
    }
  });

  it("gives the same in a worker thread", async () => {
    expect(await evaluateInWorker(golden.file)).toEqual(evaluateGolden(golden.file));
  });
});
