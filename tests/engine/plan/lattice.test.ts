import { describe, expect, it } from "vitest";
import katex from "katex";
import { evaluateNotebook, readDocument } from "#engine/index.ts";
import { planLattice } from "#engine/plan/lattice.ts";
import { count, valueOf } from "../counting/ask-counting.ts";
import { block, documentOf, row } from "../notebook/documents.ts";

/** Terms of these orders in Q = 0.1 and a second parameter, whatever rules gave them. */
function given(alpha: number, orders: readonly (readonly string[])[]) {
  const value = valueOf({
    theory: {
      fields: { phi: "real scalar" },
      scales: { p: ["350 GeV", "probe"], Lambda: ["3.5 TeV", "heavy"] },
      terms: ["lambda/4! phi^4"],
    },
  });
  const [term] = value.terms;
  const [Q] = value.parameters;
  if (!term || !Q) throw new Error("both are there");
  return {
    ...value,
    parameters: [Q, { ...Q, id: "alpha", symbol: "alpha", latex: "\\alpha", size: alpha }],
    terms: orders.map((order) => ({ ...term, allowed: true, order })),
  };
}

describe("a lattice of orders", () => {
  it("is cut where the sum left out falls below the target (by hand)", () => {
    // Sizes: α = 3e-2, Q² = 1e-2, α² = 9e-4, αQ² = 3e-4, Q⁴ = 1e-4. Sums after: 1.13e-2, 1.3e-3, 4e-4, 1e-4, 0.
    const lattice = planLattice(
      given(0.03, [
        ["2", "0"],
        ["0", "1"],
      ]),
      2,
      1e-3,
    );
    expect(lattice?.points.map(({ order, included }) => [order.join(","), included])).toEqual([
      ["0,1", true],
      ["2,0", true],
      ["0,2", true],
      ["2,1", false],
      ["4,0", false],
    ]);
    const left = lattice?.points.map(({ leftOut }) => leftOut) ?? [];
    for (const [at, sum] of [1.13e-2, 1.3e-3, 4e-4, 1e-4, 0].entries()) expect(left[at]).toBeCloseTo(sum, 12);
  });
  it("counts products that fall on one point (by hand)", () => {
    // Two different terms of order (1, 0): a² , ab, b² all stand at (2, 0).
    const lattice = planLattice(
      given(0.03, [
        ["1", "0"],
        ["1", "0"],
      ]),
      2,
      1e-3,
    );
    expect(lattice?.points.map(({ order, count }) => [order[0], count])).toEqual([
      ["1", 2],
      ["2", 3],
    ]);
  });
  it("is none where a parameter is not small", () => {
    expect(planLattice(given(2, [["0", "1"]]), 2, 1e-3)).toBeNull();
  });

  // Own derivation: beyond the cut α Q² + Q⁴ = 4e-4 with dQ/Q = 0.2 from Λ alone; d(sum) = 0.2 (2 αQ² + 4 Q⁴) = 2e-4.
  it("carries the uncertainty of a scale, and says how far the probe may grow", () => {
    const counting = count({
      theory: {
        fields: { phi: "real scalar" },
        scales: { p: ["350 GeV", "probe"], Lambda: ["3.5(7) TeV", "heavy"] },
        terms: ["g/6! phi^6", "alpha phi^4"],
      },
      parameters: [
        { symbol: "Q", value: "p/Lambda" },
        { symbol: "alpha", value: "0.03" },
      ],
      rules: [
        { of: "field", symbol: "", weight: "1, 0" },
        { of: "coupling or scale", symbol: "alpha", weight: "0, 1" },
        { of: "measure", weight: "-4, 0" },
      ],
    }).value;
    expect(counting?.parameters.map(({ follows }) => follows)).toEqual([
      { probe: 1, heavy: -1 },
      { probe: 0, heavy: 0 },
    ]);
    const lattice = counting && planLattice(counting, 2, 1e-3, { probe: 0, heavy: 0.2 });
    expect(lattice?.leftOut.value).toBeCloseTo(4e-4, 12);
    expect(lattice?.leftOut.sigma).toBeCloseTo(2e-4, 12);
    // 3e-4 f² + 1e-4 f⁴ = 1e-3 at f² = (−3 + √49)/2 = 2.
    expect(lattice?.largestProbe).toBeCloseTo(Math.SQRT2, 9);
    // Λ 20 % lower: Q = 0.125, 3e-4/0.64 + 1e-4/0.4096 = 7.13e-4, still below 1e-3.
    const lower = lattice?.moves.find(({ what }) => what === "heavy down");
    expect(lower?.leftOut).toBeCloseTo(3e-4 / 0.64 + 1e-4 / 0.4096, 12);
    expect(lower?.meetsTarget).toBe(true);
  });

  it("names no largest probe for a parameter that is no power of the scales", () => {
    const counting = count({
      theory: {
        fields: { phi: "real scalar" },
        scales: { p: ["350 GeV", "probe"], m: ["330 GeV", "light"], Lambda: ["3.5 TeV", "heavy"] },
        terms: ["g/6! phi^6"],
      },
      parameters: [{ symbol: "Q", value: "max(p, m)/Lambda" }],
    }).value;
    expect(counting?.parameters[0]?.follows).toBeNull();
    expect(counting && planLattice(counting, 2, 1e-3)?.largestProbe).toBeNull();
  });

  it("says which terms it passes over", () => {
    const lattice = planLattice(
      given(0.03, [
        ["2", "0"],
        ["-1", "0"],
      ]),
      2,
      1e-3,
    );
    expect(lattice?.passedOver).toEqual({ withoutOrder: 0, notSmall: 1 });
  });
});

describe("a plan that refers to counting rules", () => {
  it("gives the lattice with its numbers to pin, and its working", () => {
    const outcomes = evaluateNotebook(
      readDocument(
        documentOf(
          block(
            "premises",
            { blockId: "p" },
            row("fields", "f", "a", { symbol: "chi", kind: "real scalar" }),
            row("scales", "s1", "a", { symbol: "Lambda", value: "3.5(7) TeV", role: "heavy" }),
            row("scales", "s2", "b", { symbol: "p", value: "350 GeV", role: "probe" }),
            row("terms", "six", "a", { term: "g/6! chi^6" }),
            row("terms", "eight", "b", { term: "h chi^8" }),
          ),
          block("countingRules", { blockId: "c", standsOn: "p" }),
          block("orderPlan", { blockId: "o", standsOn: "p", counting: "c", target: "2e-3" }),
        ),
      ).blocks,
      {
        memo: new Map(),
        onInternalError: (error) => {
          throw error;
        },
      },
    );
    const plan = outcomes.find(({ blockId }) => blockId === "o")?.evaluation;
    expect(plan?.problems).toEqual([]);
    const ids = plan?.scalars.map(({ id }) => id) ?? [];
    for (const id of ["lattice/left-out", "lattice/kept", "lattice/largest-probe"]) expect(ids).toContain(id);
    expect(
      plan?.working.some((step) => step.step === "heading" && step.text === "In several small parameters"),
    ).toBe(true);
    for (const step of plan?.working ?? [])
      if (step.step === "formula")
        expect(() => katex.renderToString(step.latex, { throwOnError: true })).not.toThrow();
  });
});
