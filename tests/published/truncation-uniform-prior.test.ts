import { describe, expect, it } from "vitest";
import { uniformPriorFactor } from "#engine/truncation/estimates.ts";
import { evaluateBlock, partialSums, scalar } from "../engine/truncation/truncation-block.ts";

describe("uniform prior of Cacciari and Houdeau (2011)", () => {
  // Closed form of Cacciari & Houdeau, J. High Energy Phys. 09 (2011) 039, recomputed independently and checked
  // against numerical integration of the priors to 1e-9; half-width in units of c̄ Q^(k+1), by n_c.
  const beliefs = [0.5, 0.68, 0.9, 0.95, 0.99];
  it.each([
    [1, [1.0, 1.5625, 5.0, 10.0, 50.0]],
    [2, [0.75, 1.0206207, 1.8257419, 2.5819889, 5.7735027]],
    [3, [0.66666667, 0.90666667, 1.3572088, 1.7099759, 2.9240177]],
    [4, [0.625, 0.85, 1.1892071, 1.4142136, 2.1147425]],
    [5, [0.6, 0.816, 1.1075663, 1.2722596, 1.7553744]],
    [6, [0.58333333, 0.79333333, 1.0612483, 1.1912109, 1.5576994]],
  ])("has the tabulated half-widths for %d coefficients", (count, expected) => {
    beliefs.forEach((p, index) => {
      expect(uniformPriorFactor(count, p) / (expected[index] ?? NaN)).toBeCloseTo(1, 7);
    });
  });

  it.each([1, 2, 3, 4, 7])(
    "gives the first omitted term itself at p = n_c/(n_c + 1), %d coefficients",
    (count) => {
      // The observation of Furnstahl, Klco, Phillips, Wesolowski, Phys. Rev. C 92 (2015) 024005, on the same prior.
      expect(uniformPriorFactor(count, count / (count + 1))).toBeCloseTo(1, 14);
    },
  );

  describe("for the QCD factor of e⁺e⁻ → hadrons, the process Cacciari and Houdeau use", () => {
    // Coefficients 1, 1.409, −12.8 of (α_s/π)ⁿ for five flavours: Gorishny, Kataev, Larin (1991); Surguladze, Samuel
    // (1991). α_s = 0.118. Intervals: own evaluation of the closed form; the paper's tables were not seen.
    const alpha = 0.118;
    const coefficients = [1, 1 / Math.PI, 1.409 / Math.PI ** 2, -12.8 / Math.PI ** 3];
    it.each([
      [1, 1.0375606, 0.31830989, 0.0069252295, 0.044321469],
      [2, 1.0395484, 0.31830989, 0.00053377783, 0.001350363],
      [3, 1.0388701, 0.41281964, 7.2566475e-5, 1.3686058e-4],
    ])("through order %d", (k, sum, largest, at68, at95) => {
      const result = evaluateBlock(partialSums(coefficients.slice(0, k + 1), alpha), {
        q: String(alpha),
        method: "uniform prior",
        omitted: "first omitted term",
      });
      expect(scalar(result, "value") / sum).toBeCloseTo(1, 7);
      expect((result.value?.orders.at(-1)?.largest ?? NaN) / largest).toBeCloseTo(1, 7);
      expect(scalar(result, "uniform/68") / at68).toBeCloseTo(1, 7);
      expect(scalar(result, "uniform/95") / at95).toBeCloseTo(1, 7);
    });

    it("changes when the same series is taken in α_s/π: the method is not invariant under rescaling", () => {
      // The trap that Bagnaschi, Cacciari, Guffanti, Jenniches, J. High Energy Phys. 02 (2015) 133, set out to mend.
      const q = alpha / Math.PI;
      const result = evaluateBlock(partialSums([1, 1, 1.409, -12.8], q), { q: String(q) });
      expect(scalar(result, "uniform/68") / 2.3098627e-5).toBeCloseTo(1, 6);
    });
  });

  // Prior set A⁽¹⁾ of Furnstahl, Klco, Phillips, Wesolowski (2015) with the limits of c̄ at 0 and ∞; c_0 counted.
  // Own evaluation of the closed forms; errors in units of X_ref = 1.
  it.each([
    [[1], 0.2, 0.3125, 2.0],
    [[1, 1], 0.2, 0.040824829, 0.10327956],
    [[1, -0.5, 0.7], 0.3, 0.02448, 0.046169351],
    [[1, 2.3, -0.7, 0.4], 1 / 3, 0.024135802, 0.040156681],
    [[1, 0.2, -0.3, 0.9, -1.5], 0.5, 0.03825, 0.05963717],
  ])("set A for the coefficients %j at Q = %d", (coefficients, q, at68, at95) => {
    const result = evaluateBlock(partialSums(coefficients, q), {
      q: String(q),
      reference: "1",
      first: "from c_0",
    });
    expect(scalar(result, "uniform/68") / at68).toBeCloseTo(1, 6);
    expect(scalar(result, "uniform/95") / at95).toBeCloseTo(1, 6);
  });

  it("sums the electron's magnetic moment to the value its coefficients give", () => {
    // QED coefficients A_1 … A_5 of (α/π)ⁿ (Schwinger 1948; Petermann, Sommerfield 1957; Laporta, Remiddi 1996;
    // Laporta 2017; Aoyama, Kinoshita, Nio 2019), from memory; sum and interval derived from them.
    const q = 1 / 137.035999177 / Math.PI;
    const a = [0, 0.5, -0.328478965579, 1.181241456587, -1.912245764926];
    const orders = Object.fromEntries(Object.entries(partialSums(a, q)).slice(1));
    const result = evaluateBlock(orders, { q: String(q), reference: "1" });
    expect(scalar(result, "n2/value") / 0.001159637427037).toBeCloseTo(1, 11);
    expect(scalar(result, "n4/value") / 0.001159652175573).toBeCloseTo(1, 11);
    // Through order 3, c̄ = 1.1812 and n_c = 3.
    expect(scalar(result, "n3/uniform/68") / 3.1178e-11).toBeCloseTo(1, 4);
  });
});
