import type { BlockKind } from "../kind.ts";
import { countingDescription } from "./description.ts";
import { evaluateCounting } from "./evaluate.ts";
import type { countingShape } from "./inputs.ts";
import type { CountingValue } from "./value.ts";

export const countingRules: BlockKind<typeof countingShape, CountingValue> = {
  ...countingDescription,
  evaluate: evaluateCounting,
};
