/** Applies the four estimates to a series at one Q: coefficients first, then every method at every order. */
import {
  conjugatePosterior,
  conjugateScale,
  differencesOfOrders,
  largestSize,
  omittedPowers,
  uniformPriorFactor,
  type ConjugatePosterior,
  type KnownOrder,
} from "./estimates.ts";
import type { Method, Omitted } from "./shape.ts";
import type { Quantiles } from "./student-t.ts";
import type { Band, Degree } from "./value.ts";

export interface Series {
  /** Orders that exist, rising; at least one. */
  readonly known: readonly (KnownOrder & { readonly rowId: string })[];
  /** Orders stated to be absent by symmetry, below or beyond the last known one. */
  readonly absent: readonly number[];
  /** X_ref; null takes it from the lowest order n₀ as X^(n₀)/Q^n₀, which is X⁽⁰⁾ when the series starts at order 0. */
  readonly reference: number | null;
  /** Whether c_0 counts among the coefficients; it never does when X_ref is made from it. */
  readonly includeOrderZero: boolean;
  readonly degrees: readonly Degree[];
  readonly nu0: number;
  readonly tau0: number;
  readonly quantiles: Quantiles;
}

export type PlainBand = Omit<Band, "fromQ">;
export interface EstimateAtOrder {
  readonly rowId: string;
  readonly order: number;
  readonly value: number;
  readonly nextOrder: number;
  readonly coefficientCount: number;
  readonly largest: number | null;
  readonly posterior: ConjugatePosterior | null;
  readonly bands: readonly PlainBand[];
}
export interface SeriesEstimate {
  readonly reference: number;
  /** Of the orders that exist, rising. */
  readonly coefficients: readonly {
    readonly order: number;
    readonly value: number;
    readonly used: boolean;
  }[];
  readonly orders: readonly EstimateAtOrder[];
}

/** Null when a power of Q leaves the range of a double, so that some coefficient has no value. */
export function estimateSeries(series: Series, q: number): SeriesEstimate | null {
  const lowest = series.known[0];
  if (!lowest) return null;
  const reference = series.reference ?? lowest.value / q ** lowest.order;
  const coefficients = series.known.map(({ order, shift }) => ({
    order,
    value: shift / (reference * q ** order),
    used: (order > 0 || series.includeOrderZero) && !(series.reference === null && order === lowest.order),
  }));
  if (!coefficients.every(({ value }) => Number.isFinite(value))) return null;
  const orders = series.known.map((_, index) => estimateAt(series, q, reference, coefficients, index));
  return { reference, coefficients, orders };
}

function estimateAt(
  series: Series,
  q: number,
  reference: number,
  coefficients: SeriesEstimate["coefficients"],
  index: number,
): EstimateAtOrder {
  // The caller maps over `known`, so the index exists.
  const { rowId, order, value } = series.known[index] as Series["known"][number];
  const nextOrder = orderAfter(order, series);
  const used = coefficients.slice(0, index + 1).flatMap((c) => (c.used ? [c.value] : []));
  const largest = largestSize(used);
  const posterior = conjugatePosterior(used, series.nu0, series.tau0);
  const powers = omittedPowers(q, nextOrder, absentBeyond(order, series));

  const bands: PlainBand[] = [];
  const add = (method: Method, omitted: Omitted, degree: Degree | null, halfWidth: number) => {
    if (Number.isFinite(halfWidth)) bands.push({ method, omitted, degree: degree?.text ?? null, halfWidth });
  };
  const size = Math.abs(reference);
  if (posterior) {
    for (const degree of series.degrees) {
      const of = (squares: number) =>
        series.quantiles(degree.probability, posterior.nu) * conjugateScale(posterior, reference, squares);
      if (powers.square !== null) add("conjugate prior", "all omitted orders", degree, of(powers.square));
      add("conjugate prior", "first omitted term", degree, of(powers.first ** 2));
    }
  }
  if (largest !== null) {
    for (const degree of series.degrees) {
      const factor = uniformPriorFactor(used.length, degree.probability);
      add("uniform prior", "first omitted term", degree, size * largest * powers.first * factor);
    }
    if (powers.linear !== null)
      add("first omitted term", "all omitted orders", null, size * largest * powers.linear);
    add("first omitted term", "first omitted term", null, size * largest * powers.first);
  }
  add(
    "differences of orders",
    "first omitted term",
    null,
    differencesOfOrders(series.known, index, nextOrder, q),
  );
  return { rowId, order, value, nextOrder, coefficientCount: used.length, largest, posterior, bands };
}

/** The first order above `order` that exists: a known one, or beyond the table the next that is not stated absent. */
function orderAfter(order: number, { known, absent }: Series): number {
  const later = known.find((other) => other.order > order);
  if (later) return later.order;
  let next = order + 1;
  while (absent.includes(next)) next += 1;
  return next;
}

/** Orders above `order` that do not exist: stated absent, or passed over between known ones. */
function absentBeyond(order: number, { known, absent }: Series): number[] {
  const highest = known.at(-1)?.order ?? order;
  const exists = new Set(known.map((other) => other.order));
  const passedOver: number[] = [];
  for (let n = order + 1; n < highest; n += 1) if (!exists.has(n)) passedOver.push(n);
  return [...passedOver, ...absent.filter((n) => n > highest)];
}
