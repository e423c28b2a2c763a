/** The listed terms and their products in several small parameters: points of a lattice of orders, and where to cut. */
import type { CountingParameter, CountingValue } from "../counting/value.ts";
import { roundFloat } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { latticeMoved, largestProbeOf, totalOf, type LatticeMove, type SizedPoint } from "./lattice-moves.ts";

export interface LatticePoint {
  /** One exponent per parameter, canonical text. */
  readonly order: readonly string[];
  /** Single terms that stand here; products of them are only counted. */
  readonly terms: readonly string[];
  /** Terms and products that stand here, each of size Π λᵢ^nᵢ. */
  readonly count: number;
  /** Of one of them, relative to the leading amplitude. */
  readonly size: number;
  /** Sum of all points after this one. */
  readonly leftOut: number;
  readonly included: boolean;
}

export interface PlanLattice {
  readonly parameters: readonly { readonly latex: string; readonly symbol: string; readonly size: number }[];
  /** Largest first. */
  readonly points: readonly LatticePoint[];
  /** Of the points beyond the cut, with its standard uncertainty from those of the parameters. */
  readonly leftOut: { readonly value: number; readonly sigma: number };
  /** Largest probe scale, as a multiple of this one, at which the same points suffice; null where that is not known. */
  readonly largestProbe: number | null;
  /** What is left out by the same cut when a scale moves by its uncertainty; empty where that is not known. */
  readonly moves: readonly LatticeMove[];
  /** Terms without an order, and those that are not smaller than the leading amplitude. */
  readonly passedOver: { readonly withoutOrder: number; readonly notSmall: number };
}

type Sized = CountingParameter & { readonly size: number };

const MOST_POINTS = 2_000;

/**
 * Orders of up to `insertions` suppressed terms, cut where the sum of what is left out falls below `target`. Exponents
 * are exact and add; a size is Π λᵢ^nᵢ with natural coefficients. `relative` are the relative uncertainties of the
 * probe and heavy scale, by which they are moved. (Own derivation.)
 *
 * @returns null when a parameter has no number below 1, or there are too many points.
 */
export function planLattice(
  counting: CountingValue,
  insertions: number,
  target: number,
  relative: { readonly probe: number; readonly heavy: number } = { probe: 0, heavy: 0 },
): PlanLattice | null {
  const parameters = counting.parameters.flatMap((one): Sized[] =>
    one.size !== null && one.size > 0 && one.size < 1 ? [{ ...one, size: one.size }] : [],
  );
  if (parameters.length === 0 || parameters.length < counting.parameters.length) return null;
  const sizeOf = (order: readonly Rational[]) =>
    order.reduce((size, power, at) => size * (parameters[at]?.size ?? 1) ** power.toFloat(), 1);
  const listed = counting.terms
    .filter(({ kinetic, allowed }) => !kinetic && allowed)
    .map(({ order, latex }) => ({
      latex,
      order: (order ?? []).flatMap((power) => Rational.parse(power) ?? []),
    }));
  const ordered = listed.filter(({ order }) => order.length === parameters.length);
  const isLeading = (order: readonly Rational[]) => order.every((power) => power.sign() === 0);
  const suppressed = ordered.filter(({ order }) => sizeOf(order) < 1);
  const counts = productsOf(
    suppressed.map(({ order }) => order),
    parameters.length,
    insertions,
  );
  if (!counts) return null;
  const sized = counts
    .map((point): SizedPoint => ({ ...point, size: sizeOf(point.order) }))
    .sort((a, b) => b.size - a.size);
  const sums = sumsAfter(sized);
  const isIn = sized.map(({ count, size }, at) => (sums[at] ?? 0) + count * size >= target);
  const beyond = sized.filter((_, at) => !isIn[at]);
  return {
    parameters: parameters.map(({ latex, symbol, size }) => ({ latex, symbol, size })),
    points: sized.map(({ order, count, size }, at) => ({
      order: order.map(String),
      terms: suppressed.filter((term) => sameOrder(term.order, order)).map(({ latex }) => latex),
      count,
      size: roundFloat(size),
      leftOut: roundFloat(sums[at] ?? 0),
      included: isIn[at] === true,
    })),
    leftOut: { value: roundFloat(totalOf(beyond)), sigma: roundFloat(sigmaOf(beyond, parameters)) },
    largestProbe: largestProbeOf(beyond, parameters, target),
    moves: latticeMoved(beyond, parameters, target, relative),
    passedOver: {
      withoutOrder: listed.length - ordered.length,
      notSmall: ordered.filter(({ order }) => sizeOf(order) >= 1 && !isLeading(order)).length,
    },
  };
}

const sameOrder = (a: readonly Rational[], b: readonly Rational[]) =>
  a.every((power, at) => power.equals(b[at] ?? Rational.zero));

/** From the last to the first, so that small ones are added before large ones. */
function sumsAfter(points: readonly SizedPoint[]): readonly number[] {
  const sums: number[] = [];
  let sum = 0;
  for (const { count, size } of points.toReversed()) {
    sums.push(sum);
    sum += count * size;
  }
  return sums.toReversed();
}

/** Parameters that share a source move together: its shares are added before they are squared. */
function sigmaOf(points: readonly SizedPoint[], parameters: readonly Sized[]): number {
  const sources = new Set(parameters.flatMap(({ spread }) => Object.keys(spread)));
  return Math.hypot(
    ...[...sources].map((source) =>
      points.reduce((sum, { order, count, size }) => {
        const share = order.reduce(
          (shares, power, at) => shares + power.toFloat() * (parameters[at]?.spread[source] ?? 0),
          0,
        );
        return sum + count * size * share;
      }, 0),
    ),
  );
}

/** How many products there are of up to so many terms at each order, one term after the other. */
function productsOf(
  orders: readonly (readonly Rational[])[],
  parameters: number,
  insertions: number,
): readonly { readonly order: readonly Rational[]; readonly count: number }[] | null {
  interface Product {
    readonly order: readonly Rational[];
    readonly used: number;
    readonly count: number;
  }
  const keyOf = ({ order, used }: Product) => `${used}: ${order.join(" ")}`;
  const start: Product = {
    order: Array.from({ length: parameters }, () => Rational.zero),
    used: 0,
    count: 1,
  };
  let products = new Map([[keyOf(start), start]]);
  for (const order of orders) {
    const grown = new Map<string, Product>();
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
  return [...counts.values()];
}
