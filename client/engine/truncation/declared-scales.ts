/** The scales of the premises as names that an expression may use. */
import { Rational } from "../exact/rational.ts";
import { number, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import type { Scale, Theory } from "../premises/theory.ts";

const nothing: Declared = { lookUp: () => null, symbols: [] };

/**
 * Scales keep the sources of their uncertainty, so that two made of a third move together.
 * Without a theory no name is declared. `lookUp` fails with `scale-has-no-number`.
 */
export function declaredScales(theory: Theory | null): Declared {
  const scales = theory?.scales ?? [];
  return {
    symbols: scales.map(({ symbol }) => symbol),
    lookUp: (symbol) => {
      const scale = scales.find((candidate) => candidate.symbol === symbol);
      if (!scale) return null;
      return quantityOf(scale) ?? { code: "scale-has-no-number", facts: { symbol } };
    },
  };
}

function quantityOf({ rowId, value, sigma, unit, spread }: Scale): Quantity | null {
  if (value === null) return null;
  const one = unit === "" ? number(Rational.one) : unitQuantity(unit);
  if (!one) return null;
  const sources = Object.entries(spread ?? (sigma > 0 ? { [rowId]: sigma } : {}));
  const inGeV = new Map(sources.map(([source, share]) => [source, share * one.value]));
  return { ...one, value: value * one.value, exact: null, spread: inGeV };
}

/** "fm^-1" as a quantity: the size of one of it. */
function unitQuantity(unit: string): Quantity | null {
  const read = readQuantity(unit, nothing, "unit");
  return read.ok ? read.value.quantity : null;
}
