/** Values with uncertainty as people write them: "0.109(14)", "3.2(4) TeV". */
import { floatText } from "./float-text.ts";

/** Digits that tell an exact value apart from its neighbours in ordinary use: "91.1876", "350". */
const MOST_DIGITS = 8;

/**
 * Two digits of uncertainty, one where one says it all: 0.4 is "(4)". Without uncertainty, the digits that
 * matter, `most` of them.
 * @example measuredText(3.2, 0.4, "TeV") // "3.2(4) TeV"
 * @example measuredText(0.109375, 0.01367, "") // "0.109(14)"
 */
export function measuredText(value: number, sigma: number, unit: string, most = MOST_DIGITS): string {
  const digits = digitsFor(value, sigma, most);
  const text = floatText(value, sigma, { digits, style: "auto", markup: "unicode" });
  return unit === "" ? text : `${text} ${unit}`;
}

function digitsFor(value: number, sigma: number, most: number): number | null {
  if (!(sigma > 0)) return digitsThatMatter(value, most);
  return Number(sigma.toPrecision(1)) === Number(sigma.toPrecision(6)) ? 1 : null;
}

function digitsThatMatter(value: number, most: number): number {
  const mantissa = value.toPrecision(most).replace(/[eE].*$/, "");
  const digits = mantissa.replace(/[-.]/g, "").replace(/^0+/, "").replace(/0+$/, "");
  const whole = /^-?(\d+)/.exec(mantissa)?.[1]?.replace(/^0+/, "").length ?? 0;
  // 350 needs its zero shown as a digit, or it would turn into a power of ten.
  return Math.max(1, digits.length, Math.min(whole, most));
}

/** The same as LaTeX: "3.2(4)\,\mathrm{TeV}". */
export function measuredLatex(value: number, sigma: number, unit: string, most = MOST_DIGITS): string {
  const text = floatText(value, sigma, {
    digits: digitsFor(value, sigma, most),
    style: "auto",
    markup: "latex",
  });
  return unit === "" ? text : `${text}\\,${unitLatex(unit)}`;
}
function unitLatex(unit: string): string {
  const [, name = unit, power = ""] = /^([A-Za-z]+)(?:\^\(?([^)]+)\)?)?$/.exec(unit) ?? [];
  return `\\mathrm{${name}}${power === "" ? "" : `^{${power}}`}`;
}
