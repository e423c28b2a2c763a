/** What is left out when one stops at an order, and the order to stop at. */
import { Rational } from "../exact/rational.ts";
import type { Entry } from "./entries.ts";
import { sizeAt, valueAt, workingPoint, type Point, type Power } from "./powers.ts";
import type { OrderPlanValue } from "./value.ts";

export interface Expansion {
  readonly Q: number;
  /** Sum of the corrections to the amplitude. */
  readonly amplitude: readonly Power[];
  /** The observable's entries of positive order: the same, or those of the rate. */
  readonly entries: readonly Entry[];
  readonly powers: readonly Power[];
  /** Distinct orders of the observable, ascending, 0 first. */
  readonly orders: readonly Rational[];
  readonly observable: OrderPlanValue["observable"];
  readonly sumUsed: OrderPlanValue["sumUsed"];
  /** Highest order of a single listed term: terms of higher order are not listed. */
  readonly highestListed: Rational;
  /** Orders up to 4 at which terms may exist; empty when that is not known. */
  readonly allowed: readonly Rational[];
  /** Orders at which unlisted terms exist: highestListed + step, + 2 step, … */
  readonly step: Rational;
  readonly target: number;
}

export interface LeftOut {
  readonly listed: number;
  readonly unlisted: number;
  readonly used: number;
}

export function distinctOrders(entries: readonly Entry[]): Rational[] {
  const orders = new Map([
    [Rational.zero.toString(), Rational.zero],
    ...entries.map(({ order }) => [order.toString(), order] as const),
  ]);
  return [...orders.values()].sort((a, b) => a.compare(b));
}

/** T = Σ_j Q^(N + j s) = Q^(N+s)/(1 − Q^s): one term of natural size at each allowed order past the last listed. */
function tailAt({ Q: atWorkingPoint, highestListed, step: distance }: Expansion, point: Point): number {
  const Q = (atWorkingPoint * point.probe) / point.heavy;
  if (Q >= 1) return Infinity;
  const step = distance.toFloat();
  return Q ** (highestListed.toFloat() + step) / (1 - Q ** step);
}

/**
 * What unlisted terms would add. In a rate, with A the sum of the listed corrections to the amplitude and T the tail,
 * |1 + A + T|² − |1 + A|² = 2T(1 + A) + T², less 2T when nothing interferes with the leading amplitude. (Own derivation.)
 */
function unlistedAt(expansion: Expansion, point: Point): number {
  const tail = tailAt(expansion, point);
  if (expansion.observable === "amplitude" || tail === Infinity) return tail;
  const leading = expansion.observable === "rate with interference" ? 1 : 0;
  return 2 * tail * (leading + valueAt(expansion.amplitude, point, expansion.Q)) + tail ** 2;
}

/** Sizes are added, not combined in quadrature: signs are unknown and a bound is wanted. */
export function leftOutAt(expansion: Expansion, order: Rational, point: Point): LeftOut {
  const listed = valueAt(beyond(expansion, order), point, expansion.Q);
  return leftOut(expansion, listed, unlistedAt(expansion, point));
}

/** What is left out at one point as a function of the order: each power is taken once for all orders. */
export function leftOutByOrder(expansion: Expansion, point: Point): (order: Rational) => LeftOut {
  const unlisted = unlistedAt(expansion, point);
  const sized = expansion.powers.map((power) => ({ power, size: sizeAt(power, point, expansion.Q) }));
  return (order) => {
    const listed = sized.reduce(
      (sum, { power, size }) => (power.order.compare(order) > 0 ? sum + size : sum),
      0,
    );
    return leftOut(expansion, listed, unlisted);
  };
}

function leftOut({ sumUsed }: Expansion, listed: number, unlisted: number): LeftOut {
  return { listed, unlisted, used: sumUsed === "natural tail" ? listed + unlisted : listed };
}

function beyond({ powers }: Expansion, order: Rational): readonly Power[] {
  return powers.filter((power) => power.order.compare(order) > 0);
}

export interface Slopes {
  /** d(left out)/d ln p, d ln Λ, and d ln of each size given by hand. */
  readonly probe: number;
  readonly heavy: number;
  readonly byHand: ReadonlyMap<string, number>;
}

/** Slopes of what is left out and counts, at the working point. */
export function slopesOfLeftOut(expansion: Expansion, order: Rational): Slopes {
  const slopes = (powers: readonly Power[], factor: number, before: Slopes): Slopes => {
    const byHand = new Map(before.byHand);
    for (const power of powers)
      for (const [rowId, slope] of power.byHand) byHand.set(rowId, (byHand.get(rowId) ?? 0) + factor * slope);
    const along = (which: "probe" | "heavy") =>
      powers.reduce((sum, power) => sum + factor * power[which] * power.size, before[which]);
    return { probe: along("probe"), heavy: along("heavy"), byHand };
  };
  const listed = slopes(beyond(expansion, order), 1, { probe: 0, heavy: 0, byHand: new Map() });
  if (expansion.sumUsed === "listed terms only") return listed;
  const tail = tailAt(expansion, workingPoint);
  const step = expansion.step.toFloat();
  const Qs = expansion.Q ** step;
  const tailSlope = tail * (expansion.highestListed.toFloat() + step + (step * Qs) / (1 - Qs));
  const isAmplitude = expansion.observable === "amplitude";
  const leading = expansion.observable === "rate with interference" ? 1 : 0;
  const byTail = isAmplitude
    ? 1
    : 2 * (leading + valueAt(expansion.amplitude, workingPoint, expansion.Q)) + 2 * tail;
  const both = isAmplitude ? listed : slopes(expansion.amplitude, 2 * tail, listed);
  return { ...both, probe: both.probe + byTail * tailSlope, heavy: both.heavy - byTail * tailSlope };
}

/** The lowest order that leaves out less than the target; null when no listed order does, or the expansion has ended. */
export function orderFor(expansion: Expansion, point: Point): Rational | null {
  if ((expansion.Q * point.probe) / point.heavy >= 1) return null;
  const at = leftOutByOrder(expansion, point);
  return expansion.orders.find((order) => at(order).used < expansion.target) ?? null;
}

export interface LargestProbe {
  /** Relative to the working point. */
  readonly probe: number;
  /** True when the target is met all the way to Q = 1. */
  readonly isHeavy: boolean;
}

/**
 * The largest p at which stopping at this order still meets the target. What is left out has positive powers of p only
 * and so grows with p: bisection in log p, to 12 digits.
 */
export function largestProbe(expansion: Expansion, order: Rational): LargestProbe {
  const end = 1 / expansion.Q;
  const powers = beyond(expansion, order);
  const excess = (probe: number) => {
    const point = { probe, heavy: 1 };
    const listed = valueAt(powers, point, expansion.Q);
    return leftOut(expansion, listed, unlistedAt(expansion, point)).used - expansion.target;
  };
  if (!(excess(end * (1 - 1e-12)) >= 0)) return { probe: end, isHeavy: true };
  let low = Math.log(end) - 1;
  while (excess(Math.exp(low)) >= 0) low -= 10;
  let high = Math.log(end);
  for (let halving = 0; halving < 100 && high - low > 1e-14 * Math.max(1, Math.abs(low)); halving += 1) {
    const middle = (low + high) / 2;
    if (excess(Math.exp(middle)) >= 0) high = middle;
    else low = middle;
  }
  return { probe: Math.exp(low), isHeavy: false };
}
