/** Exact numbers as whole multiples of one unit, so that a hundred thousand sums of them are quick and still exact. */
import { Rational } from "../exact/rational.ts";

export class Units {
  private readonly perOne: bigint;

  /** @param numbers those that will be added up: the unit divides each of them */
  constructor(numbers: readonly Rational[]) {
    this.perOne = numbers.reduce((least, { denominator }) => commonMultiple(least, denominator), 1n);
  }

  /** @throws when the unit does not divide it, which is our own mistake */
  whole(value: Rational): number {
    const scaled = value.times(Rational.of(this.perOne));
    if (!scaled.isInteger()) throw new Error(`${value.toString()} is no multiple of 1/${this.perOne}`);
    return Number(scaled.numerator);
  }

  exact(whole: number): Rational {
    return Rational.of(whole, this.perOne);
  }
}

function commonMultiple(a: bigint, b: bigint): bigint {
  let [x, y] = [a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return (a / x) * b;
}
