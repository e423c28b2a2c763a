/**
 * Numbers of independent operators by field content and derivatives, modulo integration by parts and equations of
 * motion, from the Hilbert series (Henning, Lu, Melia, Murayama 2015, 2017) taken apart by cycle types: a power of a
 * field is a sum over partitions, and every integral depends only on which representations occur at which powers.
 */
import type { Progress } from "../kind.ts";
import { Rational } from "../exact/rational.ts";
import type { FieldClass } from "./classes.ts";
import type { Content } from "./content.ts";
import { factorial } from "./cycle-types.ts";
import { FlavourPolynomial } from "./flavour-polynomial.ts";
import { Integrals } from "./integrals.ts";

export interface CountedClass extends FieldClass {
  /** By number of derivatives, those that are not zero. For one of the conjugate pair. */
  readonly numbers: readonly { readonly derivatives: number; readonly number: FlavourPolynomial }[];
}

/** Float64 is exact below; a class whose terms add up to more is done again in big integers. */
const EXACT_BELOW = 2 ** 53;

/**
 * @param fields those that can hold operators: all of `fieldClasses`
 * @param least, most twice the mass dimension, inclusive; the count is complete above the dimension of spacetime only
 * @param tell told how far it is, once per class
 * @param exactBelow what certifies a float; 0 counts every class in big integers
 */
export function countOperators(
  content: Content,
  fields: readonly FieldClass[],
  least: number,
  most: number,
  tell: (progress: Progress) => void,
  exactBelow = EXACT_BELOW,
): readonly CountedClass[] {
  const classes = [...fields];
  const counter = new Counter(least, most, content, exactBelow);
  // Rising dimension, so that progress means something.
  classes.sort((a, b) => a.doubled - b.doubled);
  return classes.flatMap((found, index) => {
    tell({ done: index, of: classes.length, part: `fields of dimension ${found.doubled / 2}` });
    const numbers = counter
      .count(found)
      .map((number, derivatives) => ({ derivatives, number }))
      .filter(({ number }) => !number.isZero());
    return numbers.length === 0 ? [] : [{ ...found, numbers }];
  });
}

/** Products of cycle types of the first few quanta. */
interface Beginnings {
  /** For each place of `Integrals`, of each product its multiset. */
  readonly multisets: readonly number[][];
  readonly flavourPowers: number[];
  /** Exact while below `EXACT_BELOW`. */
  readonly weights: number[];
}

class Counter {
  readonly #integrals: Integrals;
  /** Of the class before: its powers, and the products after each quantum; the next one shares a beginning. */
  #powers: readonly number[] = [];
  readonly #beginnings: Beginnings[];

  constructor(
    private readonly least: number,
    private readonly most: number,
    content: Content,
    private readonly exactBelow: number,
  ) {
    this.#integrals = new Integrals(content, most);
    const multisets = this.#integrals.multisets.map(({ empty }) => [empty]);
    this.#beginnings = [{ multisets, flavourPowers: [0], weights: [1] }];
  }

  /** By number of derivatives. */
  count(found: FieldClass): FlavourPolynomial[] {
    const derivatives = Math.floor((this.most - found.doubled) / 2) + 1;
    const sums = this.#sum(found, derivatives);
    const arrangements = found.powers.reduce((product, power) => product * factorial(power), 1n);
    return Array.from({ length: derivatives }, (_, k) => {
      const coefficients = Array.from(sums, (byDerivatives) => byDerivatives[k] ?? 0n);
      // At and below the dimension of spacetime these are no counts.
      if (found.doubled + 2 * k < this.least || coefficients.every((coefficient) => coefficient === 0n))
        return FlavourPolynomial.zero;
      assertWhole(coefficients, arrangements);
      return FlavourPolynomial.of(
        coefficients.map((coefficient) =>
          coefficient === 0n ? Rational.zero : Rational.of(coefficient, arrangements),
        ),
      );
    });
  }

