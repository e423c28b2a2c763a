/** Units of a budget: energies and lengths are converted; any other unit is itself only. */
import type { Rational } from "../exact/rational.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { unitNamed } from "../notation/units.ts";

export type BudgetUnit =
  | { readonly known: false; readonly text: string }
  | {
      readonly known: true;
      readonly text: string;
      /** Power of energy. */
      readonly energy: Rational;
      /** One of it in GeV to that power. */
      readonly size: number;
      /** Energies or lengths, as written: they agree only by ħ = c = 1. */
      readonly family: "energy" | "length" | "mixed";
    };

const nothing = { symbols: [], lookUp: () => null };

/** @example readUnit("fm").known // true */
export function readUnit(text: string): BudgetUnit {
  const trimmed = text.trim();
  if (trimmed === "") return { known: false, text: "" };
  const reading = readQuantity(`1 ${trimmed}`, nothing, "unit");
  if (!reading.ok) return { known: false, text: trimmed };
  const { quantity } = reading.value;
  if (quantity.units.size === 0) return { known: false, text: trimmed };
  const families = new Set([...quantity.units.keys()].map((name) => unitNamed(name)?.energy ?? 0));
  return {
    known: true,
    text: trimmed,
    energy: quantity.energy,
    size: quantity.value,
    family: families.size > 1 ? "mixed" : families.has(1) ? "energy" : "length",
  };
}

/** What a number in one unit is in another, or why it is nothing. */
export function convert(
  value: number,
  from: BudgetUnit,
  to: BudgetUnit,
  natural: boolean,
): { readonly ok: true; readonly value: number } | { readonly ok: false; readonly code: string } {
  if (from.text === to.text) return { ok: true, value };
  if (!from.known || !to.known) return { ok: false, code: "budget-units-differ" };
  if (!from.energy.equals(to.energy)) return { ok: false, code: "budget-units-differ" };
  if (!natural && (from.family !== to.family || from.family === "mixed"))
    return { ok: false, code: "budget-needs-conversion" };
  return { ok: true, value: (value * from.size) / to.size };
}
