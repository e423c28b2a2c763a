import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { wordProblem } from "#contract/problem-words.ts";
import { methods } from "#engine/truncation/shape.ts";
import { theoryOf } from "../theory-builder.ts";
import { evaluateCurve } from "./curve-block.ts";

const theory = theoryOf({
  fields: {},
  terms: {},
  scales: [{ symbol: "Lambda", role: "heavy", value: 600, unit: "MeV" }],
});

/** Numbers a table may hold: ordinary ones mostly, then the ends of what a double can. */
const cell = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: -50, max: 50, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(null, 0, 1e-300, -1e300, 1e308, 1e-9) },
);
const tables = fc.integer({ min: 0, max: 9 }).chain((count) =>
  fc.record({
    x: fc.array(fc.double({ min: 1, max: 900, noNaN: true }), { minLength: count, maxLength: count }),
    orders: fc.dictionary(
      fc.constantFrom("0", "1", "2", "3", "7"),
      fc.array(cell, { minLength: count, maxLength: count }),
      { maxKeys: 4 },
    ),
  }),
);
const settings = fc.record({
  method: fc.constantFrom(...methods),
  omitted: fc.constantFrom("all omitted orders", "first omitted term"),
  first: fc.constantFrom("from c_1", "from c_0"),
  reference: fc.constantFrom("LO", "1", "-3"),
  nu0: fc.constantFrom("0", "1", "2.5"),
  q: fc.constantFrom("", "p/Lambda", "0.3", "0.97", "2", "(p + Lambda)/(3 Lambda)"),
  terms: fc.constantFrom("", "1", "5"),
  length: fc.constantFrom("", "40", "1e9", "1e-9"),
  nugget: fc.constantFrom("", "1e-30", "0.05"),
  breakdownPrior: fc.constantFrom("uniform", "normal in its logarithm", "uniform in its logarithm"),
});

/** Where numbers are that JSON cannot hold. */
function holes(value: unknown, path = ""): string[] {
  if (typeof value === "number") return Number.isFinite(value) ? [] : [path];
  if (typeof value !== "object" || value === null) return value === undefined ? [path] : [];
  return Object.entries(value).flatMap(([name, inside]) => holes(inside, `${path}/${name}`));
}

describe("a block along x, whatever the table", () => {
  it("is total, gives plain JSON without holes, and says everything in words", () => {
    fc.assert(
      fc.property(tables, settings, (table, inputs) => {
        const result = evaluateCurve({ d: { ...table, x: [...table.x] } }, inputs, theory);
        expect(holes(result)).toEqual([]);
        for (const said of [...result.problems, ...result.notices].map(wordProblem))
          expect(said).not.toMatch(/\?(?!$)|undefined|NaN|Infinity/);
        if (result.value === null) expect(result.problems.length).toBeGreaterThan(0);
      }),
      { numRuns: 40, seed: 20261201 },
    );
  });
});
