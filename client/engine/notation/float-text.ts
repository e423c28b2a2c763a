/** Floats as people read them: significant digits, powers of ten, uncertainty in brackets; in Unicode or LaTeX. */

export type NumberStyle = "auto" | "plain" | "scientific" | "percent";
export type Markup = "unicode" | "latex";

export interface FloatFormat {
  /** Significant digits, 1 to 12; null lets the uncertainty decide (two digits of it), or 3 without one. */
  readonly digits: number | null;
  readonly style: NumberStyle;
  readonly markup: Markup;
}

/** A size as decimal digits and the power of ten of the first: 0.0109 at 3 digits is "109", -2. */
interface Decimal {
  readonly digits: string;
  readonly exponent: number;
}

function decimalOf(size: number, digits: number): Decimal {
  const [mantissa = "0", exponent = "0"] = size.toExponential(digits - 1).split("e");
  return { digits: mantissa.replace(".", ""), exponent: Number(exponent) };
}

/** "109", -2 → "0.0109"; digits beyond the last are zeros: "12", 4 → "12000". */
function plainOf({ digits, exponent }: Decimal): string {
  if (exponent < 0) return `0.${"0".repeat(-exponent - 1)}${digits}`;
  const whole = digits.slice(0, exponent + 1).padEnd(exponent + 1, "0");
  const part = digits.slice(exponent + 1);
  return part === "" ? whole : `${whole}.${part}`;
}

const raised = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** @example superscript("-4") // "⁻⁴" */
export function superscript(integer: string): string {
  return integer.replace("-", "⁻").replace(/\d/g, (digit) => raised.charAt(Number(digit)));
}

function powerOfTen(exponent: number, markup: Markup): string {
  return markup === "latex" ? ` \\times 10^{${exponent}}` : ` × 10${superscript(String(exponent))}`;
}

/** The sign people see: a true minus in Unicode. */
function minus(markup: Markup): string {
  return markup === "latex" ? "-" : "−";
}

/**
 * A float, with its standard uncertainty when `sigma` > 0.
 * "auto" writes sizes from 10⁻³ to below 10⁵ plainly and the others with a power of ten.
 *
 * @example floatText(0.109375, 0.0137, { digits: null, style: "auto", markup: "unicode" }) // "0.109(14)"
 * @example floatText(2.4e-4, 0, { digits: 2, style: "scientific", markup: "latex" }) // "2.4 \\times 10^{-4}"
 */
export function floatText(value: number, sigma: number, format: FloatFormat): string {
  if (Number.isNaN(value)) return "?";
  const sign = value < 0 ? minus(format.markup) : "";
  if (!Number.isFinite(value)) return sign + (format.markup === "latex" ? "\\infty" : "∞");
  const hundred = format.style === "percent" ? 100 : 1;
  const size = Math.abs(value) * hundred;
  const spread = Number.isFinite(sigma) && sigma > 0 ? sigma * hundred : 0;
  const decimal = decimalOf(size, digitsFor(size, spread, format.digits));
  // The place of the last digit shown; the uncertainty is counted in it.
  const place = decimal.exponent - decimal.digits.length + 1;
  const isScientific =
    format.style === "scientific" ||
    (format.style === "auto" && size !== 0 && (decimal.exponent < -3 || decimal.exponent > 4 || place > 0));
  const shown = isScientific
    ? mantissaOf(decimal) + bracket(spread, place) + powerOfTen(decimal.exponent, format.markup)
    : plainOf(decimal) + bracket(spread, Math.min(place, 0));
  return sign + shown + (format.style === "percent" ? percentSign(format.markup) : "");
}

function percentSign(markup: Markup): string {
  return markup === "latex" ? "\\,\\%" : " %";
}

function mantissaOf({ digits }: Decimal): string {
  return digits.length === 1 ? digits : `${digits[0] ?? ""}.${digits.slice(1)}`;
}

/** Digits of the value: as asked, but never so few that the first digit of the uncertainty is lost. */
function digitsFor(size: number, spread: number, asked: number | null): number {
  if (spread === 0) return asked ?? 3;
  const exponent = (x: number, digits: number) => decimalOf(x, digits).exponent;
  const first = exponent(size, 12);
  const needed = first - exponent(spread, 1) + 1;
  const wanted = asked ?? first - exponent(spread, 2) + 2;
  return Math.min(12, Math.max(1, wanted, needed));
}

/** "(14)": the uncertainty in units of the last digit shown. */
function bracket(spread: number, place: number): string {
  return spread === 0 ? "" : `(${Math.round(spread / 10 ** place)})`;
}
