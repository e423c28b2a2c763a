import gammaln from "@stdlib/math-base-special-gammaln";
import { describe, expect, it } from "vitest";
import { pivotOrder } from "#engine/truncation/cholesky.ts";
import type { CoefficientsAlong } from "#engine/truncation/coefficients-along.ts";
import { densityOf } from "#engine/truncation/density.ts";
import { jointPosterior } from "#engine/truncation/joint-posterior.ts";
import { correlations, factorOf } from "#engine/truncation/kernel.ts";
import { likelihoodOf, type Observable } from "#engine/truncation/likelihood.ts";
import { studentHalfWidth } from "#engine/truncation/student-t.ts";

const prior = { nu0: 1.5, tau0: 0.8 };

function observable(x: number[], lists: Record<number, number[]>, breakdown = 600): Observable {
  const coefficients: CoefficientsAlong = {
    x,
    q: x.map((at) => at / breakdown),
    reference: x.map(() => 1),
    orders: Object.entries(lists).map(([order, values]) => ({
      order: Number(order),
      power: Number(order),
      values: Float64Array.from(values),
    })),
    left: { incomplete: 0, zeroReference: 0, beyondOne: 0, outOfRange: 0 },
  };
  return { coefficients, parameterAt: null, nugget: 1e-8 };
}
const data = observable([60, 100, 170, 220, 300], {
  1: [0.4, 0.9, -0.2, -1.1, 0.3],
  2: [-1.2, -0.7, 0.8, 1.4, 0.1],
  3: [0.2, 0.5, 0.6, -0.4, -0.9],
});

/** ln det and bᵀA⁻¹b by Gauss and Jordan's elimination with pivots: shares nothing with the factor. */
function byElimination(matrix: number[][], b: readonly number[]): { logDeterminant: number; square: number } {
  const rows = matrix.map((row, index) => [...row, b[index] ?? NaN]);
  let logDeterminant = 0;
  for (let column = 0; column < b.length; column += 1) {
    let best = column;
    for (let row = column; row < b.length; row += 1)
      if (Math.abs(rows[row]![column]!) > Math.abs(rows[best]![column]!)) best = row;
    [rows[column], rows[best]] = [rows[best]!, rows[column]!];
    const pivot = rows[column]![column]!;
    logDeterminant += Math.log(Math.abs(pivot));
    rows[column] = rows[column]!.map((value) => value / pivot);
    for (let row = 0; row < b.length; row += 1) {
      if (row === column) continue;
      const factor = rows[row]![column]!;
      rows[row] = rows[row]!.map((value, index) => value - factor * rows[column]![index]!);
    }
  }
  return { logDeterminant, square: b.reduce((sum, value, index) => sum + value * rows[index]!.at(-1)!, 0) };
}

/**
 * The probability density of the predictions themselves, as a multivariate Student-t of all shifts at once: their
 * covariance is block-diagonal with τ₀² X_ref² Q_iⁿ Q_jⁿ r_ij. Own derivation from the priors; written without
 * coefficients or a Jacobian.
 */
function logDensityOfShifts({ coefficients, nugget }: Observable, length: number, factor: number): number {
  const { x, q, orders } = coefficients;
  let [square, logDeterminant] = [0, 0];
  for (const { power, values } of orders) {
    const shifts = x.map((_, i) => values[i]! * q[i]! ** power);
    const there = q.map((one) => one / factor);
    const covariance = x.map((a, i) =>
      x.map(
        (b, j) =>
          prior.tau0 ** 2 *
          (there[i]! * there[j]!) ** power *
          (Math.exp(-((a - b) ** 2) / (2 * length ** 2)) + (i === j ? nugget : 0)),
      ),
    );
    const part = byElimination(covariance, shifts);
    square += part.square;
    logDeterminant += part.logDeterminant;
  }
  const count = orders.length * x.length;
  const nu = prior.nu0;
  return (
    gammaln((nu + count) / 2) -
    gammaln(nu / 2) -
    (count / 2) * Math.log(nu * Math.PI) -
    logDeterminant / 2 -
    ((nu + count) / 2) * Math.log1p(square / nu)
  );
}

describe("the likelihood of length and breakdown scale", () => {
  const fit = likelihoodOf(data, prior, [-1, 1]);
  const cases = [
    [40, 1],
    [40, 0.7],
    [40, 1.9],
    [90, 1],
    [90, 1.3],
    [25, 0.5],
  ] as const;

  it("is the density of the predictions, a Student-t with all correlations, up to a constant", () => {
    const differences = cases.map(
      ([length, factor]) =>
        fit(length).logLikelihood(Math.log(factor)) - logDensityOfShifts(data, length, factor),
    );
    for (const one of differences) expect(one).toBeCloseTo(differences[0] ?? NaN, 7);
  });

  it("is the same when Q is followed point by point instead of by its power", () => {
    const followed = likelihoodOf(
      { ...data, parameterAt: (x, s) => (x / 600) * Math.exp(-s) },
      prior,
      [-1, 1],
    );
    const shift = followed(40).logLikelihood(0) - fit(40).logLikelihood(0);
    for (const s of [-0.9, -0.31, 0.02, 0.44, 0.97])
      expect(followed(40).logLikelihood(s) - fit(40).logLikelihood(s)).toBeCloseTo(shift, 3);
  });

  it("without correlations is that of the pointwise conjugate prior on all values at once", () => {
    const { squares } = likelihoodOf({ ...data, nugget: 1e-12 }, prior, [0, 0])(1e-3);
    data.coefficients.orders.forEach(({ values }, index) => {
      expect(squares[index]).toBeCloseTo(
        values.reduce((sum, c) => sum + c * c, 0),
        9,
      );
    });
  });
});

