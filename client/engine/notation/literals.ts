/** Literals to exact numbers. */
import { Rational } from "../exact/rational.ts";

const LARGEST_EXPONENT_OF_TEN = 400;

/** "3", "0.25", "1e-3" exactly; null when the power of ten is out of all proportion. */
export function exactLiteral(text: string): Rational | null {
  const exponent = /[eE]([+-]?\d+)$/.exec(text)?.[1] ?? "0";
  return Math.abs(Number(exponent)) > LARGEST_EXPONENT_OF_TEN ? null : Rational.parse(text);
}

/**
 * A measured literal: its uncertainty counts in the last digit unless it has a decimal point of its own.
 * @example measuredLiteral("1.3", "2", "3") // 1300 ± 200
 * @example measuredLiteral("3.2", "0.4", "0") // 3.2 ± 0.4
 */
export function measuredLiteral(
  digits: string,
  uncertainty: string,
  exponent: string,
): { readonly value: Rational; readonly sigma: Rational } | null {
  const decimals = /\.(\d*)$/.exec(digits)?.[1]?.length ?? 0;
  const lastPlace = Rational.of(10).power(uncertainty.includes(".") ? 0 : -decimals);
  const scale = exactLiteral(`1e${exponent}`);
  const value = exactLiteral(digits);
  const spread = exactLiteral(uncertainty);
  if (!scale || !value || !spread) return null;
  return { value: value.times(scale), sigma: spread.times(lastPlace).times(scale) };
}
