/** Numbers of operators as polynomials in the number of flavours n_f: whole values, rational coefficients. */
import { Rational } from "../exact/rational.ts";

export class FlavourPolynomial {
  static readonly zero = new FlavourPolynomial([]);

  /** @param coefficients by power of n_f, without zeros at the end */
  private constructor(readonly coefficients: readonly Rational[]) {}

  static of(coefficients: readonly Rational[]): FlavourPolynomial {
    let end = coefficients.length;
    while (end > 0 && coefficients[end - 1]?.sign() === 0) end--;
    return end === 0 ? FlavourPolynomial.zero : new FlavourPolynomial(coefficients.slice(0, end));
  }

  plus(other: FlavourPolynomial): FlavourPolynomial {
    const length = Math.max(this.coefficients.length, other.coefficients.length);
    return FlavourPolynomial.of(
      Array.from({ length }, (_, power) => this.coefficient(power).plus(other.coefficient(power))),
    );
  }

  times(factor: number): FlavourPolynomial {
    return FlavourPolynomial.of(
      this.coefficients.map((coefficient) => coefficient.times(Rational.of(factor))),
    );
  }

  coefficient(power: number): Rational {
    return this.coefficients[power] ?? Rational.zero;
  }

  isZero(): boolean {
    return this.coefficients.length === 0;
  }

  degree(): number {
    return Math.max(0, this.coefficients.length - 1);
  }

  at(flavours: number): Rational {
    return [...this.coefficients]
      .reverse()
      .reduce((sum, coefficient) => sum.times(Rational.of(flavours)).plus(coefficient), Rational.zero);
  }

  /** Canonical: "397/12*n_f^4 + 3/2*n_f^3 + 15". */
  toString(): string {
    return this.#terms(
      (coefficient) => coefficient.toString(),
      (power) => (power === 1 ? "n_f" : `n_f^${power}`),
      "*",
    );
  }

  toLatex(): string {
    return this.#terms(
      (coefficient) => coefficient.toLatex(),
      (power) => (power === 1 ? "n_f" : `n_f^{${power}}`),
      "\\,",
    );
  }

  #terms(show: (coefficient: Rational) => string, base: (power: number) => string, joint: string): string {
    if (this.isZero()) return "0";
    return this.coefficients
      .map((coefficient, power) => ({ coefficient, power }))
      .reverse()
      .filter(({ coefficient }) => coefficient.sign() !== 0)
      .map(({ coefficient, power }, index) => {
        const size = coefficient.absolute();
        const sign = coefficient.sign() < 0 ? (index === 0 ? "-" : " - ") : index === 0 ? "" : " + ";
        if (power === 0) return sign + show(size);
        return sign + (size.equals(Rational.one) ? "" : show(size) + joint) + base(power);
      })
      .join("");
  }
}
