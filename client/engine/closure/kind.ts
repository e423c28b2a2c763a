/** The Closure block as the rest of the house sees it. */
import type { BlockKind } from "../kind.ts";
import { closureDescription } from "./description.ts";
import { evaluateClosure } from "./evaluate.ts";
import type { closureShape } from "./inputs.ts";
import type { ClosureValue } from "./value.ts";

export const closure: BlockKind<typeof closureShape, ClosureValue> = {
  ...closureDescription,
  evaluate: evaluateClosure,
};
