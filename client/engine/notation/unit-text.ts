/** Units as people read them: "fm^-1" becomes " fm⁻¹" after its number. */
import { superscript, type Markup } from "./float-text.ts";

/**
 * Any text is taken for a unit, since a person may type what the engine does not know; in LaTeX it stays text.
 * @example unitText("fm^-1", "latex") // "\\,\\mathrm{fm^{-1}}"
 */
export function unitText(unit: string, markup: Markup): string {
  if (markup === "unicode") return ` ${unit.replace(/\^(-?\d+)/g, (_, power: string) => superscript(power))}`;
  // A dollar sign would end the formula in the prose around it, so it goes with what has no sense in a unit.
  const safe = unit.replace(/\^(?!-?\d)|[\\~$]/g, "").replace(/[{}%#&_]/g, "\\$&");
  return `\\,\\mathrm{${safe.replace(/\^(-?\d+)/g, "^{$1}")}}`;
}
