import { execFile } from "node:child_process";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import fc from "fast-check";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { runEvaluate } from "../../../server/commands/evaluate.ts";
import { locateJsonError } from "#contract/locate-json-error.ts";

let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "blocks-"));
});
afterAll(() => rm(folder, { recursive: true }));

async function run(names: string[], stdin = ""): Promise<{ code: number; out: string; error: string }> {
  let out = "";
  let error = "";
  const code = await runEvaluate(names, {
    stdin: Readable.from([stdin]),
    out: (text) => (out += text),
    error: (text) => (error += text),
  });
  return { code, out, error };
}
const file = (orders: unknown, q = "0.3") =>
  JSON.stringify({
    format: "subleading-blocks/1",
    blocks: [{ id: "rate", kind: "truncationError", inputs: { q, orders } }],
  });
const good = file([
  { order: 0, value: 10 },
  { order: 1, value: 10.9 },
]);

describe("the command evaluate", () => {
  it("writes results and ends with 0 when every block has a value and no problem", async () => {
    const { code, out, error } = await run(["-"], good);
    expect({ code, error }).toEqual({ code: 0, error: "" });
    expect(JSON.parse(out)).toMatchObject({
      format: "subleading-results/1",
      results: [{ id: "rate", messages: [] }],
    });
  });

  it("reads a file, with or without a byte order mark, as it reads standard input", async () => {
    const path = join(folder, "good.json");
    await writeFile(path, `\uFEFF${good}`);
    expect(await run([path])).toEqual(await run(["-"], good));
  });

  it("ends with 1 and says what is wrong with which block, results written all the same", async () => {
    const { code, out, error } = await run(["-"], file([{ id: "a", order: "x", value: 1 }]));
    expect(code).toBe(1);
    expect(error).toBe(
      "standard input: block “rate”: orders, row “a”, order: Row 1: “x” is not an order. An order is a whole number from 0 to 200.\n",
    );
    expect(JSON.parse(out)).toHaveProperty("results");
  });

  it("ends with 1 when a method is refused, though the rest has values", async () => {
    expect(
      (
        await run(
          ["-"],
          file(
            [
              { order: 0, value: 10 },
              { order: 1, value: 11 },
            ],
            "1.5",
          ),
        )
      ).code,
    ).toBe(1);
  });

  it.each([
    ["no name", [], "", /^Say which file/],
    ["two names", ["a", "b"], "", /^Say which file/],
    [
      "a file that is not there",
      ["/nowhere/blocks.json"],
      "",
      /^\/nowhere\/blocks\.json: there is no such file\n$/,
    ],
    ["a folder", [tmpdir()], "", /: is a folder\n$/],
    ["nothing", ["-"], "", /^standard input, line 1, column 1: is empty\n$/],
    [
      "a slip in the JSON",
      ["-"],
      '{\n  "format": "subleading-blocks/1",\n  "blocks": [,]\n}',
      /^standard input, line 3, column 14: is not JSON/,
    ],
    ["another format", ["-"], "{}", /^standard input: format is missing/],
  ])("ends with 2 and writes no result for %s", async (_, names, stdin, message) => {
    const { code, out, error } = await run(names, stdin);
    expect({ code, out }).toEqual({ code: 2, out: "" });
    expect(error).toMatch(message);
  });

  it("runs as people run it", async () => {
    const root = join(import.meta.dirname, "../../..");
    const ended = await new Promise<{ code: number | null; stdout: string }>((resolve) => {
      const child = execFile("npm", ["run", "-s", "evaluate", "--", "-"], { cwd: root }, (_, stdout) =>
        resolve({ code: child.exitCode, stdout }),
      );
      child.stdin?.end(good);
    });
    expect(ended.code).toBe(0);
    expect(JSON.parse(ended.stdout)).toHaveProperty("results.0.id", "rate");
  });
});

describe("the place where a text stops being JSON", () => {
  it("is nowhere in JSON, however it is laid out", () => {
    fc.assert(
      fc.property(fc.jsonValue(), fc.constantFrom(0, 1, "\t"), (value, indent) => {
        expect(locateJsonError(JSON.stringify(value, null, indent))).toBeNull();
      }),
    );
  });
  it("exists exactly when the runtime cannot parse it", () => {
    const nearly = fc
      .tuple(
        fc.jsonValue(),
        fc.nat(),
        fc.constantFrom("", ",", "]", "}", '"', "\\", "0", "-", ".", "e", "x", "\u0001", "\n"),
      )
      .map(([value, at, extra]) => {
        const text = JSON.stringify(value);
        const place = at % (text.length + 1);
        return text.slice(0, place) + extra + text.slice(place + (at % 2));
      });
    const parses = (text: string) => {
      try {
        JSON.parse(text);
        return true;
      } catch (error) {
        if (error instanceof SyntaxError) return false;
        throw error;
      }
    };
    fc.assert(
      fc.property(nearly, (text) => {
        expect(locateJsonError(text) === null).toBe(parses(text));
      }),
      { numRuns: 2000 },
    );
  });
  it.each([
    ["[1,]", 1, 4],
    ["[1\n 2]", 2, 2],
    ['{"a" 1}', 1, 6],
    ['{"a":1}}', 1, 8],
    ['"open', 1, 1],
    ["tru", 1, 1],
    ["01", 1, 1],
    ["[".repeat(100_000), 1, 502],
  ])("of %j is found", (text, line, column) => {
    expect(locateJsonError(text)).toEqual({ line, column });
  });
});
