/** The Order plan block: how far to expand for a target accuracy. */
import { roundFloat, type Evaluation, type Problem } from "../evaluation.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import type { CountingValue } from "../counting/value.ts";
import { planLattice } from "./lattice.ts";
import { withOperators } from "./operators.ts";
import { planCautions } from "./cautions.ts";
import { corrections, rateEntries } from "./entries.ts";
import { describePlan } from "./describe.ts";
import type { OrderPlanInputs } from "./inputs.ts";
import { readSettings, type PlanSettings } from "./read-inputs.ts";
import { readScales, type PlanScales } from "./read-scales.ts";
import { sumPowers, workingPoint } from "./powers.ts";
import { planScalars } from "./scalars.ts";
import { allowedOrders, stepOfOrders } from "./allowed-orders.ts";
import { Rational } from "../exact/rational.ts";
import { distinctOrders, leftOutAt, orderFor, type Expansion } from "./sums.ts";
import { planTerms, type PlanTerm } from "./terms.ts";
import type { OrderPlanValue } from "./value.ts";
import { explainPlan } from "./working.ts";

/** Past this many products counting would take seconds: a lower cap is asked for instead. */
const MOST_ENTRIES = 20_000;
/** Below this 1/Q, the end of every curve, leaves the range of a double. */
const SMALLEST_Q = 1e-300;

/**
 * The order to stop at for a target accuracy, in one expansion parameter Q = p/Λ. Problems beside a value: a relevant
 * term without a size, which is left out, and a target that the listed terms do not reach.
 */
export function evaluateOrderPlan(
  inputs: OrderPlanInputs,
  theory: Theory | null,
  context: EvaluationContext,
): Evaluation<OrderPlanValue> {
  const refuse = (problems: readonly Problem[]): Evaluation<OrderPlanValue> => ({
    value: null,
    problems,
    notices: [],
    scalars: [],
    working: [],
  });
  const problem = (code: string, path: Problem["path"] = [], facts: Problem["facts"] = {}): Problem => ({
    code,
    path,
    facts,
  });
  if (theory === null) return refuse([problem("premises-missing", ["standsOn"])]);
  const problems: Problem[] = [];
  const settings = readSettings(inputs, problems);
  const scales = readScales(inputs, theory, problems);
  const read = planTerms(theory, scales?.Q ?? 1);
  if (!read) problems.push(problem("plan-dimension-symbolic"));
  if (scales && scales.Q >= 1)
    problems.push(problem("plan-q-not-below-one", ["probe"], { Q: Number(scales.Q.toPrecision(4)) }));
  if (scales && scales.Q < SMALLEST_Q)
    problems.push(problem("plan-q-too-small", ["probe"], { Q: scales.Q, least: SMALLEST_Q }));
  if (!scales || !read || problems.length > 0) return refuse(problems);

  const expansion = expand(inputs, settings, scales, read.terms, theory);
  if (!expansion) return refuse([problem("plan-too-large", ["insertions"], { most: MOST_ENTRIES })]);
  const order = orderFor(expansion, workingPoint);
  const described = describePlan(expansion, order, read.terms, scales, theory);
  const counting = inputs.counting === "" ? null : context.source(inputs.counting);
  const lattice = counting
    ? // the evaluator allows no other kind here
      {
        lattice: planLattice(counting.value as CountingValue, settings.insertions, settings.target, {
          probe: scales.probe.sigma / scales.probe.value,
          heavy: scales.heavy.sigma / scales.heavy.value,
        }),
      }
    : {};
  const { value, notices } = withOperators({ ...described, ...lattice }, inputs.basis, theory, context);
  const missed = leftOutAt(expansion, expansion.orders.at(-1) ?? Rational.zero, workingPoint);
  const unreached = order
    ? []
    : [
        problem("plan-target-unreached", ["target"], {
          target: settings.target,
          leftOut: roundFloat(Number(missed.used.toPrecision(3))),
          next: value.firstUnlisted.order.text,
        }),
      ];
  return {
    value,
    problems: [...read.problems, ...unreached],
    notices: [
      ...notices,
      ...incompletePremises(theory),
      ...planCautions(expansion, order, read.terms, scales, theory),
    ],
    scalars: planScalars(value),
    working: explainPlan(value, read.terms, theory),
  };
}

function expand(
  inputs: OrderPlanInputs,
  settings: PlanSettings,
  scales: PlanScales,
  terms: readonly PlanTerm[],
  theory: Theory,
): Expansion | null {
  const amplitude = corrections(terms, settings.insertions, settings.cap, MOST_ENTRIES);
  // The shape's choices are exactly these; the schema refuses anything else.
  const observable = inputs.observable as Expansion["observable"];
  const sumUsed = inputs.unlisted as Expansion["sumUsed"];
  if (!amplitude) return null;
  const entries =
    observable === "amplitude"
      ? amplitude
      : rateEntries(amplitude, observable === "rate with interference", settings.cap, MOST_ENTRIES);
  if (!entries) return null;
  const allowed = allowedOrders(theory) ?? [];
  const listed = terms.map(({ order }) => order).filter((order) => order.compare(settings.cap) <= 0);
  return {
    Q: scales.Q,
    amplitude: sumPowers(amplitude, scales.Q),
    entries,
    powers: sumPowers(entries, scales.Q),
    orders: distinctOrders(entries),
    observable,
    sumUsed,
    highestListed: listed.reduce(
      (highest, order) => (order.compare(highest) > 0 ? order : highest),
      Rational.zero,
    ),
    allowed,
    step: stepOfOrders(allowed) ?? Rational.one,
    target: settings.target,
  };
}
