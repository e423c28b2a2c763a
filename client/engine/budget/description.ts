/** What the Error budget block is and takes, without its computation. */
import type { BlockDescription } from "../kind.ts";
import { budgetShape } from "./inputs.ts";

export const errorBudgetDescription: BlockDescription<typeof budgetShape> = {
  kind: "errorBudget",
  title: "Error budget",
  purpose: "Add up what makes a value uncertain, with correlations and units, into one result.",
  shape: budgetShape,
  premises: "none",
};
