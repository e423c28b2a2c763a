import type { Evaluation } from "../evaluation.ts";
import type { PremisesInputs } from "./inputs.ts";
import { readTheory } from "./read-theory.ts";
import type { PremisesValue } from "./value.ts";

export function evaluatePremises(inputs: PremisesInputs): Evaluation<PremisesValue> {
  const theory = readTheory(inputs);
  return { value: null, problems: theory.problems, notices: [], scalars: [], working: [] };
}
