/** What is left out when one stops at an order, and the order to stop at. */
import { Rational } from "../exact/rational.ts";
import { sizeOfEntry, type Entry } from "./entries.ts";
import type { Point } from "./terms.ts";
import type { OrderPlanValue } from "./value.ts";

export interface Expansion {
  readonly Q: number;
  /** Corrections to the amplitude. */
  readonly amplitude: readonly Entry[];
  /** The observable's entries of positive order: the same, or those of the rate. */
  readonly entries: readonly Entry[];
  /** Distinct orders of the observable, ascending, 0 first. */
  readonly orders: readonly Rational[];
  readonly observable: OrderPlanValue["observable"];
  readonly sumUsed: OrderPlanValue["sumUsed"];
  /** Highest order of a single listed term: terms of higher order are not listed. */
  readonly highestListed: Rational;
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

/**
 * Terms that nobody listed, one of natural size at each allowed order past the last listed: in an amplitude
 * T = Σ_j Q^(N + j s) = Q^(N+s)/(1 − Q^s). In a rate, with A the sum of the listed corrections,
 * |1 + A + T|² − |1 + A|² = 2T(1 + A) + T², less 2T when nothing interferes with the leading amplitude. (Own derivation.)
 */
function unlisted(expansion: Expansion, point: Point): number {
  const Q = (expansion.Q * point.probe) / point.heavy;
  if (Q >= 1) return Infinity;
  const step = expansion.step.toFloat();
  const tail = Q ** (expansion.highestListed.toFloat() + step) / (1 - Q ** step);
  if (expansion.observable === "amplitude") return tail;
  const listed = expansion.amplitude.reduce((sum, entry) => sum + sizeOfEntry(entry, expansion.Q, point), 0);
  return (expansion.observable === "rate with interference" ? 2 * tail : 0) + 2 * listed * tail + tail ** 2;
}

/** Sizes are added, not combined in quadrature: signs are unknown and a bound is wanted. */
export function leftOutAt(expansion: Expansion, order: Rational, point: Point): LeftOut {
  const listed = expansion.entries.reduce(
    (sum, entry) => (entry.order.compare(order) > 0 ? sum + sizeOfEntry(entry, expansion.Q, point) : sum),
    0,
  );
  const beyond = unlisted(expansion, point);
  return { listed, unlisted: beyond, used: expansion.sumUsed === "natural tail" ? listed + beyond : listed };
}

/** The lowest order that leaves out less than the target; null when no listed order does, or the expansion has ended. */
export function orderFor(expansion: Expansion, point: Point): Rational | null {
  if ((expansion.Q * point.probe) / point.heavy >= 1) return null;
  return expansion.orders.find((order) => leftOutAt(expansion, order, point).used < expansion.target) ?? null;
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
  const excess = (probe: number) => leftOutAt(expansion, order, { probe, heavy: 1 }).used - expansion.target;
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
