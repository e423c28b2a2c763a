/** A value with one bracket for each kind of error, as papers print it. */
import { measuredText } from "../notation/measured.ts";
import { unitText } from "../notation/unit-text.ts";

export function sizeText(size: number, unit: string): string {
  const text = measuredText(Number(size.toPrecision(2)), 0, "");
  return `${text}${unit === "" ? "" : unitText(unit, "unicode")}`;
}

/**
 * Every bracket counts in the last digit shown; the largest error has two digits.
 * @example resultText(1.2341, [0.012, 0.005], "fm") // "1.234(12)(5) fm"
 * @example resultText(null, [0.3, 0.4], "") // "± 0.3 ± 0.4"
 */
export function resultText(value: number | null, errors: readonly number[], unit: string): string {
  const after = unit === "" ? "" : unitText(unit, "unicode");
  if (value === null) return errors.map((error) => `± ${sizeText(error, "")}`).join(" ") + after;
  const largest = Math.max(...errors);
  if (!(largest > 0)) return `${measuredText(value, 0, "")}${"(0)".repeat(errors.length)}${after}`;
  // Two digits of the largest, but none that an error of 95 to 99 would need three for.
  const places = 1 - Math.floor(Math.log10(Number(largest.toPrecision(2))));
  const step = 10 ** -places;
  if (places <= 0) {
    const whole = (size: number) => String(Math.round(size / step) * step);
    return `${whole(value).replace("-", "−")}${errors.map((error) => `(${whole(error)})`).join("")}${after}`;
  }
  if (places > 12) return `${measuredText(value, largest, "")}${after}`;
  const digits = errors.map((error) => `(${Math.round(error / step)})`).join("");
  return `${value.toFixed(places).replace("-", "−")}${digits}${after}`;
}
