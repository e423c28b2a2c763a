import { forKind, type BlockParts } from "../block-parts.ts";
import { BandsPlot } from "./bands-plot.tsx";
import { TruncationErrorForm } from "./truncation-error-form.tsx";
import { TruncationErrorResult } from "./truncation-error-result.tsx";

export const truncationErrorParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: TruncationErrorForm,
  Result: forKind(TruncationErrorResult),
  Plot: forKind(BandsPlot),
};
