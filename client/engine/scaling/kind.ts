import type { BlockKind } from "../kind.ts";
import { evaluateScaling } from "./evaluate.ts";
import { scalingDescription } from "./description.ts";
import type { scalingShape } from "./inputs.ts";
import type { ScalingValue } from "./value.ts";

export const scaling: BlockKind<typeof scalingShape, ScalingValue> = {
  ...scalingDescription,
  evaluate: evaluateScaling,
};
