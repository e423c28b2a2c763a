import katex from "katex";
import { describe, expect, it } from "vitest";
import { presetNames } from "#engine/counting/preset-names.ts";
import type { Sketch } from "../premises/state.ts";
import { count, graphOf, ordersOf, valueOf } from "./ask-counting.ts";

const quartic: Sketch = {
  fields: { phi: "real scalar" },
  scales: { p: ["350 GeV", "probe"], Lambda: ["3.5(7) TeV", "heavy"] },
  terms: ["1/2 (∂phi)^2", "lambda/4! phi^4", "c_6/Lambda^2 phi^6", "c_8/Lambda^4 d^4 phi^4"],
};
const yukawa: Sketch = {
  d: "d",
  fields: { phi: "real scalar", psi: "Dirac spinor" },
  terms: ["y psibar psi phi", "lambda/4! phi^4", "G psibar psi psibar psi", "h d^2 phi^6"],
};
const lifshitz: Sketch = {
  D: "3",
  z: "2",
  fields: { psi: "Schrödinger field", chi: "anisotropic scalar" },
  terms: ["g psi* psi chi", "C psi* psi* psi psi", "h psi* d_t psi chi", "k d_i^2 psi* psi chi^2"],
};

describe("counting by dimension", () => {
  it.each([
    ["a scalar", quartic],
    ["spinors in any d", yukawa],
    ["space and time apart", lifshitz],
  ])("is the case where every weight is the dimension: %s", (_, theory) => {
    const { terms, verdict } = valueOf({ theory });
    for (const { order, byDimension } of terms) expect(order).toEqual([byDimension.text]);
    expect(verdict).toBe(theory === yukawa ? "not comparable" : "just by dimension");
  });

  it("takes Q = p/Λ from the premises, and sizes keep its uncertainty", () => {
    const { parameters, terms } = valueOf({ theory: quartic });
    expect(parameters[0]?.size).toBeCloseTo(0.1, 12);
    expect(parameters[0]?.sigma).toBeCloseTo(0.02, 12);
    expect(terms[2]?.size?.value).toBeCloseTo(0.01, 12);
    expect(terms[2]?.size?.sigma).toBeCloseTo(0.004, 12);
  });

  it("gives graphs their degree with the loop's own measure", () => {
    // Two φ⁴ and four legs: d − 4·1 = 0 in d = 4, one loop.
    const graph = { vertices: [{ term: "t2", count: "2" }], legs: [{ field: "phi", count: "4" }] };
    expect(graphOf({ theory: quartic, ...graph })).toBe("0");
  });
});

