import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const runningParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./running-form.tsx")).RunningForm })),
  Result: forKind(lazy(async () => ({ default: (await import("./running-result.tsx")).RunningResult }))),
  Plot: forKind(lazy(async () => ({ default: (await import("./running-plot.tsx")).RunningPlot }))),
};
