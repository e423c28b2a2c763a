/**
 * Field theory in zero dimensions: an ordinary integral whose expansion counts graphs. With couplings g_n x^{n−2} for
 * φⁿ/n!, a connected graph with E legs and L loops has x^{2L − 2 + E}. Own derivation from Gaussian moments.
 */
import { Rational } from "#engine/exact/rational.ts";

export type Series = readonly Rational[];

export const product = (a: Series, b: Series): Series =>
  a.map((_, n) =>
    a
      .slice(0, n + 1)
      .reduce((sum, term, k) => sum.plus(term.times(b[n - k] ?? Rational.zero)), Rational.zero),
  );
const sum = (a: Series, b: Series, times = Rational.one): Series =>
  a.map((term, n) => term.plus((b[n] ?? Rational.zero).times(times)));
const constant = (value: Rational, length: number): Series =>
  Array.from({ length }, (_, n) => (n === 0 ? value : Rational.zero));

/** Quotient of two series; the divisor begins with a number other than zero. */
function quotient(a: Series, b: Series): Series {
  const found: Rational[] = [];
  for (const [n, term] of a.entries()) {
    const rest = found.reduce((left, one, k) => left.minus(one.times(b[n - k] ?? Rational.zero)), term);
    found.push(rest.over(b[0] ?? Rational.one));
  }
  return found;
}

/** n!! for odd n ≥ −1. */
function doubleFactorial(n: number): bigint {
  return n <= 1 ? 1n : BigInt(n) * doubleFactorial(n - 2);
}
function factorial(n: number): bigint {
  return n <= 1 ? 1n : BigInt(n) * factorial(n - 1);
}

/** ⟨φ^k exp(Σ g_n x^{n−2} φⁿ/n!)⟩ over the unit Gaussian, as a series in x. */
function moment(k: number, couplings: Readonly<Record<number, Rational>>, length: number): Series {
  const found = Array.from({ length }, () => Rational.zero);
  const entries = Object.entries(couplings);
  const choose = (index: number, order: number, legs: number, weight: Rational): void => {
    const entry = entries[index];
    if (!entry) {
      if (legs % 2 !== 0) return;
      found[order] = (found[order] ?? Rational.zero).plus(
        weight.times(Rational.of(doubleFactorial(legs - 1))),
      );
      return;
    }
    const [n, g] = [Number(entry[0]), entry[1]];
    for (let count = 0; order + count * (n - 2) < length; count += 1) {
      const share = g.power(count).over(Rational.of(factorial(n) ** BigInt(count) * factorial(count)));
      choose(index + 1, order + count * (n - 2), legs + count * n, weight.times(share));
    }
  };
  choose(0, 0, k, Rational.one);
  return found;
}

/** Cumulants W_1 … W_most in the presence of a source, itself a series without constant term. */
function cumulants(
  couplings: Readonly<Record<number, Rational>>,
  most: number,
  length: number,
  source: Series,
): Series[] {
  const moments = Array.from({ length: most + length }, (_, k) => moment(k, couplings, length));
  const shifted = Array.from({ length: most + 1 }, (_, k) => {
    let total = constant(Rational.zero, length);
    let power = constant(Rational.one, length);
    for (let j = 0; j < length; j += 1) {
      total = sum(total, product(moments[k + j] ?? [], power), Rational.of(1n, factorial(j)));
      power = product(power, source);
    }
    return total;
  });
  const normal = shifted.map((one) => quotient(one, shifted[0] ?? []));
  const found: Series[] = [];
  for (let n = 1; n <= most; n += 1) {
    let value = normal[n] ?? [];
    for (let k = 1; k < n; k += 1) {
      const ways = Rational.of(factorial(n - 1), factorial(k - 1) * factorial(n - k));
      value = sum(value, product(found[k - 1] ?? [], normal[n - k] ?? []), ways.negated());
    }
    found.push(value);
  }
  return found;
}

export function connectedSums(
  couplings: Readonly<Record<number, Rational>>,
  length: number,
): readonly Series[] {
  return cumulants(couplings, 4, length, constant(Rational.zero, length));
}

/**
 * Sums of irreducible graphs with 1 to 4 legs: the source is chosen so that ⟨φ⟩ = 0, where W_3 = W_2³ Γ_3 and
 * W_4 = W_2⁴ Γ_4 + 3 W_3²/W_2; the source itself is minus the irreducible tadpole, and 1 − 1/W_2 the self-energy.
 */
export function irreducibleSums(
  couplings: Readonly<Record<number, Rational>>,
  length: number,
): readonly Series[] {
  let source = constant(Rational.zero, length);
  for (let n = 0; n < length; n += 1) {
    const [mean = []] = cumulants(couplings, 1, length, source);
    source = sum(source, mean, Rational.of(-1));
  }
  const [, two = [], three = [], four = []] = cumulants(couplings, 4, length, source);
  const one = constant(Rational.one, length);
  const squared = product(two, two);
  const trees = quotient(product(three, three), two);
  return [
    source.map((term) => term.negated()),
    sum(one, quotient(one, two), Rational.of(-1)),
    quotient(three, product(squared, two)),
    quotient(sum(four, trees, Rational.of(-3)), product(squared, squared)),
  ];
}
