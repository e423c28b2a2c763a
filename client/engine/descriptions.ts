/** Every block kind by name, without its computation: for documents, forms and the index of what can be placed. */
import { basisCountDescription } from "./basis/description.ts";
import { errorBudgetDescription } from "./budget/description.ts";
import { closureDescription } from "./closure/description.ts";
import { countingDescription } from "./counting/description.ts";
import { dataDescription } from "./data/description.ts";
import { divergenceDescription } from "./divergence/description.ts";
import type { BlockDescription, KindName } from "./kind.ts";
import { orderPlanDescription } from "./plan/description.ts";
import { premisesDescription } from "./premises/description.ts";
import { runningDescription } from "./running/description.ts";
import { scalingDescription } from "./scaling/description.ts";
import { truncationErrorDescription } from "./truncation/description.ts";

export const kindDescriptions: Readonly<Record<KindName, BlockDescription>> = {
  premises: premisesDescription,
  scaling: scalingDescription,
  countingRules: countingDescription,
  divergence: divergenceDescription,
  closure: closureDescription,
  orderPlan: orderPlanDescription,
  truncationError: truncationErrorDescription,
  basisCount: basisCountDescription,
  data: dataDescription,
  errorBudget: errorBudgetDescription,
  running: runningDescription,
};
