import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const countingRulesParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./counting-rules-form.tsx")).CountingRulesForm })),
  Result: forKind(
    lazy(async () => ({ default: (await import("./counting-rules-result.tsx")).CountingRulesResult })),
  ),
};
