/** Evaluates premises: the theory as understood, with cautions, scalars and working. */
import { roundFloat, type Evaluation } from "../evaluation.ts";
import { shown } from "../exact/shown.ts";
import type { PremisesInputs } from "./inputs.ts";
import { presentEstimate, presentMeasured } from "./present-measured.ts";
import { premisesNotices } from "./notices.ts";
import { readPremises } from "./read-theory.ts";
import { forbidding } from "./read-terms.ts";
import { groupText } from "./read-symmetries.ts";
import { premisesScalars } from "./scalars.ts";
import type { Theory } from "./theory.ts";
import type { PremisesValue } from "./value.ts";
import { premisesWorking, spacetimeLatex } from "./working.ts";

export function evaluatePremises(inputs: PremisesInputs): Evaluation<PremisesValue> {
  const { theory, expressions } = readPremises(inputs);
  return {
    value: presentTheory(theory),
    problems: theory.problems,
    notices: premisesNotices(theory),
    scalars: premisesScalars(theory),
    working: premisesWorking(theory, expressions),
  };
}

function presentTheory(theory: Theory): PremisesValue {
  return {
    geometry: theory.spacetime.geometry,
    spacetimeLatex: spacetimeLatex(theory),
    measure: shown(theory.measure),
    symmetries: theory.symmetries.map((symmetry) => ({
      rowId: symmetry.rowId,
      name: symmetry.name,
      group: groupText(symmetry),
    })),
    fields: theory.fields.map((field) => ({
      rowId: field.rowId,
      symbol: field.symbol,
      latex: field.latex,
      kind: field.kind,
      statistics: field.statistics,
      dimension: shown(field.dimension),
      weight: shown(field.weight),
      overridden: field.overridden,
      charges: field.charges.map(String),
    })),
    scales: theory.scales.map(({ rowId, symbol, latex, role, value, sigma, unit }) => ({
      rowId,
      symbol,
      latex,
      role,
      size: value === null ? null : presentMeasured(value, sigma, unit),
    })),
    terms: theory.terms.map((term) => ({
      rowId: term.rowId,
      latex: term.latex,
      dimension: shown(term.dimension),
      coefficient: shown(term.coefficient),
      ultravioletCoefficient: shown(term.ultravioletCoefficient),
      kinetic: term.kinetic,
      allowed: term.allowed,
      forbiddenBy: forbidding(term.monomial, theory.fields, theory.symmetries).map(({ name }) => name),
      natural: Number.isNaN(term.natural) ? null : roundFloat(term.natural),
      assigned:
        term.assigned === null || Number.isNaN(term.assigned.value)
          ? null
          : presentEstimate(term.assigned.value, term.assigned.sigma),
    })),
  };
}
