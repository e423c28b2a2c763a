/** The Divergence block as the rest of the house sees it. */
import type { BlockKind } from "../kind.ts";
import { evaluateDivergence } from "./evaluate.ts";
import { divergenceDescription } from "./description.ts";
import type { divergenceShape } from "./inputs.ts";
import type { DivergenceValue } from "./value.ts";

export const divergence: BlockKind<typeof divergenceShape, DivergenceValue> = {
  ...divergenceDescription,
  evaluate: evaluateDivergence,
};
