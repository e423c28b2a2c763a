/** One engine, two places: what the page's worker computes is what Node.js computes, to 12 significant digits. */
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import type { Page } from "playwright/test";
import { safeParse } from "zod/v4/core";
import type {
  EvaluationAnswer,
  EvaluationRequest,
  WorkerMessage,
} from "../client/editor/evaluation/evaluation-messages.ts";
import { kindDescriptions, schemaOf, type BlockInstance } from "../client/engine/index.ts";
import { evaluateFile } from "../server/compute/evaluate-file.ts";
import { test, expect } from "./stage.ts";

const DIGITS = 12;
const folder = join(import.meta.dirname, "../tests/engine/golden");

interface GoldenFile {
  readonly blocks: readonly {
    readonly id: string;
    readonly kind: BlockInstance["kind"];
    readonly standsOn?: string;
    readonly inputs?: Readonly<Record<string, unknown>>;
  }[];
}
interface Golden {
  readonly file: GoldenFile;
  readonly known: readonly {
    readonly block: string;
    readonly scalar: string;
    readonly value: string | number;
    readonly digits?: number;
    readonly source: string;
  }[];
}

const goldenFiles = readdirSync(folder)
  .filter((name) => name.startsWith("known."))
  .map((name) => ({ name, golden: JSON.parse(readFileSync(join(folder, name), "utf8")) as Golden }));

/** The file's blocks as a notebook holds them: a row without an id is named by its table and place. */
function blocksOf({ blocks }: GoldenFile): readonly BlockInstance[] {
  return blocks.map(({ id, kind, standsOn, inputs = {} }) => {
    const { shape } = kindDescriptions[kind];
    const typed = Object.fromEntries(
      Object.entries(inputs).map(([name, value]) => [
        name,
        name in shape.tables && Array.isArray(value)
          ? value.map((row: object, index) => ({ id: `${name}${index + 1}`, ...textsOf(row) }))
          : String(value),
      ]),
    );
    const read = safeParse(schemaOf(shape), typed);
    if (!read.success) throw new Error(`${id}: ${read.error.message}`);
    return { id, kind, standsOn: standsOn ?? null, inputs: read.data, title: "", problems: [] };
  });
}

const textsOf = (row: object) =>
  Object.fromEntries(Object.entries(row).map(([column, value]) => [column, String(value)]));

/** Exact texts stay as they are; every float is cut to the digits that both places owe. */
function toDigits(value: unknown): unknown {
  if (typeof value === "number") return Number.isInteger(value) ? value : value.toPrecision(DIGITS);
  if (Array.isArray(value)) return value.map(toDigits);
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([name, part]) => [name, toDigits(part)]));
}

/** Asks a fresh worker started from the page's own built file. */
function evaluateInBrowser(
  page: Page,
  address: string,
  blocks: readonly BlockInstance[],
): Promise<EvaluationAnswer> {
  const request: EvaluationRequest = {
    revision: 1,
    order: blocks.map(({ id }) => id),
    changed: blocks,
    known: [],
    everything: true,
  };
  return page.evaluate(
    ([url, message]) =>
      new Promise<EvaluationAnswer>((resolve, reject) => {
        const worker = new Worker(url, { type: "module" });
        worker.onmessage = ({ data }: MessageEvent<WorkerMessage>) => {
          if (data.about !== "answer") return;
          worker.terminate();
          resolve(data);
        };
        worker.onerror = (event) => reject(new Error(event.message));
        worker.postMessage(message);
      }),
    [address, request] as const,
  );
}

test("golden inputs give the same in the page's worker as in Node.js", async ({ visit, stack }) => {
  const page = await visit();
  const started = page.waitForEvent("worker");
  await page.goto(stack.url);
  // The excerpt on the first page computes: its worker's address is the one that every notebook uses.
  await page.getByRole("heading", { name: "Try it here" }).scrollIntoViewIfNeeded();
  const address = (await started).url();
  expect(address).toContain(`${stack.url}/assets/`);
  expect(goldenFiles.length).toBeGreaterThanOrEqual(3);

  for (const { name, golden } of goldenFiles) {
    await test.step(name, async () => {
      const outcome = evaluateFile(golden.file, (error) => {
        throw error;
      });
      if (!outcome.ok) throw new Error(outcome.complaints.map(({ message }) => message).join("; "));
      const here = outcome.results.results;
      const { outcomes, mistakes } = await evaluateInBrowser(page, address, blocksOf(golden.file));
      expect(mistakes).toEqual([]);
      expect(outcomes.map(({ blockId, key }) => ({ id: blockId, key }))).toEqual(
        here.map(({ id, key }) => ({ id, key })),
      );
      expect(toDigits(outcomes.map(({ evaluation }) => evaluation))).toEqual(
        toDigits(here.map(({ evaluation }) => JSON.parse(JSON.stringify(evaluation)) as unknown)),
      );
      for (const { block, scalar, value, digits = DIGITS, source } of golden.known) {
        const found = outcomes
          .find(({ blockId }) => blockId === block)
          ?.evaluation.scalars.find(({ id }) => id === scalar)?.value;
        const shown = found?.type === "number" ? found.value.toPrecision(digits) : found?.text;
        expect(shown, `${block} ${scalar}: ${source}`).toBe(
          typeof value === "number" ? value.toPrecision(digits) : value,
        );
      }
    });
  }
});
