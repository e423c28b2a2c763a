/**
 * Whether the coefficients look as the correlated model says they should, at the points it was fitted to.
 * Source: Bastos, O'Hagan 2009, Technometrics 51, 425; for coefficients Melendez et al. 2019, section IV.
 */
import { colour, pivotOrder, whiten, type Factor } from "./cholesky.ts";
import { chanceFrom } from "./chance.ts";
import { coefficientsAt, type CoefficientsAlong } from "./coefficients-along.ts";
import { evenly } from "./curve-data.ts";
import { mahalanobisTail } from "./incomplete-beta.ts";
import { correlations, factorOf } from "./kernel.ts";
import type { LengthFit, Prior } from "./likelihood.ts";
import { studentHalfWidth } from "./student-t.ts";

/** What is known of c̄²: a scaled inverse χ² with ν and τ². */
export interface Spread {
  readonly nu: number;
  readonly tau2: number;
}

export interface OrderCheck {
  readonly order: number;
  /** From the other orders alone; null when there are none and no prior. */
  readonly spread: Spread | null;
  /** D² = c_nᵀ R⁻¹ c_n/τ² at the check points. */
  readonly distance: number;
  /** Probability of a larger D² if the model holds: D² = M·F with M and ν degrees of freedom. */
  readonly tail: number;
  /** Where D² lies in 95 of 100 cases. */
  readonly expected: readonly [number, number];
  /** Pivoted-Cholesky errors, in the order of the pivots. */
  readonly pivoted: readonly number[];
  /** The t within which 95 % of them should lie. */
  readonly pivotedLimit: number;
}

export interface CoverageCheck {
  /** The intervals stated at this order … */
  readonly order: number;
  /** … are held against the shift to this one. */
  readonly next: number;
  /** Share of the points whose shift lies within, for each of `beliefs`. */
  readonly inside: readonly number[];
  /** Between which shares it would lie in 95 of 100 samples as large and as correlated. */
  readonly expected: readonly (readonly [number, number])[];
}

export interface Checks {
  /** x of the points of the distances. */
  readonly x: readonly number[];
  readonly orders: readonly OrderCheck[];
  readonly beliefs: readonly number[];
  readonly coverage: readonly CoverageCheck[];
  /** Share of all coefficients within ±1 and ±2 standard deviations. */
  readonly withinSigma: readonly [number, number];
}

/** More points than this show a reader nothing more. */
const MOST_POINTS = 120;
export const SAMPLES = 400;
const SEED = 20190712;
const checkBeliefs = Array.from({ length: 19 }, (_, index) => (index + 1) / 20);

/** @param fitted the coefficients that the fit was made of */
export function checkConsistency(fitted: CoefficientsAlong, fit: LengthFit, prior: Prior): Checks {
  const points = fitted.x.length;
  const coefficients = coefficientsAt(fitted, evenly(points, MOST_POINTS));
  const { x, orders } = coefficients;
  const { factor, nugget } = factorOf(x, fit.length, fit.nugget);
  const pivots = pivotOrder(correlations(x, fit.length, nugget), x.length);
  const permuted = factorOf(
    pivots.map((index) => x[index] ?? NaN),
    fit.length,
    nugget,
  ).factor;
  const checks = orders.map(({ order, values }, index) => {
    const spread = spreadOf(
      fit.squares.filter((_, other) => other !== index),
      points,
      prior,
    );
    return checkOrder(order, [...values], spread, factor, permuted, pivots);
  });
  return {
    x,
    orders: checks,
    beliefs: checkBeliefs,
    coverage: coverageChecks(coefficients, points, fit, factor, prior),
    withinSigma: withinSigma(fitted, spreadOf(fit.squares, points, prior)),
  };
}

/** ν = ν₀ + n_c N, ντ² = ν₀τ₀² + Σ c_nᵀ R⁻¹ c_n; null when ν = 0. */
export function spreadOf(squares: readonly number[], points: number, { nu0, tau0 }: Prior): Spread | null {
  const nu = nu0 + squares.length * points;
  if (nu === 0) return null;
  return { nu, tau2: (nu0 * tau0 ** 2 + squares.reduce((sum, one) => sum + one, 0)) / nu };
}

