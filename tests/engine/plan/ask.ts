/** Asks an Order plan, in the fewest words. */
import { evaluateOrderPlan } from "#engine/plan/evaluate.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { orderPlanShape, type OrderPlanInputs } from "#engine/plan/inputs.ts";
import { aloneContext } from "#engine/kind.ts";
import type { OrderPlanValue } from "#engine/plan/value.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";

export function askPlan(
  theory: Theory | null,
  given: Partial<OrderPlanInputs> = {},
): Evaluation<OrderPlanValue> {
  return evaluateOrderPlan(schemaOf(orderPlanShape).parse(given), theory, aloneContext);
}

export function planOf(theory: Theory, given: Partial<OrderPlanInputs> = {}): OrderPlanValue {
  const { value, problems } = askPlan(theory, given);
  if (!value) throw new Error(`refused: ${problems.map(({ code }) => code).join(", ")}`);
  return value;
}

export function orderOf(theory: Theory, given: Partial<OrderPlanInputs> = {}): string | null {
  return planOf(theory, given).order?.text ?? null;
}

export function codesOf(theory: Theory | null, given: Partial<OrderPlanInputs> = {}): string[] {
  return askPlan(theory, given).problems.map(({ code }) => code);
}

/** What is left out at each order: { "0": { listed, unlisted }, … }. */
export function leftOutByOrder(theory: Theory, given: Partial<OrderPlanInputs> = {}) {
  return Object.fromEntries(
    planOf(theory, given).orders.map(({ order, leftOut }) => [order[0]?.text ?? "", leftOut]),
  );
}
