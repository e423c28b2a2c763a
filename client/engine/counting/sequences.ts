/** Whether a counting is dimensional analysis under another name: the two sequences of terms side by side. */
import type { Rational } from "../exact/rational.ts";
import type { TermOrder } from "./orders.ts";
import type { Rules } from "./read-rules.ts";
import type { CountingVerdict } from "./value.ts";
import { asNumbers } from "./weights.ts";

export interface Compared {
  readonly verdict: CountingVerdict;
  /** One entry for each term; null where it cannot be compared. */
  readonly terms: readonly {
    readonly place: number | null;
    readonly placeByDimension: number | null;
    readonly changes: number;
  }[];
}

/** Smallness of each term: larger is smaller. One parameter: its exponent; several: −log of the product of powers. */
function smallness(orders: readonly TermOrder[], { parameters }: Rules): readonly (number | null)[] {
  const logs = parameters.map(({ quantity }) => (quantity ? -Math.log(quantity.value) : null));
  return orders.map(({ order }) => {
    const exponents = order && asNumbers(order);
    if (!exponents) return null;
    if (exponents.length === 1) return exponents[0]?.toFloat() ?? null;
    let sum = 0;
    for (const [index, exponent] of exponents.entries()) {
      const log = logs[index] ?? null;
      if (exponent.sign() === 0) continue;
      if (log === null) return null;
      sum += exponent.toFloat() * log;
    }
    return sum;
  });
}

const EQUAL = 1e-9;
const sideOf = (a: number, b: number) => (Math.abs(a - b) < EQUAL ? 0 : Math.sign(a - b));

/** Places from 1 on, equal ones alike. */
function places(values: readonly (number | null)[]): readonly (number | null)[] {
  const known = values.filter((value) => value !== null).sort((a, b) => a - b);
  const distinct = known.filter(
    (value, index) => index === 0 || sideOf(value, known[index - 1] ?? value) !== 0,
  );
  return values.map((value) =>
    value === null ? null : distinct.findIndex((one) => sideOf(one, value) === 0) + 1,
  );
}

export function compareSequences(orders: readonly TermOrder[], rules: Rules): Compared {
  const byRules = smallness(orders, rules);
  const exact = orders.map(({ term }) => term.coefficient.times(-1).asRational());
  const byDimension = exact.map((one) => one?.toFloat() ?? null);
  const comparable = byRules.map((value, index) => value !== null && byDimension[index] !== null);
  const at = (list: readonly (number | null)[], index: number) => list[index] ?? 0;
  const changes = orders.map((_, one) =>
    comparable[one]
      ? orders.filter(
          (__, other) =>
            comparable[other] &&
            sideOf(at(byRules, one), at(byRules, other)) !==
              sideOf(at(byDimension, one), at(byDimension, other)),
        ).length
      : 0,
  );
  const [place, placeByDimension] = [places(byRules), places(byDimension)];
  const terms = orders.map((_, index) => ({
    place: place[index] ?? null,
    placeByDimension: placeByDimension[index] ?? null,
    changes: changes[index] ?? 0,
  }));
  const some = comparable.filter(Boolean).length >= 2;
  if (!some || comparable.includes(false))
    return { verdict: some ? differ(changes) : "not comparable", terms };
  const verdict = changes.some((count) => count > 0)
    ? "another sequence"
    : proportional(orders, exact)
      ? "just by dimension"
      : "same sequence";
  return { verdict, terms };
}

const differ = (changes: readonly number[]): CountingVerdict =>
  changes.some((count) => count > 0) ? "another sequence" : "not comparable";

/** Whether every order is one positive number times the dimension; several parameters never are. */
function proportional(orders: readonly TermOrder[], dimensions: readonly (Rational | null)[]): boolean {
  let factor: Rational | null = null;
  for (const [index, { order }] of orders.entries()) {
    const [exponent, ...others] = (order && asNumbers(order)) ?? [];
    const dimension = dimensions[index];
    if (!exponent || others.length > 0 || !dimension) return false;
    if (dimension.sign() === 0) {
      if (exponent.sign() !== 0) return false;
      continue;
    }
    const ratio = exponent.over(dimension);
    if (factor && !factor.equals(ratio)) return false;
    factor = ratio;
  }
  return factor === null || factor.sign() > 0;
}
