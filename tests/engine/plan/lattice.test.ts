import { describe, expect, it } from "vitest";
import { planLattice } from "#engine/plan/lattice.ts";
import { valueOf } from "../counting/ask-counting.ts";

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
});
