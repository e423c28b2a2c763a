import type { Evaluation } from "../evaluation.ts";
import type { Theory } from "../premises/theory.ts";
import type { OrderPlanInputs } from "./inputs.ts";
import type { OrderPlanValue } from "./value.ts";

/** The whole block: inputs and theory to result. Without premises there is nothing to count. */
export function evaluateOrderPlan(_inputs: OrderPlanInputs, theory: Theory | null): Evaluation<OrderPlanValue> {
  const code = theory === null ? "premises-missing" : "plan-unavailable";
  return { value: null, problems: [{ code, path: [], facts: {} }], notices: [], scalars: [], working: [] };
}
