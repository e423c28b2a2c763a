/** Exponents of several small parameters at once: one exact number for each, in their order. */
import { LinearForm } from "../exact/linear-form.ts";
import type { Rational } from "../exact/rational.ts";

export type Weights = readonly LinearForm[];

export function zeroWeights(parameters: number): Weights {
  return Array.from({ length: parameters }, () => LinearForm.zero);
}
export function plus(a: Weights, b: Weights): Weights {
  return a.map((one, index) => one.plus(b[index] ?? LinearForm.zero));
}
export function minus(a: Weights, b: Weights): Weights {
  return a.map((one, index) => one.minus(b[index] ?? LinearForm.zero));
}
export function times(a: Weights, factor: Rational | number): Weights {
  return a.map((one) => one.times(factor));
}
export function sameWeights(a: Weights, b: Weights): boolean {
  return a.length === b.length && a.every((one, index) => one.equals(b[index] ?? LinearForm.zero));
}
/** Exponents as numbers; null while a dimension is left symbolic in one of them. */
export function asNumbers(weights: Weights): readonly Rational[] | null {
  const numbers = weights.flatMap((one) => one.asRational() ?? []);
  return numbers.length === weights.length ? numbers : null;
}
