import betainc from "@stdlib/math-base-special-betainc";
import erfc from "@stdlib/math-base-special-erfc";
import gammaln from "@stdlib/math-base-special-gammaln";
import { describe, expect, it } from "vitest";
import {
  incompleteBeta,
  logGamma,
  mahalanobisTail,
  normalCoverage,
} from "#engine/truncation/incomplete-beta.ts";

describe("special functions, against @stdlib", () => {
  it("ln Γ", () => {
    for (const a of [0.01, 0.5, 1.5, 3.7, 19.9, 20, 137.25, 1501.5]) {
      expect(Math.abs(logGamma(a) - gammaln(a))).toBeLessThan(1e-12 * Math.max(1, Math.abs(gammaln(a))));
    }
  });

  it("the incomplete beta function", () => {
    for (const [a, b] of [
      [0.5, 0.5],
      [0.5, 12],
      [1, 3],
      [7.5, 2.25],
      [25, 1250.5],
      [300, 900],
    ] as const) {
      for (const x of [1e-6, 0.01, 0.1, 0.25, 0.5, 0.77, 0.999]) {
        const { below, above } = incompleteBeta(x, a, b);
        expect(below).toBeCloseTo(betainc(x, a, b, true, false), 11);
        expect(above).toBeCloseTo(betainc(x, a, b, true, true), 11);
      }
    }
  });

  it("the normal distribution", () => {
    for (const z of [1e-3, 0.5, 1, 1.96, 2.99, 3, 4.5, 8]) {
      expect(normalCoverage(z)).toBeCloseTo(1 - erfc(z / Math.SQRT2), 13);
    }
  });

  it("the tail of the Mahalanobis distance: one value, ν = 4, is the two-sided tail of t", () => {
    // P(|T| > t) = 1 − I_{t²/(ν + t²)}(½, ν/2): own derivation; closed form for ν = 4 by integration of the density.
    const t = 1.7;
    const s = t / Math.sqrt(4 + t * t);
    expect(mahalanobisTail(t * t, 1, 4)).toBeCloseTo(1 - (1.5 * s - 0.5 * s ** 3), 12);
    // For ν → ∞ and two values the distance is exponential.
    expect(mahalanobisTail(3, 2, 1e7)).toBeCloseTo(Math.exp(-1.5), 6);
  });
});
