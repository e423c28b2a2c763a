/** A value with one bracket for each kind of error, as papers print it. */
import { superscript } from "../notation/float-text.ts";
import { measuredText } from "../notation/measured.ts";
import { unitText } from "../notation/unit-text.ts";

/** Digits given to a small error beside a large one, beyond the two of the large one. */
const MOST_EXTRA_DIGITS = 3;
/** Beyond these, digits of a plain decimal are hard to count. */
const MOST_PLACES = 12;
const MOST_WHOLE_DIGITS = 15;

export function sizeText(size: number, unit: string): string {
  const text = measuredText(Number(size.toPrecision(2)), 0, "");
  return `${text}${unit === "" ? "" : unitText(unit, "unicode")}`;
}

/**
 * Every bracket counts in the last digit shown. The largest error has two digits, more where a smaller one would
 * vanish; one that still does is "(<1)", since (0) would say that there is none.
 * @example resultText(1.2341, [0.012, 0.005], "fm") // "1.234(12)(5) fm"
 * @example resultText(1.23, [0.5, 0.002], "") // "1.230(500)(2)"
 * @example resultText(null, [0.3, 0.4], "") // "± 0.3 ± 0.4"
 */
export function resultText(value: number | null, errors: readonly number[], unit: string): string {
  const after = unit === "" ? "" : unitText(unit, "unicode");
  if (value === null) return errors.map((error) => `± ${sizeText(error, "")}`).join(" ") + after;
  const sizes = errors.filter((error) => error > 0);
  if (sizes.length === 0) return `${measuredText(value, 0, "")}${"(0)".repeat(errors.length)}${after}`;
  const place = lastPlace(sizes);
  const first = exponentOf(Math.max(Math.abs(value), ...sizes), 12);
  const written =
    -place > MOST_PLACES || first >= MOST_WHOLE_DIGITS
      ? scientific(value, errors, place, first)
      : plain(value, errors, place);
  return written.replace("-", "−") + after;
}

/** The power of ten of the last digit shown. */
function lastPlace(sizes: readonly number[]): number {
  const ofLargest = exponentOf(Math.max(...sizes), 2) - 1;
  const ofSmallest = exponentOf(Math.min(...sizes), 1);
  return Math.max(Math.min(ofLargest, ofSmallest), ofLargest - MOST_EXTRA_DIGITS);
}

/** The power of ten of the first of `digits` digits: 0.0996 at two digits is 0.10, so -1. */
function exponentOf(size: number, digits: number): number {
  return Number(size.toExponential(digits - 1).split("e")[1]);
}

/** "12350(560)" above the decimal point, "1.234(12)" below it. */
function plain(value: number, errors: readonly number[], place: number): string {
  const zeros = "0".repeat(Math.max(0, place));
  const whole = (count: number) => (count === 0 ? "0" : `${count}${zeros}`);
  const start = place > 0 ? whole(counted(value, place)) : value.toFixed(-place);
  return start + errors.map((error) => bracket(error, place, zeros)).join("");
}

/** "2.20(40)(1) × 10⁻²⁰". */
function scientific(value: number, errors: readonly number[], place: number, first: number): string {
  const start = (value / Number(`1e${first}`)).toFixed(Math.max(0, first - place));
  const brackets = errors.map((error) => bracket(error, place, "")).join("");
  return `${start}${brackets} × 10${superscript(String(first))}`;
}

function bracket(error: number, place: number, zeros: string): string {
  const count = counted(error, place);
  if (count === 0) return error > 0 ? `(<1${zeros})` : "(0)";
  return `(${count}${zeros})`;
}

function counted(size: number, place: number): number {
  return Math.round(size / Number(`1e${place}`));
}
