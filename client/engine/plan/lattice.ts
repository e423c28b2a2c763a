/** The listed terms and their products in several small parameters: points of a lattice of orders, and where to cut. */
import type { CountingValue } from "../counting/value.ts";
import { roundFloat } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";

export interface LatticePoint {
  /** One exponent per parameter, canonical text. */
  readonly order: readonly string[];
  /** Terms and products that stand here, each of size Π λᵢ^nᵢ. */
  readonly count: number;
  /** Of one of them, relative to the leading amplitude. */
  readonly size: number;
  /** Sum of all points after this one. */
  readonly leftOut: number;
  readonly included: boolean;
}

export interface PlanLattice {
  readonly parameters: readonly { readonly latex: string; readonly size: number }[];
  /** Largest first. */
  readonly points: readonly LatticePoint[];
}

const MOST_POINTS = 2_000;

/**
 * Orders of up to `insertions` suppressed terms, cut where the sum of what is left out falls below `target`.
 * Exponents are exact and add; a size is Π λᵢ^nᵢ with natural coefficients. (Own derivation.)
 *
 * @returns null when a parameter has no number below 1, or there are too many points.
 */
export function planLattice(counting: CountingValue, insertions: number, target: number): PlanLattice | null {
  const parameters = counting.parameters.flatMap(({ latex, size }) =>
    size !== null && size > 0 && size < 1 ? [{ latex, size }] : [],
  );
  if (parameters.length === 0 || parameters.length < counting.parameters.length) return null;
  const sizeOf = (order: readonly Rational[]) =>
    order.reduce((size, power, at) => size * (parameters[at]?.size ?? 1) ** power.toFloat(), 1);
  const suppressed = counting.terms
    .filter(({ kinetic, allowed }) => !kinetic && allowed)
    .map(({ order }) => (order ?? []).flatMap((power) => Rational.parse(power) ?? []))
    .filter((order) => order.length === parameters.length && sizeOf(order) < 1);

  // How many products there are of each number of insertions at each order, one term after the other.
  const start = { order: parameters.map(() => Rational.zero), used: 0, count: 1 };
  let products = new Map([[keyOf(start), start]]);
  for (const order of suppressed) {
    const grown = new Map<string, typeof start>();
    for (const product of products.values()) {
      let next = product;
      for (;;) {
        const before = grown.get(keyOf(next))?.count ?? 0;
        grown.set(keyOf(next), { ...next, count: next.count + before });
        if (next.used === insertions) break;
        const raised = next.order.map((power, at) => power.plus(order[at] ?? Rational.zero));
        next = { ...next, order: raised, used: next.used + 1 };
      }
      if (grown.size > MOST_POINTS) return null;
    }
    products = grown;
  }
  const counts = new Map<string, { readonly order: readonly Rational[]; readonly count: number }>();
  for (const { order, used, count } of products.values()) {
    const at = order.join(" ");
    if (used > 0) counts.set(at, { order, count: count + (counts.get(at)?.count ?? 0) });
  }
  const sized = [...counts.values()]
    .map(({ order, count }) => ({ order: order.map(String), count, size: sizeOf(order) }))
    .sort((a, b) => b.size - a.size);
  let leftOut = 0;
  const points = sized
    .toReversed()
    .map((point) => {
      const after = leftOut;
      leftOut += point.count * point.size;
      // What would be missing without it is still too much: it is in.
      return {
        ...point,
        size: roundFloat(point.size),
        leftOut: roundFloat(after),
        included: leftOut >= target,
      };
    })
    .toReversed();
  return { parameters, points };
}

function keyOf({ order, used }: { readonly order: readonly Rational[]; readonly used: number }): string {
  return `${used}: ${order.join(" ")}`;
}