describe("the posterior of the breakdown scale", () => {
  it("for one order at one point is that of a scale, in closed form", () => {
    // c(Λ) = c₁ (Λ/Λ₀): the density of u = c/τ₀ is Student-t_ν₀ and Λ = Λ₀ u τ₀/c₁, |u| (own derivation, log-uniform prior).
    const one = observable([60], { 1: [0.8] });
    const belief = { logPrior: () => 0, range: [Math.log(1e-5), Math.log(1e5)] as const, stated: 600 };
    const degrees = [{ text: "50", probability: 0.5 }];
    const posterior = jointPosterior([one], [1], prior, belief, degrees, () => undefined);
    // Half of |u| lies below its median: P(|u| ≤ t) = ½.
    const median = (600 * studentHalfWidth(0.5, prior.nu0) * prior.tau0) / 0.8;
    expect((posterior?.breakdown?.median ?? NaN) / median).toBeCloseTo(1, 2);
    const { low = NaN, high = NaN } = posterior?.breakdown?.intervals[0] ?? {};
    expect(low / ((600 * studentHalfWidth(0.25, prior.nu0) * prior.tau0) / 0.8)).toBeCloseTo(1, 2);
    expect(high / ((600 * studentHalfWidth(0.75, prior.nu0) * prior.tau0) / 0.8)).toBeCloseTo(1, 2);
  });

  it("is pulled by its prior: uniform in the scale lies above uniform in its logarithm, a narrow one at what is stated", () => {
    const median = (logPrior: (s: number) => number) =>
      jointPosterior(
        [data],
        [60],
        prior,
        { logPrior, range: [Math.log(0.25), Math.log(4)], stated: 600 },
        [],
        () => undefined,
      )?.breakdown?.median ?? NaN;
    expect(median((s) => s)).toBeGreaterThan(median(() => 0));
    expect(median((s) => -0.5 * (s / 0.001) ** 2) / 600).toBeCloseTo(1, 2);
  });

  it("of two copies of the same data is the square of one of them", () => {
    const belief = { logPrior: () => 0, range: [Math.log(0.25), Math.log(4)] as const, stated: 600 };
    const one = jointPosterior([data], [60], prior, belief, [], () => undefined)?.breakdown;
    const two = jointPosterior([data, data], [60, 60], prior, belief, [], () => undefined)?.breakdown;
    expect(two?.mode).toBeCloseTo(two?.mode ?? NaN, 6);
    const ratio = (density: typeof one, a: number, b: number) => {
      const at = (scale: number) => {
        const index = density!.grid.findIndex((value) => value >= scale);
        const [x0, x1] = [density!.grid[index - 1]!, density!.grid[index]!];
        const t = (scale - x0) / (x1 - x0);
        // In the logarithm, with the density in ln Λ, which the measure of Λ does not enter.
        return (
          (1 - t) * Math.log(density!.density[index - 1]! * x0) + t * Math.log(density!.density[index]! * x1)
        );
      };
      return at(a) - at(b);
    };
    expect(ratio(two, 700, 550) / (2 * ratio(one, 700, 550))).toBeCloseTo(1, 2);
  });
});

describe("what the model stands on", () => {
  it("factorises: L Lᵀ is R, for sizes with and without a rest of four", () => {
    for (const size of [1, 3, 4, 7, 12, 13]) {
      const x = Array.from({ length: size }, (_, index) => index + 0.3 * Math.sin(7 * index));
      const { factor } = factorOf(x, 1.4, 1e-6);
      const wanted = correlations(x, 1.4, 1e-6);
      for (let i = 0; i < size; i += 1) {
        for (let j = 0; j <= i; j += 1) {
          let sum = 0;
          for (let k = 0; k <= j; k += 1) sum += factor.lower[i * size + k]! * factor.lower[j * size + k]!;
          expect(sum).toBeCloseTo(wanted[i * size + j]!, 12);
        }
      }
      const elimination = byElimination(
        Array.from({ length: size }, (_, i) => [...wanted.slice(i * size, (i + 1) * size)]),
        x,
      );
      expect(factor.logDeterminant).toBeCloseTo(elimination.logDeterminant, 9);
    }
  });

  it("raises the nugget until the matrix can be factorised, and says to what", () => {
    const x = Array.from({ length: 40 }, (_, index) => index / 39);
    expect(factorOf(x, 5, 1e-6).nugget).toBe(1e-6);
    expect(factorOf(x, 5, 1e-20).nugget).toBeGreaterThan(1e-16);
  });

  it("pivots on the ends and the middle first", () => {
    const x = Array.from({ length: 9 }, (_, index) => index);
    const order = pivotOrder(correlations(x, 3, 1e-8), 9);
    expect(order.slice(0, 2)).toEqual([0, 8]);
    expect(order[2]).toBeGreaterThan(2);
    expect(order[2]).toBeLessThan(6);
    expect([...order].sort((a, b) => a - b)).toEqual(x);
  });

  it("takes quantiles of a density between the points of its grid", () => {
    // A standard normal on an uneven grid: quantiles from tables of the normal distribution.
    const grid = Array.from(
      { length: 241 },
      (_, index) => (6 * Math.sinh((index - 120) / 60)) / Math.sinh(2),
    );
    const density = densityOf(
      grid,
      grid.map((z) => (-z * z) / 2),
      [{ text: "95", probability: 0.95 }],
    );
    expect(density.median).toBeCloseTo(0, 6);
    expect(density.mode).toBeCloseTo(0, 6);
    expect(density.intervals[0]?.low).toBeCloseTo(-1.96, 2);
    expect(density.intervals[0]?.high).toBeCloseTo(1.96, 2);
    expect(density.cutAt).toBeNull();
    expect(densityOf([1, 2, 3], [0, 0.5, 1], []).cutAt).toBe("both");
  });
});