  /** Sums [power of n_f][derivatives] before the division by Π n_i!. */
  #sum({ powers }: FieldClass, derivatives: number): bigint[][] {
    const { multisets, flavourPowers, weights } = this.#expanded(powers);
    const [others = [], scalars = [], ...groups] = multisets;
    const floats: Float64Array[] = [];
    let largest = 0;
    for (let index = 0; index < weights.length; index++) {
      let weight = weights[index] ?? 0;
      for (let group = 0; group < groups.length && weight !== 0; group++)
        weight *= this.#integrals.group(group, groups[group]?.[index] ?? 0);
      if (weight === 0) continue;
      const vector = this.#integrals.vector(others[index] ?? 0, scalars[index] ?? 0);
      const sums = (floats[flavourPowers[index] ?? 0] ??= new Float64Array(derivatives));
      let size = 0;
      for (let k = 0; k < derivatives; k++) {
        const term = weight * (vector[k] ?? 0);
        sums[k] = (sums[k] ?? 0) + term;
        size = Math.max(size, Math.abs(term));
      }
      // A weight that is not exact may meet zeros only.
      largest += size + Math.abs(weight);
    }
    // Never so for NaN, which an integral is that a float is not known to hold.
    if (largest < this.exactBelow)
      return Array.from(floats, (sums: Float64Array | undefined) =>
        Array.from(sums ?? [], (sum) => BigInt(sum)),
      );
    return this.#exactSum(powers, derivatives);
  }

  #expanded(powers: readonly number[]): Beginnings {
    let at = 0;
    while (at < this.#powers.length && powers[at] === this.#powers[at]) at += 1;
    let last = this.#beginning(at);
    for (; at < powers.length; at++) {
      const power = powers[at] ?? 0;
      if (power > 0) last = this.#extend(last, at, power);
      this.#beginnings[at + 1] = last;
    }
    this.#powers = powers;
    return last;
  }

  #beginning(at: number): Beginnings {
    const found = this.#beginnings[at];
    if (!found) throw new Error("quanta come in order");
    return found;
  }

  #extend(before: Beginnings, at: number, power: number): Beginnings {
    const choices = this.#integrals.choices(at, power);
    const multisets = before.multisets.map((own, place) => {
      const union = this.#integrals.multisets[place];
      // The field does not know this group.
      if (choices.length === 1 && choices[0]?.multisets[place] === 0) return own;
      return own.flatMap((first) =>
        choices.map((choice) => union?.union(first, choice.multisets[place] ?? 0) ?? 0),
      );
    });
    return {
      multisets,
      flavourPowers: before.flavourPowers.flatMap((first) =>
        choices.map(({ flavourPower }) => first + flavourPower),
      ),
      weights: before.weights.flatMap((first) => choices.map(({ approximate }) => first * approximate)),
    };
  }

  /** The same in big integers throughout. */
  #exactSum(powers: readonly number[], derivatives: number): bigint[][] {
    const { multisets, flavourPowers } = this.#expanded(powers);
    const [others = [], scalars = [], ...groups] = multisets;
    let weights = [1n];
    for (const [at, power] of powers.entries())
      if (power > 0)
        weights = weights.flatMap((first) =>
          this.#integrals.choices(at, power).map(({ factor }) => first * factor),
        );
    const exact: bigint[][] = [];
    for (const [index, first] of weights.entries()) {
      const weight = groups.reduce(
        (product, group, at) => product * this.#integrals.exactGroup(at, group[index] ?? 0),
        first,
      );
      if (weight === 0n) continue;
      const vector = this.#integrals.exactVector(others[index] ?? 0, scalars[index] ?? 0);
      const sums = (exact[flavourPowers[index] ?? 0] ??= Array.from({ length: derivatives }, () => 0n));
      for (let k = 0; k < derivatives; k++) sums[k] = (sums[k] ?? 0n) + weight * (vector[k] ?? 0n);
    }
    return Array.from(exact, (sums: bigint[] | undefined) => sums ?? []);
  }
}

/** A count that is no count, for any number of flavours, is a mistake of ours. Before the division, in integers. */
function assertWhole(coefficients: readonly bigint[], arrangements: bigint): void {
  for (let flavours = 0n; flavours <= BigInt(coefficients.length); flavours++) {
    const value = coefficients.reduceRight((sum, coefficient) => sum * flavours + coefficient, 0n);
    if (value < 0n || value % arrangements !== 0n)
      throw new Error(`${value}/${arrangements} operators cannot be, at n_f = ${flavours}`);
  }
}
