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
import type { Spread } from "./checks.ts";
import { priorSetHalfWidth, type PriorSet } from "./prior-sets.ts";
import type { Method, Omitted } from "./shape.ts";
import type { Quantiles } from "./student-t.ts";
import type { UniformSums } from "./uniform-sum.ts";
import type { Band, Degree, PriorSettings } from "./value.ts";

export interface Series {
  /** Orders that exist, rising; at least one. */
  readonly known: readonly (KnownOrder & { readonly rowId: string })[];
  /** Orders stated to be absent by symmetry, below or beyond the last known one. */
  readonly absent: readonly number[];
  /** The same where the table has a row for them. */
  readonly absentRows: readonly { readonly rowId: string; readonly order: number }[];
  /** X_ref; null takes it from the lowest order n₀ as X^(n₀)/Q^n₀, which is X⁽⁰⁾ when the series starts at order 0. */
  readonly reference: number | null;
  /** Whether c_0 counts among the coefficients; it never does when X_ref is made from it. */
  readonly includeOrderZero: boolean;
  readonly degrees: readonly Degree[];
  readonly nu0: number;
  readonly tau0: number;
  readonly quantiles: Quantiles;
  /** Null leaves the prior sets out. */
  readonly sets: (PriorSettings & { readonly sums: UniformSums }) | null;
  /** What the coefficients up to each order say along the whole of x; null without the correlated model. */
  readonly spreadAlong: ((order: number) => Spread | null) | null;
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

/** Larger coefficients are no sizes of anything, and their squares would not fit a double. */
export const LARGEST_COEFFICIENT = 1e120;

/** Null when a power of Q leaves the range of a double, so that some coefficient has no value. */
export function estimateSeries(series: Series, q: number): SeriesEstimate | null {
  const lowest = series.known[0];
  if (!lowest) return null;
  const reference = series.reference ?? lowest.value / q ** lowest.order;
  const coefficients = series.known.map(({ order, shift }) => ({
    order,
    // Without the sum a vanishing shift over a negative reference would be −0.
    value: shift / (reference * q ** order) + 0,
    used: (order > 0 || series.includeOrderZero) && !(series.reference === null && order === lowest.order),
  }));
  const fits = ({ value }: { value: number }) => Math.abs(value) <= LARGEST_COEFFICIENT;
  if (!Number.isFinite(reference) || !coefficients.every(fits)) return null;
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
  const spread = series.spreadAlong?.(order) ?? null;
  if (spread) {
    for (const degree of series.degrees) {
      const of = (squares: number) =>
        series.quantiles(degree.probability, spread.nu) * conjugateScale(spread, reference, squares);
      if (powers.square !== null) add("correlated along x", "all omitted orders", degree, of(powers.square));
      add("correlated along x", "first omitted term", degree, of(powers.first ** 2));
    }
  }
  if (series.sets) {
    for (const { method, omitted, degree, halfWidth } of setBands(series, series.sets, q, nextOrder, used))
      if (Number.isFinite(size * halfWidth))
        bands.push({ method, omitted, degree, halfWidth: size * halfWidth });
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

/** Prior sets A, B and C, in units of |X_ref|; with `only`, just that of the two sums. */
export function setBands(
  series: Series,
  sets: NonNullable<Series["sets"]>,
  q: number,
  nextOrder: number,
  used: readonly number[],
  only: Omitted | null = null,
): PlainBand[] {
  const evidence = {
    count: used.length,
    largest: largestSize(used) ?? 0,
    squares: used.reduce((sum, c) => sum + c * c, 0),
  };
  const wanted: readonly (readonly [Omitted, number | null])[] =
    sets.terms === null
      ? [
          ["all omitted orders", null],
          ["first omitted term", 1],
        ]
      : [[sets.terms === 1 ? "first omitted term" : "all omitted orders", sets.terms]];
  return wanted.flatMap(([omitted, terms]) => {
    if ((terms === null && q >= 1) || (only !== null && only !== omitted)) return [];
    const widths = omittedWidths(series, q, nextOrder, terms);
    const sum = { uniform: sets.sums(widths), width: Math.hypot(...widths) };
    return series.degrees.flatMap(({ text, probability }) =>
      (["A", "B", "C"] satisfies PriorSet[]).flatMap((set) => {
        const halfWidth = priorSetHalfWidth(set, evidence, sets, sum, probability);
        return halfWidth === null || !Number.isFinite(halfWidth)
          ? []
          : [{ method: `prior set ${set}` as const, omitted, degree: text, halfWidth }];
      }),
    );
  });
}

/** Omitted terms below this share of the first change no digit that is shown. */
const NEGLIGIBLE_TERM = 1e-8;
const MOST_TERMS = 400;

/** Qⁿ for so many omitted orders that exist; all that count when `terms` is null. */
function omittedWidths(series: Series, q: number, nextOrder: number, terms: number | null): number[] {
  const absent = new Set(absentBeyond(nextOrder - 1, series));
  const widths: number[] = [];
  for (let n = nextOrder; widths.length < (terms ?? MOST_TERMS); n += 1) {
    if (absent.has(n)) continue;
    const width = q ** n;
    if (terms === null && width < NEGLIGIBLE_TERM * q ** nextOrder) break;
    widths.push(width);
  }
  return widths;
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
