/**
 * An invented observable whose truncation error is known, since all its orders are: for demonstrations and tests.
 *
 *   X(p) = X₀(p) Σ_{n=0}^{30} c_n(p) Qⁿ,   Q = p/Λ_b with Λ_b = 600 MeV,   X₀(p) = 40 mb · (100 MeV/p)
 *   c_0 = 1,   c_n(p) = √(2/200) Σ_{j=1}^{200} cos(ω_nj p/ℓ + φ_nj),   ℓ = 60 MeV
 *
 * where, for each n, ω_nj and φ_nj are drawn in turn, normal and uniform in 2π, from the generator of `chance.ts` started
 * with 100 + n. The frequencies have the spectrum of the kernel exp(−(p − p′)²/2ℓ²), so that c_n has, closely, the variance 1
 * and the correlations that the model supposes; how far a few such curves stray from that is what checks must bear.
 */
import { chanceFrom } from "./chance.ts";

export interface TernTrap {
  /** p in MeV. Shape N. */
  readonly p: readonly number[];
  /** X through each order in mb. Shape orders × N. */
  readonly orders: readonly (readonly number[])[];
  /** X with all orders. Shape N. */
  readonly exact: readonly number[];
}

export const ternTrapBreakdown = 600;
export const ternTrapLength = 60;
const WAVES = 200;
const ALL_ORDERS = 30;
/** Of ten starts tried, one of the ordinary ones: no check speaks against it. */
const START = 100;

/** c_n at each p. */
export function ternTrapCoefficients(n: number, p: readonly number[]): number[] {
  if (n === 0) return p.map(() => 1);
  const chance = chanceFrom(START + n);
  const waves = Array.from({ length: WAVES }, () => ({
    frequency: chance.normal() / ternTrapLength,
    phase: 2 * Math.PI * chance.uniform(),
  }));
  return p.map(
    (at) =>
      Math.sqrt(2 / WAVES) *
      waves.reduce((sum, { frequency, phase }) => sum + Math.cos(frequency * at + phase), 0),
  );
}

/**
 * @param count number of points from 60 to 360 MeV, both ends included
 * @param highest the last order that is told
 * @example ternTrap(31, 4).orders.length // 5
 */
export function ternTrap(count: number, highest: number): TernTrap {
  const p = Array.from({ length: count }, (_, index) => 60 + (300 * index) / (count - 1));
  const sums: number[][] = [];
  let sum = p.map(() => 0);
  for (let n = 0; n <= ALL_ORDERS; n += 1) {
    const coefficients = ternTrapCoefficients(n, p);
    sum = sum.map(
      (so, index) => so + (coefficients[index] ?? NaN) * ((p[index] ?? NaN) / ternTrapBreakdown) ** n,
    );
    sums.push(sum.map((so, index) => ((40 * 100) / (p[index] ?? NaN)) * so));
  }
  return { p, orders: sums.slice(0, highest + 1), exact: sums.at(-1) ?? [] };
}

/** The same as a table to paste or upload: a header and one line for each p, eight significant digits. */
export function ternTrapTable(count: number, highest: number): string {
  const { p, orders, exact } = ternTrap(count, highest);
  const header = ["p (MeV)", ...orders.map((_, n) => `X${n} (mb)`), "exact (mb)"].join(",");
  const lines = p.map((at, index) =>
    [at, ...orders.map((values) => values[index] ?? NaN), exact[index] ?? NaN]
      .map((value) => Number(value.toPrecision(8)))
      .join(","),
  );
  return [header, ...lines].join("\n") + "\n";
}
