/**
 * How a pinned number is shown. The format is kept in the document as text, "digits=3 style=percent unit=no": only
 * what differs from the default is written, so "" is the default.
 */
import type { ScalarValue } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { floatText, type Markup, type NumberStyle } from "../notation/float-text.ts";
import { exactText } from "./exact-text.ts";
import { unitText } from "../notation/unit-text.ts";

export const numberStyles: readonly NumberStyle[] = ["auto", "plain", "scientific", "percent"];
export const signStyles = ["negative", "always", "both"] as const;
export type SignStyle = (typeof signStyles)[number];

export interface PinFormat {
  /** Significant digits, 1 to 12; null lets the number decide: two digits of its uncertainty, or 3 without one. */
  readonly digits: number | null;
  /** "auto" keeps exact numbers exact and takes a power of ten where zeros would pile up. */
  readonly style: NumberStyle;
  readonly uncertainty: boolean;
  readonly unit: boolean;
  /** "negative": a minus where there is one; "always": also a plus; "both": ± before the size, for an error. */
  readonly sign: SignStyle;
}

export const defaultPinFormat: PinFormat = {
  digits: null,
  style: "auto",
  uncertainty: true,
  unit: true,
  sign: "negative",
};

/** @example printPinFormat({ ...defaultPinFormat, digits: 3, unit: false }) // "digits=3 unit=no" */
export function printPinFormat(format: PinFormat): string {
  const parts: string[] = [];
  if (format.digits !== null) parts.push(`digits=${format.digits}`);
  if (format.style !== "auto") parts.push(`style=${format.style}`);
  if (!format.uncertainty) parts.push("uncertainty=no");
  if (!format.unit) parts.push("unit=no");
  if (format.sign !== "negative") parts.push(`sign=${format.sign}`);
  return parts.join(" ");
}

/** Reads what `printPinFormat` writes. What it does not know keeps its default: a pin is shown in any case. */
export function parsePinFormat(text: string): PinFormat {
  const given = new Map(
    text.split(/\s+/).map((part) => [part.split("=", 1)[0] ?? "", part.slice(part.indexOf("=") + 1)]),
  );
  const digits = Number(given.get("digits"));
  return {
    digits: Number.isInteger(digits) && digits >= 1 && digits <= 12 ? digits : null,
    style: numberStyles.find((style) => style === given.get("style")) ?? "auto",
    uncertainty: given.get("uncertainty") !== "no",
    unit: given.get("unit") !== "no",
    sign: signStyles.find((sign) => sign === given.get("sign")) ?? "negative",
  };
}

/**
 * The text of a pin in Unicode.
 * @example formatScalar({ type: "number", value: 0.109375, sigma: 0.0137 }, defaultPinFormat) // "0.109(14)"
 * @example formatScalar({ type: "exact", text: "-2*d + 6" }, defaultPinFormat) // "6 − 2d"
 */
export function formatScalar(value: ScalarValue, format: PinFormat): string {
  return show(value, format, "unicode");
}

/** The same as LaTeX for use inside `$…$`: "0.109(14)", "6 - 2d", "2.4 \times 10^{-4}". */
export function formatScalarLatex(value: ScalarValue, format: PinFormat): string {
  return show(value, format, "latex");
}

function show(value: ScalarValue, format: PinFormat, markup: Markup): string {
  if (value.type === "word")
    return markup === "latex" ? `\\text{${value.text.replace(/[\\{}$%#&_^~]/g, "\\$&")}}` : value.text;
  if (value.type === "exact") {
    const rational = Rational.parse(value.text);
    const asDecimal = format.digits !== null || format.style !== "auto";
    if (rational === null || !asDecimal) return signed(exactText(value.text, markup), format.sign, markup);
    return signed(
      floatText(rational.toFloat(), 0, { digits: format.digits, style: format.style, markup }),
      format.sign,
      markup,
    );
  }
  const sigma = format.uncertainty ? (value.sigma ?? 0) : 0;
  const number = signed(
    floatText(value.value, sigma, { digits: format.digits, style: format.style, markup }),
    format.sign,
    markup,
  );
  return format.unit && value.unit ? number + unitText(value.unit, markup) : number;
}

function signed(text: string, sign: SignStyle, markup: Markup): string {
  if (sign === "negative") return text;
  const isNegative = /^[-−]/.test(text);
  if (sign === "always") return isNegative ? text : `+${text}`;
  return (markup === "latex" ? "\\pm " : "±") + (isNegative ? text.slice(1) : text);
}
