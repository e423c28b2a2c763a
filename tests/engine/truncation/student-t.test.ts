import quantile from "@stdlib/stats-base-dists-t-quantile";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { studentCoverage, studentHalfWidth } from "#engine/truncation/student-t.ts";

/** Relative difference from a general-purpose library's quantile at (1 + p)/2. */
function differs(probability: number, nu: number): number {
  const reference = quantile((1 + probability) / 2, nu);
  return Math.abs(studentHalfWidth(probability, nu) / reference - 1);
}

describe("quantiles of Student's t", () => {
  it("agree with @stdlib/stats-base-dists-t-quantile to eleven digits", () => {
    const degrees = [0.5, 1, 1.5, 2, 3, 4, 5, 7.25, 10, 14, 19.5, 20, 30, 39.9, 40.1, 100, 1000, 1e4, 1e5];
    const misses = degrees.flatMap((nu) =>
      [0.01, 0.1, 0.5, 0.6827, 0.68, 0.9, 0.95, 0.9973, 0.9999].map((p) => ({ nu, p, miss: differs(p, nu) })),
    );
    expect(misses.filter(({ miss }) => miss > 1e-11)).toEqual([]);
  });

  it("agree with the closed forms for one and two degrees of freedom", () => {
    // ν = 1 is the Cauchy distribution, t = tan(πp/2); ν = 2 has t = p·√(2/(1 − p²)). Own derivation from the densities.
    for (const p of [0.001, 0.3, 0.68, 0.95, 0.999, 0.999999]) {
      expect(studentHalfWidth(p, 1) / Math.tan((Math.PI * p) / 2)).toBeCloseTo(1, 9);
      expect(studentHalfWidth(p, 2) / (p * Math.sqrt(2 / (1 - p * p)))).toBeCloseTo(1, 9);
    }
  });

  it("are inverted by the coverage", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-6, max: 0.99999, noNaN: true }),
        fc.double({ min: 0.3, max: 500, noNaN: true }),
        (p, nu) => {
          expect(studentCoverage(studentHalfWidth(p, nu), nu)).toBeCloseTo(p, 12);
        },
      ),
    );
  });

  it("refuse what is no probability", () => {
    expect(() => studentHalfWidth(1, 3)).toThrow(RangeError);
    expect(() => studentHalfWidth(0.5, 0)).toThrow(RangeError);
  });
});
