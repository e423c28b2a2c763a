/** Dimensions of spacetime: numbers, fractions, or left symbolic. */
import { LinearForm, type DimensionSymbol } from "../exact/linear-form.ts";
import type { Problem } from "../evaluation.ts";
import { readLinearForm } from "../notation/read-linear-form.ts";
import type { PremisesInputs } from "./inputs.ts";
import type { Spacetime } from "./theory.ts";

export interface SpacetimeReading {
  readonly spacetime: Spacetime;
  readonly measure: LinearForm;
  readonly problems: readonly Problem[];
  /** What d, or D and z, stand for in typed dimensions. */
  readonly symbols: ReadonlyMap<string, LinearForm>;
}

/** Problems: `dimension-unreadable`, `dimension-not-positive`. What is unreadable stays symbolic, which claims nothing. */
export function readSpacetime(inputs: PremisesInputs): SpacetimeReading {
  const problems: Problem[] = [];
  const readOne = (symbol: DimensionSymbol): LinearForm => {
    const text = inputs[symbol].trim();
    const free = LinearForm.symbol(symbol);
    if (text === symbol) return free;
    const form = readLinearForm(text, new Map());
    const value = form.ok ? form.value.asRational() : null;
    if (!value) problems.push({ code: "dimension-unreadable", path: [symbol], facts: { symbol, text } });
    else if (value.sign() <= 0)
      problems.push({ code: "dimension-not-positive", path: [symbol], facts: { symbol, text } });
    else return LinearForm.constant(value);
    return free;
  };
  if (inputs.geometry === "anisotropic") {
    const [D, z] = [readOne("D"), readOne("z")];
    const symbols = new Map(Object.entries({ D, z }));
    return { spacetime: { geometry: "anisotropic", D, z }, measure: D.plus(z), problems, symbols };
  }
  const d = readOne("d");
  return { spacetime: { geometry: "isotropic", d }, measure: d, problems, symbols: new Map([["d", d]]) };
}
