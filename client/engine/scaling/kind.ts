import type { BlockKind } from "../kind.ts";
import { evaluateScaling } from "./evaluate.ts";
import { scalingShape } from "./inputs.ts";
import type { ScalingValue } from "./value.ts";

export const scaling: BlockKind<typeof scalingShape, ScalingValue> = {
  kind: "scaling",
  title: "Scaling",
  purpose: "Dimension, class and size of every term: relevant, marginal or irrelevant, and how large at the probe scale.",
  shape: scalingShape,
  premises: "required",
  evaluate: evaluateScaling,
};
