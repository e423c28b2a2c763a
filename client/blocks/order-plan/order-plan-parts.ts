import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";
import { OrderPlanForm } from "./order-plan-form.tsx";
import { OrderPlanResult } from "./order-plan-result.tsx";

export const orderPlanParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: OrderPlanForm,
  Result: forKind(OrderPlanResult),
  Plot: forKind(lazy(async () => ({ default: (await import("./order-plan-plot.tsx")).OrderPlanPlot }))),
};
