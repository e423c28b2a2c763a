import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";
import { TruncationErrorForm } from "./truncation-error-form.tsx";
import { TruncationErrorResult } from "./truncation-error-result.tsx";

export const truncationErrorParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: TruncationErrorForm,
  Result: forKind(TruncationErrorResult),
  Plot: forKind(lazy(async () => ({ default: (await import("./bands-plot.tsx")).BandsPlot }))),
};