describe("rules of one's own", () => {
  const theory: Sketch = { ...quartic, terms: ["lambda/4! phi^4", "g/6! phi^6"] };
  const rules = [
    { of: "field", symbol: "", weight: "1, 0" },
    { of: "coupling or scale", symbol: "lambda", weight: "0, 0" },
    { of: "coupling or scale", symbol: "g", weight: "0, 1/2" },
    { of: "measure", weight: "-4, 0" },
  ];
  const parameters = [
    { symbol: "Q", value: "p/Lambda" },
    { symbol: "alpha", value: "0.01" },
  ];

  it("count in several parameters, and compare sequences by size", () => {
    const value = valueOf({ theory, rules, parameters });
    expect(value.terms.map(({ order }) => order)).toEqual([
      ["0", "0"],
      ["2", "1/2"],
    ]);
    // 1 against 0.1² · 0.1: the same sequence as dimensions 0 and 2.
    expect(value.terms.map(({ size }) => size?.value)).toEqual([1, expect.closeTo(0.001, 12)]);
    expect(value.verdict).toBe("same sequence");
    expect(value.isEdited).toBe(true);
  });

  it("may turn the sequence around, and say which terms change place", () => {
    const turned = rules.map((rule) => (rule.symbol === "g" ? { ...rule, weight: "-3, 0" } : rule));
    const value = valueOf({ theory, rules: turned, parameters });
    expect(value.verdict).toBe("another sequence");
    expect(value.terms.map(({ place, placeByDimension }) => [place, placeByDimension])).toEqual([
      [2, 1],
      [1, 2],
    ]);
  });

  it("see a term that comes to stand beside the kinetic terms, which no row writes", () => {
    const beside = rules
      .filter(({ symbol }) => symbol !== "lambda")
      .map((rule) => (rule.symbol === "g" ? { ...rule, weight: "-2, 0" } : rule));
    expect(valueOf({ theory: { ...theory, terms: ["g/6! phi^6"] }, rules: beside, parameters }).verdict).toBe(
      "another sequence",
    );
  });

  it("are corrected term by term among the exceptions", () => {
    const exceptions = [{ term: "t2", weight: "1, 0" }];
    expect(ordersOf({ theory, rules, parameters, exceptions })[1]).toBe("3, 1/2");
  });

  it.each([
    ["a field without a rule", [{ of: "measure", weight: "-4" }], "rule-missing", ["rules"]],
    [
      "too many exponents",
      [{ of: "measure", weight: "-4, 0" }],
      "weight-count",
      ["rules", "rules1", "weight"],
    ],
    [
      "an unknown field",
      [{ of: "field", symbol: "chi", weight: "1" }],
      "rule-symbol-unknown",
      ["rules", "rules1", "symbol"],
    ],
    [
      "a coupling that is nowhere",
      [{ of: "coupling or scale", symbol: "zeta", weight: "1" }],
      "rule-symbol-unknown",
      ["rules", "rules1", "symbol"],
    ],
    [
      "a symbol for the measure",
      [{ of: "measure", symbol: "x", weight: "1" }],
      "rule-symbol-needless",
      ["rules", "rules1", "symbol"],
    ],
    [
      "a rule twice",
      [
        { of: "measure", weight: "1" },
        { of: "measure", weight: "2" },
      ],
      "rule-twice",
      ["rules", "rules2", "of"],
    ],
    [
      "what is no exponent",
      [{ of: "measure", weight: "x" }],
      "unknown-symbol",
      ["rules", "rules1", "weight"],
    ],
  ] as const)("say what is wrong with %s", (_, typed, code, path) => {
    const { problems } = count({ theory, rules: typed });
    expect(problems).toContainEqual(expect.objectContaining({ code, path }));
  });

  it.each([
    ["3", "parameter-not-small"],
    ["2 GeV", "parameter-not-a-number"],
    ["q/Lambda", "unknown-symbol"],
  ])("refuse %s as a small parameter", (value, code) => {
    const { problems } = count({ theory, parameters: [{ symbol: "Q", value }] });
    expect(problems.map((problem) => problem.code)).toContain(code);
  });

  it("leave published rules alone when a parameter is added, and say when one is missing", () => {
    const value = valueOf({ theory, parameters });
    expect(value.terms.map(({ order }) => order)).toEqual([
      ["0", "0"],
      ["2", "0"],
    ]);
    expect(value.proposal.rules.every(({ weight }) => weight.split(",").length === 2)).toBe(true);
    const { problems } = count({ theory, preset: "post-Newtonian", parameters: parameters.slice(0, 1) });
    expect(problems).toMatchObject([{ code: "parameters-too-few", path: ["parameters"] }]);
  });

  it("count all other couplings by the rule without a symbol, and tell weights of couplings in the working", () => {
    const others = rules.map((rule) => (rule.symbol === "g" ? { ...rule, symbol: "" } : rule));
    const { value, working } = count({ theory, rules: others, parameters });
    expect(value?.terms.map(({ order }) => order)).toEqual([
      ["0", "0"],
      ["2", "1/2"],
    ]);
    const own = count({ theory, rules, parameters, exceptions: [{ term: "t2", weight: "1, 0" }] }).working;
    const told = own.map((step) => (step.step === "formula" ? step.latex : step.text)).join("\n");
    expect(told).toMatch(/g &\\to/);
    expect(told).toContain("By hand");
    expect(working.length).toBeGreaterThan(0);
  });

  it("warn when a kinetic term counts something", () => {
    const { notices } = count({
      theory: quartic,
      rules: [...rules.map((r) => ({ ...r, weight: "1" })), { of: "derivative", weight: "1" }],
    });
    expect(notices.map(({ code }) => code)).toContain("kinetic-term-counts");
  });
});

describe("every published counting", () => {
  it.each(presetNames)("%s has rules that read, a working that typesets and its conventions", (preset) => {
    for (const theory of [quartic, lifshitz]) {
      const { value, problems, working } = count({ theory, preset });
      expect(problems).toEqual([]);
      expect(value?.conventions).toMatch(/\S/);
      expect(value?.isEdited).toBe(false);
      // Rules copied into the table are the published ones still.
      const rules = value?.proposal.rules ?? [];
      const parameters = value?.proposal.parameters ?? [];
      const copied = valueOf({ theory, preset, rules: rules.map((rule) => ({ ...rule })), parameters });
      expect(copied.isEdited).toBe(false);
      expect(copied.terms).toEqual(value?.terms);
      for (const step of working)
        if (step.step === "formula")
          expect(() => katex.renderToString(step.latex, { throwOnError: true })).not.toThrow();
        else
          for (const [, latex = ""] of step.text.matchAll(/\$([^$]+)\$/g))
            expect(() => katex.renderToString(latex, { throwOnError: true })).not.toThrow();
    }
  });
});
