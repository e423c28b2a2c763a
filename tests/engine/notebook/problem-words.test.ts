import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { problemWords, wordPlace, wordProblem } from "#contract/problem-words.ts";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { block, documentOf, row, truncationBlock } from "./documents.ts";

const engine = join(import.meta.dirname, "../../../client/engine");

/** Hyphenated texts of the engine that are no codes of problems: ids of scalars, choices, verdicts, reasons of loose pins. */
const notCodes = new Set([
  "block-gone",
  "block-in-error",
  "first-omitted",
  "first-omitted-all",
  "largest-probe",
  "left-out",
  "loop-generated",
  "next-order",
  "relative-error",
  "scalar-gone",
  "self-conjugate",
  "soft-collinear",
  "super-renormalisable",
]);

function sources(): { file: string; text: string }[] {
  return readdirSync(engine, { recursive: true, encoding: "utf8" })
    .filter((file) => file.endsWith(".ts"))
    .map((file) => ({
      file,
      text: readFileSync(join(engine, file), "utf8").replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, ""),
    }));
}
/** Codes however they are handed on: any hyphenated text that is not known to be something else, and every `code: "…"`. */
const used = new Map<string, string>();
for (const { file, text } of sources()) {
  for (const [, code = ""] of text.matchAll(/"([a-z][a-z0-9]*(?:-[a-z0-9]+)+)"/g))
    if (!notCodes.has(code)) used.set(code, file);
  for (const [, code = ""] of text.matchAll(/\bcode: "([a-z0-9-]+)"/g)) used.set(code, file);
}

describe("the words for problems", () => {
  it("cover every code the engine uses", () => {
    const missing = [...used]
      .filter(([code]) => !(code in problemWords))
      .map(([code, file]) => `${code} (${file})`);
    expect(missing).toEqual([]);
  });
  it("cover nothing else", () => {
    expect(Object.keys(problemWords).filter((code) => !used.has(code))).toEqual([]);
  });
  it.each(Object.keys(problemWords))("%s is said in whole sentences, whatever the facts", (code) => {
    for (const facts of [
      {},
      { text: "x".repeat(500), row: 2, order: 1, offset: 4, symbol: "chi", suggestion: "phi" },
    ]) {
      const words = wordProblem({ code, path: ["orders", "r1", "value"], facts });
      expect(words).toMatch(/^[A-Z“$?0-9cpωντ].*[.?]$/);
      expect(words).not.toMatch(/undefined|null|\bNaN\b|\[object/);
      expect(words.length).toBeLessThan(300);
    }
  });
  it("say a code that is not known rather than hide it", () => {
    expect(wordProblem({ code: "new-code", path: ["terms", "t1"], facts: {} })).toContain("new-code");
  });
  it("name places", () => {
    expect([wordPlace([]), wordPlace(["q"]), wordPlace(["terms", "t3", "term"])]).toEqual([
      "",
      "q",
      "terms, row “t3”, term",
    ]);
  });
});

describe("the words for problems that the kinds really meet", () => {
  /** Evaluates blocks full of mistakes and gives what is said about them. */
  function sayAll(...content: unknown[]): string[] {
    const { blocks } = readDocument(documentOf(...content));
    const outcomes = evaluateNotebook(blocks, {
      memo: new Map(),
      onInternalError: (error) => {
        throw error;
      },
    });
    return outcomes.flatMap(({ evaluation }) =>
      [...evaluation.problems, ...evaluation.notices].map(wordProblem),
    );
  }
  const wrong = [
    "",
    "(",
    "x^",
    "1/0",
    "phi^(1/2)",
    "phi^-1",
    "phi + phi",
    "sqrt(phi)",
    "3 GeV",
    "foo",
    "phi_",
    "\\foo",
    "1e999",
    "-1",
    "phi^99999",
    "|phi|",
    "x^y",
    "p",
    "\u0000",
  ];
  const premises = (mistake: string) =>
    block(
      "premises",
      { blockId: "p", d: mistake },
      row("fields", "f0", "a", { symbol: "phi", charges: mistake }),
      row("fields", "f1", "b", { symbol: mistake, kind: "Schrödinger field", dimension: mistake }),
      row("symmetries", "y0", "a", { name: "S", group: mistake }),
      row("scales", "s0", "a", { symbol: "p", role: "probe", value: mistake }),
      row("scales", "s1", "b", { symbol: mistake, role: "probe", value: "p + 1 GeV" }),
      row("terms", "t0", "a", { term: mistake, natural: mistake, assigned: mistake }),
      row("terms", "t1", "b", { term: "phi^3", natural: "", assigned: mistake }),
    );
  it.each(wrong)("leave no fact unsaid: %j", (mistake) => {
    const said = sayAll(
      premises(mistake),
      block("scaling", { blockId: "s", probe: mistake, heavy: mistake }),
      block("orderPlan", {
        blockId: "o",
        target: mistake,
        probe: mistake,
        heavy: mistake,
        insertions: mistake,
        cap: mistake,
      }),
      block(
        "divergence",
        { blockId: "d" },
        row("vertices", "v", "a", { term: mistake, count: mistake }),
        row("legs", "l", "a", { field: mistake, count: mistake }),
      ),
      truncationBlock("t", { q: mistake, belief: mistake, nu0: mistake, tau0: mistake, reference: mistake }),
    );
    expect(said.length).toBeGreaterThan(3);
    // `said` puts a question mark where a fact is missing.
    expect(
      said.filter((sentence) => /\?(?!$)/.test(sentence.replace(/Did you mean “[^”]*”\?$/, ""))),
    ).toEqual([]);
    expect(said.filter((sentence) => sentence.startsWith("Something is wrong"))).toEqual([]);
  });
});
