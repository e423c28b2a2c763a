/** A theory's scales for expressions in other blocks: "p/Lambda", "350 GeV", "max(p, m)/Lambda". */
import { Rational } from "../exact/rational.ts";
import { float, oneOf, power, times, type Quantity } from "../notation/quantity.ts";
import type { Declared } from "../notation/read-quantity.ts";
import type { Scale, Theory } from "./theory.ts";

/**
 * The quantity a scale stands for, or null without a number. Its uncertainty keeps the sources it was made of,
 * so that two scales that share one stay correlated.
 */
export function quantityOfScale(scale: Scale): Quantity | null {
  if (scale.value === null) return null;
  const unit = unitOf(scale.unit);
  const spread = Object.entries(scale.spread ?? (scale.sigma > 0 ? { [scale.rowId]: scale.sigma } : {}));
  const bare: Quantity = { ...float(scale.value), spread: new Map(spread) };
  return times(bare, unit);
}

/** "TeV", "fm^-1", "GeV^(1/2)", as `shown` of notation/quantity.ts writes them. */
function unitOf(text: string): Quantity {
  if (text === "") return float(1);
  const [, name = "", exponent = "1"] = /^([A-Za-z]+)(?:\^\(?([-\d/]+)\)?)?$/.exec(text) ?? [];
  const one = oneOf(name);
  const raised = one && power(one, Rational.parse(exponent) ?? Rational.one);
  if (!raised || "code" in raised) throw new Error(`a scale has a unit that no reader writes: ${text}`);
  return raised;
}

export function declaredScales(theory: Theory): Declared {
  return {
    symbols: theory.scales.map(({ symbol }) => symbol),
    lookUp: (symbol) => {
      const scale = theory.scales.find((one) => one.symbol === symbol);
      if (!scale) return null;
      return quantityOfScale(scale) ?? { code: "scale-has-no-number", facts: { symbol } };
    },
  };
}
