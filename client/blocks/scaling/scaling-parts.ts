import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";
import { ScalingForm } from "./scaling-form.tsx";
import { ScalingResult } from "./scaling-result.tsx";

export const scalingParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: ScalingForm,
  Result: forKind(ScalingResult),
  Plot: forKind(lazy(async () => ({ default: (await import("./scaling-plot.tsx")).ScalingPlot }))),
};
