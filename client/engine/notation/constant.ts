/** Trees that are plain numbers: "1/2", "(3 - 1)", "4!". Exact, or null when anything else occurs. */
import { Rational } from "../exact/rational.ts";
import type { Tree } from "./tree.ts";

/** Hexadecimal digits beyond which an exact number is refused: the longest text is read, and no sum takes seconds. */
export const MOST_DIGITS = 1000;
const LARGEST_FACTORIAL = 300n;

export function digitsOf(value: Rational): number {
  // Four bits per hexadecimal digit are near enough for a bound and cheap to find.
  return Math.max(value.numerator.toString(16).length, value.denominator.toString(16).length);
}

/** n! for 0 ≤ n ≤ 300, else null. */
export function factorial(n: Rational): Rational | null {
  if (!n.isInteger() || n.numerator < 0n || n.numerator > LARGEST_FACTORIAL) return null;
  let product = 1n;
  for (let factor = 2n; factor <= n.numerator; factor++) product *= factor;
  return Rational.of(product);
}

/** Whole power, null when it divides by zero or grows too long. */
export function boundedPower(base: Rational, exponent: Rational): Rational | null {
  if (!exponent.isInteger()) return null;
  if (base.sign() === 0 && exponent.sign() < 0) return null;
  const size = exponent.absolute();
  const trivial = base.absolute().equals(Rational.one) || base.sign() === 0;
  if (!trivial && (size.numerator > 1000n || digitsOf(base) * Number(size.numerator) > MOST_DIGITS))
    return null;
  // (±1)^n and 0^n need only the parity and sign of n.
  if (trivial)
    return exponent.sign() === 0 ? Rational.one : size.numerator % 2n === 0n ? base.times(base) : base;
  return base.power(Number(exponent.numerator));
}

/**
 * The exact value of a tree without names.
 * @example constantOf(parsed("(1 + 1/2)^2")) // 9/4
 */
export function constantOf(tree: Tree): Rational | null {
  switch (tree.type) {
    case "number":
      return tree.value;
    case "group":
      return constantOf(tree.body);
    case "factorial": {
      const body = constantOf(tree.body);
      return body && factorial(body);
    }
    case "power": {
      const base = constantOf(tree.base);
      const exponent = constantOf(tree.exponent);
      return base && exponent && boundedPower(base, exponent);
    }
    case "quotient": {
      const over = constantOf(tree.over);
      const under = constantOf(tree.under);
      return over && under && under.sign() !== 0 ? over.over(under) : null;
    }
    case "sum": {
      let total: Rational | null = Rational.zero;
      for (const part of tree.parts) {
        const value = part.sign === "±" ? null : constantOf(part.node);
        total = total && value && (part.sign === "-" ? total.minus(value) : total.plus(value));
      }
      return total;
    }
    case "product": {
      let total = Rational.one;
      for (const factor of tree.factors) {
        const value = constantOf(factor.node);
        if (!value || digitsOf(total) > MOST_DIGITS || (factor.join === "/" && value.sign() === 0))
          return null;
        total = factor.join === "/" ? total.over(value) : total.times(value);
      }
      return total;
    }
    case "measured":
    case "name":
    case "accent":
    case "conjugate":
    case "modulus":
    case "call":
      return null;
  }
}
