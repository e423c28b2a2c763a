/** The block kinds as the page draws them. Adding a kind is one line here and one in the engine. */
import type { KindName } from "#engine/kind.ts";
import type { BlockParts } from "./block-parts.ts";
import { basisCountParts } from "./basis-count/basis-count-parts.ts";
import { closureParts } from "./closure/closure-parts.ts";
import { countingRulesParts } from "./counting-rules/counting-rules-parts.ts";
import { dataParts } from "./data/data-parts.ts";
import { errorBudgetParts } from "./error-budget/error-budget-parts.ts";
import { divergenceParts } from "./divergence/divergence-parts.ts";
import { orderPlanParts } from "./order-plan/order-plan-parts.ts";
import { premisesParts } from "./premises/premises-parts.ts";
import { runningParts } from "./running/running-parts.ts";
import { scalingParts } from "./scaling/scaling-parts.ts";
import { truncationErrorParts } from "./truncation-error/truncation-error-parts.ts";

export const blockParts: Readonly<Record<KindName, BlockParts>> = {
  premises: premisesParts,
  scaling: scalingParts,
  countingRules: countingRulesParts,
  divergence: divergenceParts,
  closure: closureParts,
  orderPlan: orderPlanParts,
  truncationError: truncationErrorParts,
  basisCount: basisCountParts,
  data: dataParts,
  errorBudget: errorBudgetParts,
  running: runningParts,
};
