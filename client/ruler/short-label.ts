/** A term in few letters: its coupling and its operator, without numerical factors and the powers of the heavy scale. */
import { plainLatex } from "../blocks/parts/plain-latex.ts";

/** Longer labels are cut: the whole term is spoken, and stands in the panel. */
const MOST_LETTERS = 18;

/** @example shortLabel("\\frac{c_{6}}{6!\\,\\Lambda^{2}}\\,\\chi^{6}") // "c₆ χ⁶" */
export function shortLabel(latex: string): string {
  const bare = plainLatex(numerators(latex).replace(/\\(left|right)/g, "")).replace(/(^|\s)1(?=\s)/g, " ");
  const text = bare.replace(/\s+/g, " ").trim();
  const letters = Array.from(text);
  return letters.length <= MOST_LETTERS ? text : `${letters.slice(0, MOST_LETTERS - 1).join("")}…`;
}

/** Every `\frac{a}{b}` becomes a, from the inside out. */
function numerators(latex: string): string {
  const group = "((?:[^{}]|\\{(?:[^{}]|\\{[^{}]*\\})*\\})*)";
  const fraction = new RegExp(`\\\\frac\\{${group}\\}\\{${group}\\}`);
  let text = latex;
  for (let found = fraction.exec(text); found; found = fraction.exec(text))
    text = `${text.slice(0, found.index)}${found[1] ?? ""} ${text.slice(found.index + found[0].length)}`;
  return text;
}

/** The note beside a label is set smaller than the label. */
export const NOTE_SCALE = 0.78;

/** Wide enough for the face in any browser; a label that is measured too wide only stands alone. In px at 13 px. */
export function labelWidth(text: string): number {
  let width = 0;
  for (const letter of text) {
    if (/[\s().,;!′]/.test(letter)) width += 4.5;
    else if (/[⁰¹²³⁴-⁹₀-₉⁺⁻ⁿ]/.test(letter)) width += 5.5;
    else if (/[\u0300-\u036f]/.test(letter)) width += 0;
    else if (/[mMwWΛΨΦΩ…×←]/.test(letter)) width += 11.5;
    else width += 8;
  }
  return width;
}
