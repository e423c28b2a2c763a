/**
 * Relevant, marginal, irrelevant. Under x = s x′ with x′ fixed, the coefficient of an operator picks up s^(d − Δ)
 * (Polchinski 1992, lecture 1; Cardy 1996, chapter 3): a positive exponent grows toward low energy.
 */
import type { DimensionSymbol, LinearForm } from "../exact/linear-form.ts";
import type { Rational } from "../exact/rational.ts";
import type { ClassRange, ScalingClass } from "./value.ts";

export interface Classification {
  /** Null when it depends on a dimension that was left symbolic. */
  readonly scalingClass: ScalingClass | null;
  /** Where the exponent vanishes, as the free dimension runs over positive values. */
  readonly marginalAt: Rational | null;
  /** One entry per open interval of the free dimension; empty without a free dimension. */
  readonly ranges: readonly ClassRange[];
}

export function classOf(sign: -1 | 0 | 1): ScalingClass {
  return sign > 0 ? "relevant" : sign < 0 ? "irrelevant" : "marginal";
}

/**
 * Classifies by the dimension of the whole coefficient. `free` is the one dimension left symbolic, or null.
 * @example classify(fourMinusD, "d") // null class, marginal at 4, relevant below and irrelevant above
 */
export function classify(exponent: LinearForm, free: DimensionSymbol | null): Classification {
  const value = exponent.asRational();
  if (value) {
    const scalingClass = classOf(value.sign());
    return { scalingClass, marginalAt: null, ranges: free ? [{ from: null, to: null, scalingClass }] : [] };
  }
  const zero = free ? exponent.zeroIn(free) : null;
  if (!free || !zero) return { scalingClass: signForPositive(exponent), marginalAt: null, ranges: [] };
  const rising = exponent.slope(free).sign() > 0;
  const above = classOf(rising ? 1 : -1);
  // A dimension is positive, so what happens at or below zero concerns nobody.
  if (zero.sign() <= 0)
    return { scalingClass: above, marginalAt: null, ranges: [{ from: null, to: null, scalingClass: above }] };
  const below = classOf(rising ? -1 : 1);
  const text = zero.toString();
  return {
    scalingClass: null,
    marginalAt: zero,
    ranges: [
      { from: null, to: text, scalingClass: below },
      { from: text, to: null, scalingClass: above },
    ],
  };
}

/** The class of a form in several free dimensions when its sign is the same for all positive values of them. */
function signForPositive(form: LinearForm): ScalingClass | null {
  const parts = [form.constant, ...form.freeSymbols().map((symbol) => form.slope(symbol))].filter(
    (part) => part.sign() !== 0,
  );
  const [first] = parts;
  if (!first) return "marginal";
  return parts.every((part) => part.sign() === first.sign()) ? classOf(first.sign()) : null;
}
