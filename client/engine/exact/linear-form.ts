/**
 * Exact exponents: rational linear forms a + b·d, or a + b·D + c·z for anisotropic scaling.
 * d is the spacetime dimension, D the number of space dimensions, z the anisotropy exponent.
 */
import { Rational } from "./rational.ts";

export type DimensionSymbol = "d" | "D" | "z";
const symbols: readonly DimensionSymbol[] = ["d", "D", "z"];

export class LinearForm {
  static readonly zero = new LinearForm(Rational.zero, new Map());

  private constructor(
    readonly constant: Rational,
    private readonly slopes: ReadonlyMap<DimensionSymbol, Rational>,
  ) {}

  static constant(value: Rational | bigint | number): LinearForm {
    return new LinearForm(value instanceof Rational ? value : Rational.of(value), new Map());
  }
  static symbol(symbol: DimensionSymbol): LinearForm {
    return new LinearForm(Rational.zero, new Map([[symbol, Rational.one]]));
  }

  /** Coefficient of one symbol; zero when absent. */
  slope(symbol: DimensionSymbol): Rational {
    return this.slopes.get(symbol) ?? Rational.zero;
  }
  plus(other: LinearForm): LinearForm {
    const sum = new Map<DimensionSymbol, Rational>();
    for (const symbol of symbols) {
      const slope = this.slope(symbol).plus(other.slope(symbol));
      if (slope.sign() !== 0) sum.set(symbol, slope);
    }
    return new LinearForm(this.constant.plus(other.constant), sum);
  }
  minus(other: LinearForm): LinearForm {
    return this.plus(other.times(-1));
  }
  times(factor: Rational | bigint | number): LinearForm {
    const by = factor instanceof Rational ? factor : Rational.of(factor);
    if (by.sign() === 0) return LinearForm.zero;
    return new LinearForm(
      this.constant.times(by),
      new Map([...this.slopes].map(([symbol, slope]) => [symbol, slope.times(by)])),
    );
  }
  equals(other: LinearForm): boolean {
    return this.constant.equals(other.constant) && symbols.every((s) => this.slope(s).equals(other.slope(s)));
  }
  /** The symbols that occur, in the order d, D, z. */
  freeSymbols(): DimensionSymbol[] {
    return symbols.filter((symbol) => this.slopes.has(symbol));
  }
  /** The value when no symbol occurs, else null. */
  asRational(): Rational | null {
    return this.slopes.size === 0 ? this.constant : null;
  }
  /** Puts a number in place of a symbol. */
  at(symbol: DimensionSymbol, value: Rational): LinearForm {
    const rest = new Map(this.slopes);
    rest.delete(symbol);
    return new LinearForm(this.constant.plus(this.slope(symbol).times(value)), rest);
  }
  /** Where the form vanishes as a function of one symbol when no other occurs; null if nowhere or everywhere. */
  zeroIn(symbol: DimensionSymbol): Rational | null {
    if (this.freeSymbols().some((free) => free !== symbol)) return null;
    const slope = this.slope(symbol);
    return slope.sign() === 0 ? null : this.constant.negated().over(slope);
  }

  /**
   * Canonical text, symbols first: "3/2*d - 3", "-d", "0".
   * @example LinearForm.symbol("d").times(Rational.of(3, 2)).minus(LinearForm.constant(3)).toString() // "3/2*d - 3"
   */
  toString(): string {
    return this.print((r) => r.toString(), "*");
  }
  /** "\frac{3}{2}d - 3". */
  toLatex(): string {
    return this.print((r) => r.toLatex(), "");
  }
  private print(show: (value: Rational) => string, times: string): string {
    let text = "";
    const add = (value: Rational, symbol: string) => {
      const size = value.sign() < 0 ? value.negated() : value;
      const body =
        symbol === "" ? show(size) : size.equals(Rational.one) ? symbol : show(size) + times + symbol;
      text += text === "" ? (value.sign() < 0 ? "-" : "") + body : (value.sign() < 0 ? " - " : " + ") + body;
    };
    for (const symbol of this.freeSymbols()) add(this.slope(symbol), symbol);
    if (this.constant.sign() !== 0 || text === "") add(this.constant, "");
    return text;
  }
}
