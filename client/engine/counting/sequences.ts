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

/**
 * The kinetic terms stand in both sequences at 0, whether the premises write them or not: a term that dimensions put
 * behind them and the rules beside them is no small correction any more.
 */
export function compareSequences(orders: readonly TermOrder[], rules: Rules): Compared {
  const exact = orders.map(({ term }) => term.coefficient.times(-1).asRational());
  const byRules = [...smallness(orders, rules), 0];
  const byDimension = [...exact.map((one) => one?.toFloat() ?? null), 0];
  const pairs = byRules.map((value, index) => {
    const dimension = byDimension[index] ?? null;
    return value === null || dimension === null ? null : { value, dimension };
  });
  const changes = pairs.map((one) =>
    one === null
      ? 0
      : pairs.filter(
          (other) =>
            other !== null && sideOf(one.value, other.value) !== sideOf(one.dimension, other.dimension),
        ).length,
  );
  const [place, placeByDimension] = [places(byRules), places(byDimension)];
  const terms = orders.map((_, index) => ({
    place: place[index] ?? null,
    placeByDimension: placeByDimension[index] ?? null,
    changes: changes[index] ?? 0,
  }));
  return { verdict: verdictOf(orders, exact, changes, pairs.includes(null) || orders.length === 0), terms };
}

function verdictOf(
  orders: readonly TermOrder[],
  dimensions: readonly (Rational | null)[],
  changes: readonly number[],
  isPartial: boolean,
): CountingVerdict {
  if (changes.some((count) => count > 0)) return "another sequence";
  if (isPartial) return "not comparable";
  return proportional(orders, dimensions) ? "just by dimension" : "same sequence";
}

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
