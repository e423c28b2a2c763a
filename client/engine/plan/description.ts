/** What the Order plan block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { orderPlanShape } from "./inputs.ts";

export const orderPlanDescription: BlockDescription<typeof orderPlanShape> = {
  kind: "orderPlan",
  title: "Order plan",
  purpose: "The order to stop at for a target accuracy: what it contains, and the first term left out.",
  shape: orderPlanShape,
  premises: "required",
};