function checkOrder(
  order: number,
  values: readonly number[],
  spread: Spread | null,
  factor: Factor,
  permuted: Factor,
  pivots: readonly number[],
): OrderCheck {
  if (!spread || spread.tau2 === 0)
    return {
      order,
      spread: null,
      distance: NaN,
      tail: NaN,
      expected: [NaN, NaN],
      pivoted: [],
      pivotedLimit: NaN,
    };
  const { nu, tau2 } = spread;
  const tau = Math.sqrt(tau2);
  const distance = whiten(factor, values).reduce((sum, z) => sum + z * z, 0) / tau2;
  const pivoted = [
    ...whiten(
      permuted,
      pivots.map((index) => values[index] ?? NaN),
    ),
  ].map((z) => z / tau);
  return {
    order,
    spread,
    distance,
    tail: mahalanobisTail(distance, values.length, nu),
    expected: [distanceAt(0.975, values.length, nu), distanceAt(0.025, values.length, nu)],
    pivoted,
    pivotedLimit: studentHalfWidth(0.95, Math.min(nu, 1e6)),
  };
}

/** The D² that is exceeded with this probability. */
function distanceAt(tail: number, count: number, nu: number): number {
  let [low, high] = [0, count];
  while (mahalanobisTail(high, count, nu) > tail) [low, high] = [high, high * 2];
  for (let step = 0; step < 60; step += 1) {
    const middle = (low + high) / 2;
    if (mahalanobisTail(middle, count, nu) > tail) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function withinSigma({ orders }: CoefficientsAlong, spread: Spread | null): readonly [number, number] {
  const all = orders.flatMap(({ values }) => [...values]);
  const tau = Math.sqrt(spread?.tau2 ?? 0);
  const share = (limit: number) => all.filter((c) => Math.abs(c) <= limit * tau).length / all.length;
  return [share(1), share(2)];
}

/**
 * At each order, the interval for the next shift from the orders up to it (the first omitted term), against the shift
 * itself: for each degree of belief the share of points that lie inside. The expected band comes from drawing as many
 * points from the model 400 times.
 */
function coverageChecks(
  { orders }: CoefficientsAlong,
  points: number,
  fit: LengthFit,
  factor: Factor,
  prior: Prior,
): readonly CoverageCheck[] {
  return orders.slice(1).flatMap(({ order: next, values }, index) => {
    const spread = spreadOf(fit.squares.slice(0, index + 1), points, prior);
    if (!spread || spread.tau2 === 0) return [];
    const tau = Math.sqrt(spread.tau2);
    const limits = checkBeliefs.map((p) => studentHalfWidth(p, Math.min(spread.nu, 1e6)));
    const shares = (c: ArrayLike<number>) =>
      limits.map((limit) => {
        let inside = 0;
        for (let point = 0; point < c.length; point += 1) if (Math.abs(c[point] ?? NaN) <= limit) inside += 1;
        return inside / c.length;
      });
    const drawn = drawnShares(factor, spread.nu, shares);
    return {
      order: orders[index]?.order ?? NaN,
      next,
      inside: shares(values.map((value) => value / tau)),
      expected: limits.map((_, belief) => {
        const sorted = drawn.map((one) => one[belief] ?? NaN).sort((a, b) => a - b);
        return [
          sorted[Math.floor(0.025 * SAMPLES)] ?? NaN,
          sorted[Math.ceil(0.975 * SAMPLES) - 1] ?? NaN,
        ] as const;
      }),
    };
  });
}

function drawnShares(
  factor: Factor,
  nu: number,
  shares: (c: ArrayLike<number>) => readonly number[],
): readonly (readonly number[])[] {
  const chance = chanceFrom(SEED);
  return Array.from({ length: SAMPLES }, () => {
    // A draw of a Student-t process: a Gaussian one whose scale is drawn first.
    const scale = Math.sqrt(nu / chance.chiSquare(nu));
    const normal = Float64Array.from({ length: factor.size }, () => scale * chance.normal());
    return shares(colour(factor, normal));
  });
}
