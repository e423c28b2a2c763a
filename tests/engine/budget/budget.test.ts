import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { contradictoryGroups, linearSum, variance } from "#engine/budget/combine.ts";
import { budgetShape, type BudgetInputs } from "#engine/budget/inputs.ts";
import { errorBudget } from "#engine/budget/kind.ts";
import { resultText } from "#engine/budget/result-text.ts";
import { aloneContext, type EvaluationContext } from "#engine/kind.ts";

const initial = Object.fromEntries(
  Object.entries(budgetShape.fields).map(([name, spec]) => [name, spec.initial]),
) as unknown as BudgetInputs; // every single field of the shape
type Source = BudgetInputs["sources"][number];
const source = (name: string, size: string, more: Partial<Source> = {}): Source => ({
  id: name,
  name,
  kind: "other",
  size,
  from: "",
  scalar: "",
  group: "",
  ...more,
});
const evaluate = (inputs: Partial<BudgetInputs>, context: EvaluationContext = aloneContext) =>
  errorBudget.evaluate({ ...initial, sources: [], correlations: [], ...inputs }, null, context);
const total = (inputs: Partial<BudgetInputs>) => {
  const { value, problems } = evaluate(inputs);
  return value?.total ?? expect.fail(problems.map(({ code }) => code).join(", "));
};
const codes = (inputs: Partial<BudgetInputs>, context?: EvaluationContext) => {
  const { problems, notices } = evaluate(inputs, context);
  return [...problems, ...notices].map(({ code }) => code);
};

