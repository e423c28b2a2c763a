/** Terms of the Lagrangian: monomial, dimensions, size, symmetry. */
import type { Problem } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { Monomial } from "../notation/monomial.ts";
import { shown, sigmaOf, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { readTerm } from "../notation/read-term.ts";
import type { Vocabulary } from "../notation/vocabulary.ts";
import type { TermRow } from "./inputs.ts";
import { placed } from "./problem.ts";
import { reduceCharge } from "./read-symmetries.ts";
import type { Field, Spacetime, Symmetry, Term } from "./theory.ts";

export interface TermContext {
  readonly spacetime: Spacetime;
  readonly measure: LinearForm;
  readonly symmetries: readonly Symmetry[];
  readonly fields: readonly Field[];
  readonly vocabulary: Vocabulary;
  readonly declared: Declared;
}

/**
 * Problems: those of the notation, `size-has-unit`, `size-not-positive`. A term that reads but whose size does not
 * keeps its place in the theory with size NaN: unknown, and never mistaken for 1.
 */
export function readTerms(
  rows: readonly TermRow[],
  context: TermContext,
): { readonly terms: readonly Term[]; readonly problems: readonly Problem[] } {
  const problems: Problem[] = [];
  const terms: Term[] = [];
  for (const row of rows) {
    if (row.term.trim() === "" && row.natural.trim() === "" && row.assigned.trim() === "") continue;
    const reading = readTerm(row.term, context.vocabulary);
    if (!reading.ok) {
      problems.push(placed(reading.failure, "terms", row.id, "term"));
      continue;
    }
    const size = (
      column: "natural" | "assigned",
    ): { readonly value: number; readonly sigma: number } | null => {
      if (row[column].trim() === "") return null;
      const quantity = readSize(row[column], context.declared, `${row.id}/${column}`);
      if (!("code" in quantity)) return { value: shown(quantity).value, sigma: sigmaOf(quantity) };
      problems.push(placed(quantity, "terms", row.id, column));
      return { value: NaN, sigma: NaN };
    };
    const { monomial, latex } = reading.value;
    terms.push({
      rowId: row.id,
      monomial,
      latex,
      ...dimensionsOf(monomial, context),
      natural: size("natural")?.value ?? 1,
      assigned: size("assigned"),
      kinetic: isKinetic(monomial, context),
      allowed: forbidding(monomial, context.fields, context.symmetries).length === 0,
    });
  }
  return { terms, problems };
}

function readSize(
  text: string,
  declared: Declared,
  source: string,
): Quantity | { readonly code: string; readonly facts: Problem["facts"] } {
  const reading = readQuantity(text, declared, source);
  if (!reading.ok) return reading.failure;
  const { quantity } = reading.value;
  if (quantity.energy.sign() !== 0)
    return { code: "size-has-unit", facts: { text, unit: shown(quantity).unit } };
  return quantity.value > 0 ? quantity : { code: "size-not-positive", facts: { text } };
}

/** Σ n_f w_f + k, each ∂ₜ counting z. */
export function weigh(
  monomial: Monomial,
  fields: readonly Field[],
  spacetime: Spacetime,
  weight: (field: Field) => LinearForm,
): LinearForm {
  const legs = monomial.fields.reduce((sum, { symbol, count }) => {
    const field = fields.find((one) => one.symbol === symbol);
    if (!field) throw new Error(`the monomial has a field that the theory has not: ${symbol}`);
    return sum.plus(weight(field).times(count));
  }, LinearForm.zero);
  return legs.plus(derivativeWeight(monomial, spacetime));
}
export function derivativeWeight(
  { derivatives, timeDerivatives }: Monomial,
  spacetime: Spacetime,
): LinearForm {
  const z = spacetime.geometry === "anisotropic" ? spacetime.z : LinearForm.constant(1);
  return LinearForm.constant(derivatives).plus(z.times(timeDerivatives));
}

function dimensionsOf(monomial: Monomial, { fields, spacetime, measure }: TermContext) {
  const dimension = weigh(monomial, fields, spacetime, (field) => field.dimension);
  const ultraviolet = weigh(monomial, fields, spacetime, (field) => field.weight);
  return {
    dimension,
    coefficient: measure.minus(dimension),
    ultravioletCoefficient: measure.minus(ultraviolet),
    derivativeWeight: derivativeWeight(monomial, spacetime),
  };
}

/** Two legs of one field, the one conjugate to the other where it has a conjugate, with a coefficient of dimension 0. */
function isKinetic(monomial: Monomial, context: TermContext): boolean {
  const [first, second] = monomial.fields;
  const legs = monomial.fields.reduce((sum, { count }) => sum + count, 0);
  if (!first || legs !== 2 || (second && second.symbol !== first.symbol)) return false;
  const field = context.fields.find(({ symbol }) => symbol === first.symbol);
  if (field && !field.selfConjugate && !second) return false;
  return dimensionsOf(monomial, context).coefficient.equals(LinearForm.zero);
}

/** The symmetries under which the term's charges do not add up to zero. */
export function forbidding(
  monomial: Monomial,
  fields: readonly Field[],
  symmetries: readonly Symmetry[],
): readonly Symmetry[] {
  return symmetries.filter(({ modulus }, index) => {
    const total = monomial.fields.reduce((sum, { symbol, conjugated, count }) => {
      const charge = fields.find((field) => field.symbol === symbol)?.charges[index] ?? Rational.zero;
      return sum.plus(charge.times(Rational.of(conjugated ? -count : count)));
    }, Rational.zero);
    return reduceCharge(total, modulus).sign() !== 0;
  });
}
