import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const errorBudgetParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./error-budget-form.tsx")).ErrorBudgetForm })),
  Result: forKind(
    lazy(async () => ({ default: (await import("./error-budget-result.tsx")).ErrorBudgetResult })),
  ),
};
