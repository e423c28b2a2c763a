/** The Error budget block: what makes a value uncertain, and how much together. */
import type { BlockKind } from "../kind.ts";
import { errorBudgetDescription } from "./description.ts";
import { evaluateBudget } from "./evaluate.ts";
import type { budgetShape } from "./inputs.ts";
import type { BudgetValue } from "./value.ts";

export const errorBudget: BlockKind<typeof budgetShape, BudgetValue> = {
  ...errorBudgetDescription,
  evaluate: evaluateBudget,
};
