import { forKind, type BlockParts } from "../block-parts.ts";
import { OrderPlanForm } from "./order-plan-form.tsx";
import { OrderPlanPlot } from "./order-plan-plot.tsx";
import { OrderPlanResult } from "./order-plan-result.tsx";

export const orderPlanParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: OrderPlanForm,
  Result: forKind(OrderPlanResult),
  Plot: forKind(OrderPlanPlot),
};
