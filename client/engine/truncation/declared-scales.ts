/** The scales of the premises as names that an expression may use. */
import { Rational } from "../exact/rational.ts";
import { number, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import type { Scale, Theory } from "../premises/theory.ts";

const nothing: Declared = { lookUp: () => null, symbols: [] };

/** Each scale is an independent source of uncertainty, named by its row. Without a theory no name is declared. */
export function declaredScales(theory: Theory | null): Declared {
  const scales = theory?.scales ?? [];
  return {
    symbols: scales.map(({ symbol }) => symbol),
    lookUp: (symbol) => {
      const scale = scales.find((candidate) => candidate.symbol === symbol);
      if (!scale) return null;
      return quantityOf(scale) ?? { code: "scale-without-number", facts: { symbol } };
    },
  };
}

function quantityOf({ rowId, value, sigma, unit }: Scale): Quantity | null {
  if (value === null) return null;
  const one = unit === "" ? number(Rational.one) : unitQuantity(unit);
  if (!one) return null;
  const spread: ReadonlyMap<string, number> = sigma > 0 ? new Map([[rowId, sigma * one.value]]) : new Map();
  return { ...one, value: value * one.value, exact: null, spread };
}

/** "fm^-1" as a quantity: the size of one of it. */
function unitQuantity(unit: string): Quantity | null {
  const read = readQuantity(unit, nothing, "unit");
  return read.ok ? read.value.quantity : null;
}
