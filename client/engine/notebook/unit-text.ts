/** Units as people read them: "fm^-1" becomes " fm⁻¹" after its number. */
import { superscript, type Markup } from "../notation/float-text.ts";

export function unitText(unit: string, markup: Markup): string {
  if (markup === "unicode") return ` ${unit.replace(/\^(-?\d+)/g, (_, power: string) => superscript(power))}`;
  const safe = unit.replace(/[\\{}$%#&_~]/g, "\\$&");
  return `\\,\\mathrm{${safe.replace(/\^(-?\d+)/g, "^{$1}")}}`;
}
