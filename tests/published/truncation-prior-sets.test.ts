import { describe, expect, it } from "vitest";
import { conjugateScale, conjugatePosterior, uniformPriorFactor } from "#engine/truncation/estimates.ts";
import { priorSetHalfWidth, type PriorSet, type ScaleLimits } from "#engine/truncation/prior-sets.ts";
import { studentHalfWidth } from "#engine/truncation/student-t.ts";
import { uniformSum } from "#engine/truncation/uniform-sum.ts";

// The priors: Furnstahl, Klco, Phillips, Wesolowski, Phys. Rev. C 92 (2015) 024005, table I (from memory).

interface Case {
  readonly c: readonly number[];
  readonly q: number;
  /** How many omitted terms; they follow the last known one. */
  readonly terms: number;
  readonly limits?: Partial<ScaleLimits>;
}
const wide: ScaleLimits = { low: 1e-3, high: 1e3, sigma: 1 };

function halfWidth(set: PriorSet, { c, q, terms, limits = {} }: Case, probability: number): number {
  const widths = Array.from({ length: terms }, (_, index) => q ** (c.length + index));
  const found = priorSetHalfWidth(
    set,
    { count: c.length, largest: Math.max(0, ...c.map(Math.abs)), squares: c.reduce((s, x) => s + x * x, 0) },
    { ...wide, ...limits },
    { uniform: uniformSum(widths), width: Math.hypot(...widths) },
    probability,
  );
  if (found === null) throw new Error("the data exclude the prior");
  return found;
}

describe("prior sets A, B and C of Furnstahl, Klco, Phillips, Wesolowski (2015)", () => {
  // c = 1, −0.5, 0.7 and Q = 0.3 through order 2: own quadrature of these priors with a general-purpose library (scipy).
  const c = [1, -0.5, 0.7];
  const q = 0.3;
  it.each([
    ["A", 1, { low: 1e-3, high: 1e3 }, 0.02448, 0.04616935],
    ["A", 1, { low: 0.25, high: 4 }, 0.024192, 0.043414986],
    ["B", 1, { sigma: 1 }, 0.023630769, 0.040592311],
    ["C", 1, { low: 0.25, high: 4 }, 0.024143937, 0.062590742],
    ["C", 60, { low: 0.25, high: 4 }, 0.025309723, 0.065612926],
    ["C", 10, { low: 0.25, high: 10 }, 0.02560386, 0.068325832],
    ["C", 1, { low: 1e-3, high: 1e3 }, 0.024447449, 0.06543933],
  ] as const)("set %s, %d omitted terms, %o", (set, terms, limits, at68, at95) => {
    expect(halfWidth(set, { c, q, terms, limits }, 0.68) / at68).toBeCloseTo(1, 6);
    expect(halfWidth(set, { c, q, terms, limits }, 0.95) / at95).toBeCloseTo(1, 6);
  });
});

describe("prior sets in the limits that have a closed form", () => {
  const cases = [[1], [1, 1], [1, -0.5, 0.7], [1, 2.3, -0.7, 0.4], [1, 0.2, -0.3, 0.9, -1.5]];
  const unlimited = { low: 1e-9, high: 1e9 };
  it.each(cases)("set A without limits is the uniform prior in closed form: %j", (...c) => {
    // Cacciari, Houdeau, J. High Energy Phys. 09 (2011) 039.
    for (const p of [0.3, 0.68, 0.95]) {
      const closed = Math.max(...c.map(Math.abs)) * 0.2 ** c.length * uniformPriorFactor(c.length, p);
      expect(halfWidth("A", { c, q: 0.2, terms: 1, limits: unlimited }, p) / closed).toBeCloseTo(1, 5);
    }
  });

  it.each(cases)("set C without limits is the conjugate prior with ν₀ = 0: %j", (...c) => {
    const posterior = conjugatePosterior(c, 0, 1);
    if (!posterior) throw new Error("there are coefficients");
    for (const p of [0.3, 0.68, 0.95]) {
      const squares = (0.4 ** (2 * c.length) * (1 - 0.4 ** 8)) / (1 - 0.4 ** 2);
      const closed = studentHalfWidth(p, posterior.nu) * conjugateScale(posterior, 1, squares);
      expect(halfWidth("C", { c, q: 0.4, terms: 4, limits: unlimited }, p) / closed).toBeCloseTo(1, 6);
    }
  });

  it.each([0.3, 0.68, 0.95])("set A with limits, first omitted term, at %d", (p) => {
    // Own derivation: with c̄ from L to H, P(|Δ| ≤ d) for d ≤ L q is d n/(q(n+1)) (L^(−n−1) − H^(−n−1))/(L^−n − H^−n),
    // and for L q < d < H q the part of c̄ below d/q counts whole.
    const [n, low, high, step] = [2, 0.8, 3, 0.5 ** 2];
    const mass = low ** -n - high ** -n;
    const d = halfWidth("A", { c: [0.8, -0.2], q: 0.5, terms: 1, limits: { low: 0.1, high } }, p) / step;
    const from = Math.max(d, low);
    const whole = low ** -n - from ** -n;
    const part = (d * n * (from ** (-n - 1) - high ** (-n - 1))) / (n + 1);
    expect((whole + part) / mass).toBeCloseTo(p, 6);
  });

  it.each([0.3, 0.68, 0.95])("set B as its width grows is set A without limits, at %d", (p) => {
    const c = [1, -0.5, 0.7];
    const b = halfWidth("B", { c, q: 0.3, terms: 1, limits: { sigma: 400 } }, p);
    expect(b / (0.3 ** 3 * uniformPriorFactor(3, p))).toBeCloseTo(1, 4);
  });
});
