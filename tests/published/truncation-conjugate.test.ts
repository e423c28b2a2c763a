import { describe, expect, it } from "vitest";
import { studentHalfWidth } from "#engine/truncation/student-t.ts";
import { evaluateBlock, partialSums, scalar } from "../engine/truncation/truncation-block.ts";

describe("conjugate prior of Melendez et al. (2019)", () => {
  // Model: Melendez, Furnstahl, Phillips, Pratola, Wesolowski, Phys. Rev. C 100 (2019) 044001, sec. II and appendix A.
  // Worked examples: own evaluation with a general-purpose statistics library (scipy); c_0 counted.
  it.each([
    {
      nu0: 1,
      c: [1, -0.5, 0.7],
      q: 0.3,
      ref: 1,
      nu: 4,
      tau2: 0.685,
      sum: 0.913,
      at68: 0.026573777,
      at95: 0.065039538,
    },
    {
      nu0: 0,
      c: [1, -0.5, 0.7],
      q: 0.3,
      ref: 1,
      nu: 3,
      tau2: 0.58,
      sum: 0.913,
      at68: 0.02562789,
      at95: 0.068599058,
    },
    {
      nu0: 10,
      c: [0.9, -1.1, 0.4, 1.3],
      q: 0.5,
      ref: 20,
      nu: 14,
      tau2: 0.99071429,
      sum: 12.25,
      at68: 1.4812714,
      at95: 3.0813264,
    },
  ])("ν₀ = $nu0, coefficients $c, Q = $q", ({ nu0, c, q, ref, nu, tau2, sum, at68, at95 }) => {
    const result = evaluateBlock(partialSums(c, q, ref), {
      q: String(q),
      nu0: String(nu0),
      reference: String(ref),
      first: "from c_0",
    });
    const posterior = result.value?.orders.at(-1)?.posterior;
    expect(posterior?.nu).toBe(nu);
    expect(posterior?.tau2).toBeCloseTo(tau2, 8);
    expect(scalar(result, "value")).toBeCloseTo(sum, 12);
    expect(scalar(result, "conjugate/68") / at68).toBeCloseTo(1, 7);
    expect(scalar(result, "conjugate/95") / at95).toBeCloseTo(1, 7);
  });

  // Prior set C of Furnstahl, Klco, Phillips, Wesolowski, Phys. Rev. C 92 (2015) 024005, with the limits of c̄ at 0 and
  // ∞, is this model at ν₀ = 0: own derivation, checked against numerical integration of the priors to 1e-8.
  it.each([
    [[1], 0.2, 0.36379865, 2.5412409, 0.37130044, 2.5936432],
    [[1, 1], 0.2, 0.052463139, 0.17210611, 0.053544967, 0.17565506],
    [[1, -0.5, 0.7], 0.3, 0.024447449, 0.06543933, 0.02562789, 0.068599058],
    [[1, 2.3, -0.7, 0.4], 1 / 3, 0.018447166, 0.04514959, 0.019566174, 0.047888372],
    [[1, 0.2, -0.3, 0.9, -1.5], 0.5, 0.031572618, 0.073536586, 0.036456919, 0.084912736],
  ])("set C for the coefficients %j at Q = %d", (c, q, first68, first95, all68, all95) => {
    const result = evaluateBlock(partialSums(c, q), {
      q: String(q),
      nu0: "0",
      reference: "1",
      first: "from c_0",
    });
    expect(scalar(result, "conjugate-first/68") / first68).toBeCloseTo(1, 6);
    expect(scalar(result, "conjugate-first/95") / first95).toBeCloseTo(1, 6);
    expect(scalar(result, "conjugate/68") / all68).toBeCloseTo(1, 6);
    expect(scalar(result, "conjugate/95") / all95).toBeCloseTo(1, 6);
  });

  // Two-sided quantiles of Student's t at 68 %, at one standard deviation of a Gaussian (erf(1/√2) = 0.682689…) and at
  // 95 % (scipy; the 95 % column is in every printed table).
  it.each([
    [1, 1.8189932, 1.8373372, 12.706205],
    [2, 1.3115785, 1.3212774, 4.3026527],
    [3, 1.1889286, 1.1968814, 3.1824463],
    [4, 1.1343966, 1.1416266, 2.7764451],
    [5, 1.1036683, 1.1105066, 2.5705818],
    [10, 1.0464226, 1.0525624, 2.2281389],
    [14, 1.0310531, 1.0370125, 2.1447867],
    [30, 1.0112157, 1.0169468, 2.0422725],
  ])("quantiles for ν = %d", (nu, at68, atOneSigma, at95) => {
    expect(studentHalfWidth(0.68, nu)).toBeCloseTo(at68, 7);
    expect(studentHalfWidth(0.6826894921370859, nu)).toBeCloseTo(atOneSigma, 7);
    expect(studentHalfWidth(0.95, nu)).toBeCloseTo(at95, 6);
  });
});

describe("coefficients", () => {
  it("are the shifts over the reference and the power of Q", () => {
    // c_n = (X^(n) − X^(n−1))/(X_ref Qⁿ); own evaluation, exact.
    const result = evaluateBlock({ 0: "10.0", 1: "10.9", 2: "10.63", 3: "10.711" }, { q: "0.3" });
    expect([0, 1, 2, 3].map((n) => scalar(result, `coefficients/${n}`))).toEqual([1, 0.3, -0.3, 0.3]);
  });

  it("of the toy function (1/2 + tan(πx/2))² are those of its Taylor series", () => {
    // Schindler, Phillips, Ann. Phys. 324 (2009) 682; coefficients by computer algebra: 1/4, π/2, π²/4, π³/24, …
    const c = [0.25, Math.PI / 2, Math.PI ** 2 / 4, Math.PI ** 3 / 24, Math.PI ** 4 / 24];
    const result = evaluateBlock(partialSums(c, 0.25), { q: "0.25", reference: "1", first: "from c_0" });
    [0.25, 1.5707963, 2.4674011, 1.2919282, 4.0587121].forEach((expected, n) => {
      expect(scalar(result, `coefficients/${n}`)).toBeCloseTo(expected, 7);
    });
    // The function itself lies inside the 95 % interval of the conjugate prior here.
    const exact = (0.5 + Math.tan((Math.PI * 0.25) / 2)) ** 2;
    expect(Math.abs(exact - scalar(result, "value"))).toBeLessThan(scalar(result, "conjugate/95"));
  });
});

describe("first omitted term", () => {
  it("and its geometric sum, for c̄ = 1, Q = 0.3, k = 2", () => {
    // 0.3³ = 0.027, 0.027/(1 − 0.3) and 0.027/√(1 − 0.09): own evaluation.
    const result = evaluateBlock(partialSums([1, 1, -1], 0.3), { q: "0.3" });
    expect(scalar(result, "first-omitted")).toBeCloseTo(0.027, 12);
    expect(scalar(result, "first-omitted-all")).toBeCloseTo(0.038571429, 9);
    const { posterior } = result.value?.orders.at(-1) ?? {};
    const scale = scalar(result, "conjugate/68") / studentHalfWidth(0.68, posterior?.nu ?? NaN);
    expect(scale / Math.sqrt(posterior?.tau2 ?? NaN)).toBeCloseTo(0.028303691, 9);
  });
});
