/** How many independent operators there are at each order, from a Basis count. */
import { operatorsAt, type BasisValue } from "../basis/value.ts";
import type { Notice } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import type { OrderPlanValue } from "./value.ts";

/** Order n of Q = p/Λ is where operators of mass dimension d + n enter. Without a count, the value as it was. */
export function withOperators(
  value: OrderPlanValue,
  basisId: string,
  theory: Theory,
  context: EvaluationContext,
): { readonly value: OrderPlanValue; readonly notices: readonly Notice[] } {
  const source = basisId === "" ? null : context.source(basisId);
  if (!source) return { value, notices: [] };
  const count = source.value as BasisValue; // the evaluator allows no other kind here
  const { spacetime } = theory;
  const d = spacetime.geometry === "isotropic" ? spacetime.d.asRational() : null;
  if (!d?.equals(Rational.of(count.d)))
    return {
      value,
      notices: [{ code: "plan-basis-other-dimension", path: ["basis"], facts: { d: count.d } }],
    };
  const orders = value.orders.map((order) => {
    const power = Rational.parse(order.order[0]?.text ?? "");
    return { ...order, operators: power ? operatorsAt(count, d.plus(power).toString()) : null };
  });
  return { value: { ...value, orders }, notices: [] };
}
