/** Reads typed premises into a theory. Rows that cannot be read become problems; the rest still computes. */
import type { DeclaredField, Vocabulary } from "../notation/vocabulary.ts";
import type { PremisesInputs } from "./inputs.ts";
import { exactConstants, fieldSymbols, readFields } from "./read-fields.ts";
import { readScales, type ScalesReading } from "./read-scales.ts";
import { readSpacetime } from "./read-spacetime.ts";
import { readSymmetries } from "./read-symmetries.ts";
import { readTerms } from "./read-terms.ts";
import type { Theory } from "./theory.ts";

/**
 * The theory that premises state. Pure and total.
 * @example readTheory({ d: "4", …, terms: [{ id: "t1", term: "lambda/4! phi^4", … }] }).terms[0]?.coefficient // 0
 */
export function readTheory(inputs: PremisesInputs): Theory {
  return readPremises(inputs).theory;
}

/** The theory with what only the Premises block itself shows: the expressions behind its scales. */
export function readPremises(inputs: PremisesInputs): {
  readonly theory: Theory;
  readonly expressions: ScalesReading["expressions"];
} {
  const { spacetime, measure, symbols, problems: spacetimeProblems } = readSpacetime(inputs);
  const symmetries = readSymmetries(inputs.symmetries);
  const scales = readScales(inputs.scales, fieldSymbols(inputs.fields, symbols), symbols);
  const numbers = scales.declared.symbols.map((symbol) => {
    const quantity = scales.declared.lookUp(symbol);
    const usable =
      quantity && !("code" in quantity) && quantity.energy.sign() === 0 && quantity.spread.size === 0;
    return { symbol, exact: usable ? quantity.exact : null };
  });
  const fields = readFields(
    inputs.fields,
    spacetime,
    symmetries.symmetries,
    exactConstants(numbers, symbols),
    symbols,
  );
  const vocabulary: Vocabulary = {
    geometry: spacetime.geometry,
    fields: new Map<string, DeclaredField>([
      ...fields.inError.map((symbol): [string, DeclaredField] => [
        symbol,
        { selfConjugate: true, inError: true, strength: false },
      ]),
      ...fields.fields.map(({ symbol, selfConjugate, kind }): [string, DeclaredField] => [
        symbol,
        { selfConjugate, inError: false, strength: kind === "field strength" },
      ]),
    ]),
    scales: new Set(scales.declared.symbols),
  };
  const terms = readTerms(inputs.terms, {
    spacetime,
    measure,
    symmetries: symmetries.symmetries,
    fields: fields.fields,
    vocabulary,
    declared: scales.declared,
  });
  const theory: Theory = {
    name: inputs.name,
    spacetime,
    measure,
    symmetries: symmetries.symmetries,
    fields: fields.fields,
    scales: scales.scales,
    terms: terms.terms,
    problems: [
      spacetimeProblems,
      symmetries.problems,
      fields.problems,
      scales.problems,
      terms.problems,
    ].flat(),
  };
  return { theory, expressions: scales.expressions };
}
