import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { isContradictory, linearSum, variance } from "#engine/budget/combine.ts";
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
  part: "the number",
  group: "",
  ...more,
});
const evaluate = (inputs: Partial<BudgetInputs>, context: EvaluationContext = aloneContext) =>
  errorBudget.evaluate({ ...initial, sources: [], correlations: [], pairs: [], ...inputs }, null, context);
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
    const list = Array.from({ length: count }, (_, index) => ({
      rowId: String(index),
      size: index === 0 ? 10 : 1,
      group: "g",
    }));
    expect(isContradictory(list, () => r)).toBe(contradict);
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
      rowId: fc.constant("a"),
      size: fc.double({ min: -10, max: 10, noNaN: true }),
      group: fc.constantFrom("", "a", "b"),
    });
    fc.assert(
      fc.property(
        fc.array(contribution, { maxLength: 6 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (list, r) => {
          const squared = variance(list, (one, other) =>
            one.group !== "" && one.group === other.group ? r : 0,
          );
          expect(squared).toBeGreaterThanOrEqual(-1e-9);
          expect(Math.sqrt(Math.max(0, squared))).toBeLessThanOrEqual(linearSum(list) + 1e-9);
        },
      ),
    );
  });
  // JCGM 100:2008, H.2, from memory: five simultaneous readings of voltage, current and phase angle (table H.2), their means
  // and coefficients of correlation, and resistance, reactance and impedance with their uncertainties (tables H.3, H.4).
  // From the readings follow the printed digits, but for the last one of the error of X; the sensitivities are those of R = (V/I) cos φ, X = (V/I) sin φ, Z = V/I.
  describe("with a coefficient for each pair: resistance and reactance measured at once (GUM, H.2)", () => {
    const readings = {
      V: [5.007, 4.994, 5.005, 4.99, 4.999],
      I: [19.663e-3, 19.639e-3, 19.64e-3, 19.685e-3, 19.678e-3],
      phi: [1.0456, 1.0438, 1.0468, 1.0428, 1.0433],
    };
    const mean = (list: readonly number[]) => list.reduce((sum, one) => sum + one, 0) / list.length;
    const covariance = (a: readonly number[], b: readonly number[]) =>
      a.reduce((sum, one, n) => sum + (one - mean(a)) * ((b[n] ?? NaN) - mean(b)), 0) /
      (a.length * (a.length - 1));
    const u = (list: readonly number[]) => Math.sqrt(covariance(list, list));
    const r = (a: readonly number[], b: readonly number[]) => covariance(a, b) / (u(a) * u(b));
    const [V, I, phi] = [mean(readings.V), mean(readings.I), mean(readings.phi)];
    const pairs = [
      { id: "1", first: "V", second: "I", coefficient: String(r(readings.V, readings.I)) },
      { id: "2", first: "phi", second: "V", coefficient: String(r(readings.V, readings.phi)) },
      { id: "3", first: "I", second: "phi", coefficient: String(r(readings.I, readings.phi)) },
    ];
    it("has the printed means and coefficients", () => {
      expect([V, 1000 * I, phi].map((one, n) => one.toFixed([4, 4, 5][n]))).toEqual([
        "4.9990",
        "19.6610",
        "1.04446",
      ]);
      expect(pairs.map(({ coefficient }) => Number(coefficient).toFixed(2))).toEqual([
        "-0.36",
        "0.86",
        "-0.65",
      ]);
    });
    it.each([
      ["R", (V / I) * Math.cos(phi), -(V / I) * Math.sin(phi), "127.732", "0.071"],
      ["X", (V / I) * Math.sin(phi), (V / I) * Math.cos(phi), "219.847", "0.295"],
      ["Z", V / I, 0, "254.260", "0.236"],
    ])("%s", (_, value, byAngle, printed, error) => {
      const sources = [
        source("V", String((value / V) * u(readings.V))),
        source("I", String((-value / I) * u(readings.I))),
        source("phi", String(byAngle * u(readings.phi))),
      ];
      expect(value.toFixed(3)).toBe(printed);
      // From memory 0.295 is printed for X, where the readings give 0.2956.
      if (printed === "219.847")
        expect(Math.abs(total({ sources, pairs }) - Number(error))).toBeLessThan(0.001);
      else expect(total({ sources, pairs }).toFixed(3)).toBe(error);
    });
  });
  it("by pairs: one's own coefficient counts before the group's", () => {
    const sources = ["a", "b", "c"].map((name) => source(name, "1", { group: "g" }));
    const pairs = [{ id: "p", first: "c", second: "a", coefficient: "−0.5" }];
    // 3 + 2 (1 · 2 − 0.5): but a with b, and b with c, fully, leave a and c no choice.
    expect(codes({ sources, pairs })).toContain("correlations-contradict");
    const correlations = [{ id: "g", group: "g", coefficient: "0.25" }];
    expect(total({ sources, pairs, correlations })).toBeCloseTo(Math.sqrt(3 + 2 * (0.25 + 0.25 - 0.5)), 11);
  });
  it.each([
    [{ first: "a", second: "gone", coefficient: "0.5" }, "pair-incomplete"],
    [{ first: "a", second: "a", coefficient: "0.5" }, "pair-with-itself"],
    [{ first: "a", second: "b", coefficient: "" }, "coefficient-unreadable"],
  ])("pair %j: %s", (pair, code) => {
    expect(codes({ sources: [source("a", "1"), source("b", "1")], pairs: [{ id: "p", ...pair }] })).toContain(
      code,
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
              { id: "fit", label: "", value: { type: "number", value: 5000, sigma: 70, unit: "MeV" } },
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
  it("is taken by its own uncertainty, where it has one", () => {
    const part = "its uncertainty";
    const fit = { unit: "GeV", sources: [source("fit", "", { from: "t", scalar: "fit", part })] };
    expect(evaluate(fit, context).value?.total).toBeCloseTo(0.07, 12);
    const error = { unit: "GeV", sources: [source("fit", "", { from: "t", scalar: "error", part })] };
    expect(codes(error, context)).toContain("budget-scalar-certain");
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
