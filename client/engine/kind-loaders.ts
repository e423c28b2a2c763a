/** The block kinds of this version, each fetched when it is first needed: for the page's workers. See `kinds.ts`. */
import type { BlockKind, KindName } from "./kind.ts";

export const kindLoaders: Readonly<Record<KindName, () => Promise<BlockKind>>> = {
  premises: async () => (await import("./premises/kind.ts")).premises,
  scaling: async () => (await import("./scaling/kind.ts")).scaling,
  countingRules: async () => (await import("./counting/kind.ts")).countingRules,
  divergence: async () => (await import("./divergence/kind.ts")).divergence,
  closure: async () => (await import("./closure/kind.ts")).closure,
  orderPlan: async () => (await import("./plan/kind.ts")).orderPlan,
  data: async () => (await import("./data/kind.ts")).data,
  errorBudget: async () => (await import("./budget/kind.ts")).errorBudget,
  running: async () => (await import("./running/kind.ts")).running,
  basisCount: async () => (await import("./basis/kind.ts")).basisCount,
  truncationError: async () => (await import("./truncation/kind.ts")).truncationError,
};
