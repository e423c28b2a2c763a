import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const closureParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./closure-form.tsx")).ClosureForm })),
  Result: forKind(lazy(async () => ({ default: (await import("./closure-result.tsx")).ClosureResult }))),
};
