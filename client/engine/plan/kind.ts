/** The Order plan block as the rest of the house sees it. */
import type { BlockKind } from "../kind.ts";
import { evaluateOrderPlan } from "./evaluate.ts";
import { orderPlanDescription } from "./description.ts";
import type { orderPlanShape } from "./inputs.ts";
import type { OrderPlanValue } from "./value.ts";

export const orderPlan: BlockKind<typeof orderPlanShape, OrderPlanValue> = {
  ...orderPlanDescription,
  evaluate: evaluateOrderPlan,
};