describe("errors combined", () => {
  // JCGM 100:2008, 5.2.2, example: ten resistors, each with 100 mΩ from one common standard, r = 1, add linearly to 1 Ω.
  it("ten resistors compared with one standard (GUM, 5.2.2)", () => {
    const sources = Array.from({ length: 10 }, (_, index) =>
      source(`R${index}`, "0.1", { group: "standard" }),
    );
    expect(total({ sources })).toBeCloseTo(1, 12);
    // The same without their correlation, as the example warns: 0.32 Ω.
    expect(total({ sources: sources.map((row) => ({ ...row, group: "" })) })).toBeCloseTo(0.32, 2);
  });
  // JCGM 100:2008, H.1, table H.1: components of an end gauge in nm, from memory; they combine to 32 nm as printed there.
  it("an end gauge's components (GUM, H.1)", () => {
    const sources = ["25", "9.7", "2.9", "16.6"].map((size) => source(size, size));
    expect(total({ sources })).toBeCloseTo(31.7, 1);
  });
  it("of one group by its coefficient, between 0 (quadrature) and 1 (sum), opposed ones by their sign", () => {
    const pair = (coefficient: string, second = "4") =>
      total({
        sources: [source("a", "3", { group: "g" }), source("b", second, { group: "g" })],
        correlations: [{ id: "c", group: "g", coefficient }],
      });
    expect(pair("0")).toBeCloseTo(5, 12);
    expect(pair("1")).toBeCloseTo(7, 12);
    expect(pair("-1")).toBeCloseTo(1, 12);
    expect(pair("1", "-4")).toBeCloseTo(1, 12);
    expect(pair("0.5")).toBeCloseTo(Math.sqrt(37), 11);
  });
  // Eigenvalue 1 + (n - 1) r of a matrix with one coefficient everywhere; own derivation.
  it.each([
    [2, -1, false],
    [3, -0.5, false],
    [3, -0.51, true],
    [4, -0.3333, false],
    [4, -0.4, true],
  ])("%d of one group with coefficient %d contradict each other: %s", (count, r, contradict) => {
    const list = Array.from({ length: count }, (_, index) => ({ size: index === 0 ? 10 : 1, group: "g" }));
    expect(contradictoryGroups(list, () => r).length > 0).toBe(contradict);
  });
  it("are refused when they contradict each other, also beside a large error", () => {
    const sources = ["a", "b", "c"].map((name) =>
      source(name, name === "a" ? "10" : "1", { group: "g", kind: "numerical" }),
    );
    const correlations = [{ id: "c", group: "g", coefficient: "-0.9" }];
    expect(codes({ sources: [...sources, source("d", "50")], correlations })).toContain(
      "correlations-contradict",
    );
  });
  it("of several kinds that move together are said not to add up from their brackets", () => {
    const sources = [
      source("a", "1", { group: "g", kind: "numerical" }),
      source("b", "1", { group: "g", kind: "parametric" }),
    ];
    const free = [{ id: "c", group: "g", coefficient: "0" }];
    expect(codes({ value: "5", sources })).toEqual(["budget-kinds-correlated"]);
    expect(codes({ value: "5", sources, correlations: free })).toEqual([]);
    expect(codes({ value: "5", sources, combine: "linearly" })).toEqual([]);
  });
  it("linearly are never less than otherwise, and never more than their sizes", () => {
    const contribution = fc.record({
      size: fc.double({ min: -10, max: 10, noNaN: true }),
      group: fc.constantFrom("", "a", "b"),
    });
    fc.assert(
      fc.property(
        fc.array(contribution, { maxLength: 6 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (list, r) => {
          const squared = variance(list, () => r);
          expect(squared).toBeGreaterThanOrEqual(-1e-9);
          expect(Math.sqrt(Math.max(0, squared))).toBeLessThanOrEqual(linearSum(list) + 1e-9);
        },
      ),
    );
  });
  it("have shares that add up to the whole", () => {
    const { value } = evaluate({
      sources: [source("a", "3", { group: "g" }), source("b", "4", { group: "g" }), source("c", "2")],
    });
    expect(value?.rows.reduce((sum, { share }) => sum + (share ?? 0), 0)).toBeCloseTo(1, 11);
  });
});

describe("units", () => {
  it("of one family are converted, percentages are of the value", () => {
    expect(total({ unit: "GeV", value: "2", sources: [source("a", "3 MeV")] })).toBeCloseTo(0.003, 12);
    expect(total({ unit: "GeV", value: "2 GeV", sources: [source("a", "1.5 %")] })).toBeCloseTo(0.03, 12);
    expect(total({ unit: "pb", sources: [source("a", "0.2 pb"), source("b", "0")] })).toBeCloseTo(0.2, 12);
  });
  // ħc = 197.326 980 459 3… MeV fm, exact as a product in the SI of 2019 (CODATA 2022).
  it("of a ratio cancel, an energy times a length by ħc on request only", () => {
    expect(total({ sources: [source("a", "35 GeV / 3.5 TeV")] })).toBeCloseTo(0.01, 12);
    const inputs = { sources: [source("a", "1 MeV * 1 fm")] };
    expect(codes(inputs)).toContain("budget-units-differ");
    expect(total({ ...inputs, convert: "natural units, ħ = c = 1" })).toBeCloseTo(1 / 197.3269804593, 12);
  });
  it("of the other family by ħc, on request only", () => {
    const inputs = { unit: "MeV", sources: [source("a", "1 fm^-1")] };
    expect(codes(inputs)).toContain("budget-needs-conversion");
    expect(total({ ...inputs, convert: "natural units, ħ = c = 1" })).toBeCloseTo(197.3269804593, 9);
  });
  it.each([
    [
      { unit: "MeV", sources: [source("a", "1 fm")], convert: "natural units, ħ = c = 1" },
      "budget-units-differ",
    ],
    [{ unit: "pb", sources: [source("a", "1 mb")] }, "budget-units-differ"],
    [{ unit: "MeV", sources: [source("a", "about 3")] }, "size-unreadable"],
    [{ unit: "MeV", sources: [source("a", "3.2(4) MeV")] }, "size-uncertain-itself"],
    [{ unit: "pb", sources: [source("a", "3.2(4) pb")] }, "size-unreadable"],
    [{ value: "5.0(1)", sources: [source("a", "1")] }, "budget-value-uncertain"],
    [{ sources: [source("a", "3 %")] }, "percent-of-nothing"],
    [{ sources: [source("a", "")] }, "size-missing"],
    [{}, "budget-empty"],
    [
      { sources: [source("a", "1")], correlations: [{ id: "c", group: "g", coefficient: "2" }] },
      "coefficient-unreadable",
    ],
    [
      {
        sources: ["a", "b", "c"].map((name) => source(name, "1", { group: "g" })),
        correlations: [{ id: "c", group: "g", coefficient: "-1" }],
      },
      "correlations-contradict",
    ],
    [
      { sources: [source("a", "1", { kind: "truncation" }), source("b", "1", { kind: "scale variation" })] },
      "scale-variation-and-truncation",
    ],
  ])("%j: %s", (inputs, code) => {
    expect(codes(inputs)).toContain(code);
  });
});

describe("a number of another block", () => {
  const context: EvaluationContext = {
    source: (id) =>
      id === "t"
        ? {
            kind: "truncationError",
            value: {},
            title: "",
            scalars: [
              { id: "error", label: "", value: { type: "number", value: 120, unit: "MeV" } },
              { id: "order", label: "", value: { type: "word", text: "none" } },
            ],
          }
        : null,
    tell: () => undefined,
  };
  const taken = (scalar: string, from = "t") => ({
    unit: "GeV",
    sources: [source("orders", "", { from, scalar })],
  });
  it("is taken in the unit of the budget", () => {
    expect(evaluate(taken("error"), context).value?.total).toBeCloseTo(0.12, 12);
  });
  it.each([
    ["", "budget-scalar-missing"],
    ["order", "budget-scalar-no-number"],
  ])("%j: %s", (scalar, code) => {
    expect(codes(taken(scalar), context)).toContain(code);
  });
});

describe("the result in words", () => {
  it.each([
    [1.2341, [0.012, 0.005], "fm", "1.234(12)(5) fm"],
    [-0.5, [0.02], "", "−0.500(20)"],
    [1234, [56, 7], "MeV", "1234(56)(7) MeV"],
    [12345, [560], "", "12350(560)"],
    [0.00012346, [0.0000021], "", "0.0001235(21)"],
    [3, [0.1, 0], "", "3.00(10)(0)"],
    [1, [0.0996], "", "1.00(10)"],
    // A small error beside a large one keeps its digit; one too small for that is not called none.
    [1.23, [0.5, 0.002], "", "1.230(500)(2)"],
    [1.23, [0.5, 0.000001], "", "1.23000(50000)(<1)"],
    [150000, [12345, 300], "MeV", "150000(12300)(300) MeV"],
    [2.2e-20, [1e-22, 4e-22], "", "2.200(10)(40) × 10⁻²⁰"],
    [-1.234e25, [1e23, 2e23], "", "−1.234(10)(20) × 10²⁵"],
    [null, [0.3, 0.4], "pb", "± 0.3 ± 0.4 pb"],
  ])("%d with %j %s: %s", (value, errors, unit, text) => {
    expect(resultText(value, errors, unit)).toBe(text);
  });
});
