import { describe, expect, it } from "vitest";
import { uniformSum } from "#engine/truncation/uniform-sum.ts";

/**
 * P(|S| ≤ s) by inclusion and exclusion over the 2^h corners of the box, an own derivation that shares nothing with the
 * grid; exact, but it loses digits when the widths are very different.
 */
function byCorners(widths: readonly number[], s: number): number {
  const h = widths.length;
  const below = (t: number) => {
    let sum = 0;
    for (let corner = 0; corner < 2 ** h; corner += 1) {
      const signs = widths.map((_, j) => (corner & (1 << j) ? -1 : 1));
      const reach = widths.reduce((total, a, j) => total + a * (signs[j] ?? 0), t);
      if (reach > 0) sum += signs.reduce<number>((product, sign) => product * sign, 1) * reach ** h;
    }
    let factorial = 1;
    for (let n = 2; n <= h; n += 1) factorial *= n;
    return sum / (factorial * widths.reduce((product, a) => product * 2 * a, 1));
  };
  return below(s) - below(-s);
}

describe("the sum of uniform variables", () => {
  it.each<[number[]]>([
    [[0.3]],
    [[0.3, 0.1]],
    [[1, 0.5, 0.25]],
    [[0.3, 0.09, 0.027, 0.0081]],
    [[1, 1, 1, 1, 1]],
    [[1, 0.9, 0.81, 0.729, 0.6561, 0.59049]],
  ])("has the distribution that the corners of the box give: %j", (widths) => {
    const { reach, coverage } = uniformSum(widths);
    for (let step = 0; step <= 20; step += 1) {
      const s = (reach * step) / 20;
      expect(coverage(s)).toBeCloseTo(byCorners(widths, s), 7);
    }
    expect(coverage(reach * 1.01)).toBe(1);
  });
});
