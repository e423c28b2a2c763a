/** The Basis count block: how many independent operators there are at each dimension. */
import type { BlockKind } from "../kind.ts";
import { basisCountDescription } from "./description.ts";
import { evaluateBasis } from "./evaluate.ts";
import type { basisShape } from "./inputs.ts";
import type { BasisValue } from "./value.ts";

export const basisCount: BlockKind<typeof basisShape, BasisValue> = {
  ...basisCountDescription,
  evaluate: evaluateBasis,
};
