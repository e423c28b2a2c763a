/** The block kinds of this version, by name. What they are without computing is in `descriptions.ts`. */
import { basisCount } from "./basis/kind.ts";
import { errorBudget } from "./budget/kind.ts";
import { closure } from "./closure/kind.ts";
import { countingRules } from "./counting/kind.ts";
import { data } from "./data/kind.ts";
import { divergence } from "./divergence/kind.ts";
import type { BlockKind, KindName } from "./kind.ts";
import { orderPlan } from "./plan/kind.ts";
import { premises } from "./premises/kind.ts";
import { running } from "./running/kind.ts";
import { scaling } from "./scaling/kind.ts";
import { truncationError } from "./truncation/kind.ts";

/**
 * Keyed by the name that documents and files use. Whoever picks a kind at run time checks its inputs against its
 * `shape` first: that makes them what its `evaluate` takes.
 */
export const kinds: Readonly<Record<KindName, BlockKind>> = {
  premises,
  scaling,
  countingRules,
  divergence,
  closure,
  orderPlan,
  truncationError,
  basisCount,
  data,
  errorBudget,
  running,
};
