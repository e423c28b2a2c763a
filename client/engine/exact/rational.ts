/** Exact rational numbers on BigInt: immutable, always in lowest terms, denominator positive. */

function gcd(a: bigint, b: bigint): bigint {
  let x = a < 0n ? -a : a;
  let y = b < 0n ? -b : b;
  // Nearly all numbers here are small, and plain ones divide many times faster.
  if (x <= MOST_PLAIN && y <= MOST_PLAIN) {
    let [m, n] = [Number(x), Number(y)];
    while (n !== 0) [m, n] = [n, m % n];
    return BigInt(m);
  }
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}
const MOST_PLAIN = BigInt(Number.MAX_SAFE_INTEGER);

export class Rational {
  static readonly zero = new Rational(0n, 1n);
  static readonly one = new Rational(1n, 1n);

  private constructor(
    readonly numerator: bigint,
    readonly denominator: bigint,
  ) {}

  /**
   * n/m in lowest terms. Throws on m = 0 and on numbers that are not integers: both are our own mistakes.
   * @example Rational.of(6, -4).toString() // "-3/2"
   */
  static of(n: bigint | number, m: bigint | number = 1n): Rational {
    const numerator = BigInt(n);
    const denominator = BigInt(m);
    if (denominator === 0n) throw new RangeError("a rational needs a denominator other than zero");
    if (denominator === 1n) return new Rational(numerator, denominator);
    const divisor = gcd(numerator, denominator) * (denominator < 0n ? -1n : 1n);
    return new Rational(numerator / divisor, denominator / divisor);
  }

  /**
   * Reads "3", "-3/2", "0.25" and "1.5e-3" exactly; null for anything else.
   * @example Rational.parse("0.25")?.toString() // "1/4"
   */
  static parse(text: string): Rational | null {
    const fraction = /^\s*([+-]?\d+)\s*\/\s*(\d+)\s*$/.exec(text);
    if (fraction) {
      const [, n = "", m = ""] = fraction;
      return BigInt(m) === 0n ? null : Rational.of(BigInt(n), BigInt(m));
    }
    const decimal = /^\s*([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,4}))?\s*$/.exec(text);
    if (!decimal) return null;
    const [, sign = "", whole = "", part = "", exponent = "0"] = decimal;
    if (whole === "" && part === "") return null;
    const digits = BigInt(whole + part) * (sign === "-" ? -1n : 1n);
    const shift = Number(exponent) - part.length;
    return shift >= 0
      ? Rational.of(digits * 10n ** BigInt(shift))
      : Rational.of(digits, 10n ** BigInt(-shift));
  }

  plus(other: Rational): Rational {
    if (this.denominator === 1n && other.denominator === 1n)
      return new Rational(this.numerator + other.numerator, 1n);
    return Rational.of(
      this.numerator * other.denominator + other.numerator * this.denominator,
      this.denominator * other.denominator,
    );
  }
  minus(other: Rational): Rational {
    return this.plus(other.negated());
  }
  times(other: Rational): Rational {
    return Rational.of(this.numerator * other.numerator, this.denominator * other.denominator);
  }
  /** Throws on division by zero. */
  over(other: Rational): Rational {
    return Rational.of(this.numerator * other.denominator, this.denominator * other.numerator);
  }
  /**
   * Whole powers, negative ones too; throws on a negative power of zero. The caller bounds the exponent.
   * @example Rational.of(2, 3).power(-2).toString() // "9/4"
   */
  power(exponent: number): Rational {
    if (exponent < 0) return Rational.one.over(this.power(-exponent));
    return new Rational(this.numerator ** BigInt(exponent), this.denominator ** BigInt(exponent));
  }
  negated(): Rational {
    return new Rational(-this.numerator, this.denominator);
  }
  absolute(): Rational {
    return this.numerator < 0n ? this.negated() : this;
  }
  /** -1, 0 or 1. */
  sign(): -1 | 0 | 1 {
    return this.numerator < 0n ? -1 : this.numerator > 0n ? 1 : 0;
  }
  compare(other: Rational): -1 | 0 | 1 {
    // Denominators are positive, so cross-multiplying keeps the order; what is equal needs no product.
    const [own, others] =
      this.denominator === other.denominator
        ? [this.numerator, other.numerator]
        : [this.numerator * other.denominator, other.numerator * this.denominator];
    return own < others ? -1 : own > others ? 1 : 0;
  }
  equals(other: Rational): boolean {
    return this.numerator === other.numerator && this.denominator === other.denominator;
  }
  isInteger(): boolean {
    return this.denominator === 1n;
  }
  /** Largest integer not above this one. */
  floor(): bigint {
    const quotient = this.numerator / this.denominator;
    return this.numerator < 0n && quotient * this.denominator !== this.numerator ? quotient - 1n : quotient;
  }
  /** The one way from exact to floating point. */
  toFloat(): number {
    const direct = Number(this.numerator) / Number(this.denominator);
    if (Number.isFinite(direct)) return direct;
    // Both parts overflow a double: scale them down together first.
    const excess = BigInt(
      Math.max(this.numerator.toString(2).length, this.denominator.toString(2).length) - 1000,
    );
    return Number(this.numerator >> excess) / Number(this.denominator >> excess);
  }
  /** "3", "-3/2". */
  toString(): string {
    return this.isInteger() ? String(this.numerator) : `${this.numerator}/${this.denominator}`;
  }
  toLatex(): string {
    if (this.isInteger()) return String(this.numerator);
    const sign = this.numerator < 0n ? "-" : "";
    return `${sign}\\frac{${this.numerator < 0n ? -this.numerator : this.numerator}}{${this.denominator}}`;
  }
}
