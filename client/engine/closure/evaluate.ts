/** The Closure block: what renormalisation demands of the premises, up to an order in 1/Λ. */
import { incompletePremises } from "../premises/incomplete.ts";
import type { Evaluation, Notice, Problem } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import { close, type Closure } from "./close.ts";
import { describeClosure } from "./describe.ts";
import { frameOf } from "./frame.ts";
import type { ClosureInputs } from "./inputs.ts";
import { readSettings } from "./read-settings.ts";
import { closureScalars } from "./scalars.ts";
import type { ClosureValue } from "./value.ts";
import { explainClosure } from "./working.ts";

/**
 * The operators that graphs of the premises' terms demand as counterterms, and those that these demand in turn, until
 * nothing new comes: by order in 1/Λ, each with the insertions and a graph that demand it.
 *
 * Problems without a value: `premises-missing`, those of the settings, `closure-needs-numbers`, `closure-too-large`;
 * beside a value: `closure-term-forbidden`, `closure-term-breaks-shift` (the term is left out).
 * @example λφ⁴ and c φ⁶/Λ² in d = 4 to order 4: φ⁸ is missing, demanded at order 4 by two φ⁶ in one loop
 */
export function evaluateClosure(
  inputs: ClosureInputs,
  theory: Theory | null,
  context: EvaluationContext,
): Evaluation<ClosureValue> {
  const refuse = (problems: readonly Problem[]): Evaluation<ClosureValue> => ({
    value: null,
    problems,
    notices: [],
    scalars: [],
    working: [],
  });
  if (theory === null) return refuse([{ code: "premises-missing", path: ["standsOn"], facts: {} }]);
  const problems: Problem[] = [];
  const settings = readSettings(inputs, theory, problems);
  if (problems.length > 0) return refuse(problems);
  const frame = frameOf(theory, settings, problems);
  if (!frame) return refuse([{ code: "closure-needs-numbers", path: ["standsOn"], facts: {} }]);
  const closure = close(frame, context);
  if (!closure)
    return refuse([
      {
        code: "closure-too-large",
        path: ["maxOrder"],
        facts: { loops: settings.loops, legs: frame.mostLegs, order: settings.order.toString() },
      },
    ]);
  const value = describeClosure(closure, frame);
  return {
    value,
    problems,
    notices: [...incompletePremises(theory), ...noticesOf(value, closure)],
    scalars: closureScalars(value),
    working: explainClosure(value, theory),
  };
}

function noticesOf(value: ClosureValue, { undecided }: Closure): Notice[] {
  const notice = (code: string, facts: Notice["facts"] = {}): Notice => ({ code, path: [], facts });
  return [
    ...(value.legsBeyond === null
      ? []
      : [notice("closure-legs-cut", { most: value.legsBeyond, legs: value.caps.legs })]),
    ...(undecided > 0 ? [notice("closure-undecided", { count: undecided })] : []),
    ...(value.operators.length > 0 ? [notice("omega-not-sufficient")] : []),
    ...(value.operators.some(({ gauge }) => gauge === "restricted") ? [notice("omega-gauge")] : []),
  ];
}
