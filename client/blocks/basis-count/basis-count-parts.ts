import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const basisCountParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./basis-count-form.tsx")).BasisCountForm })),
  Result: forKind(
    lazy(async () => ({ default: (await import("./basis-count-result.tsx")).BasisCountResult })),
  ),
  Plot: forKind(lazy(async () => ({ default: (await import("./basis-count-plot.tsx")).BasisCountPlot }))),
};
