/** The Truncation error block: what the orders that were left out may amount to. */
import type { BlockKind } from "../kind.ts";
import { truncationErrorDescription } from "./description.ts";
import type { truncationShape } from "./shape.ts";
import { evaluateTruncation } from "./evaluate.ts";
import type { TruncationValue } from "./value.ts";

export const truncationError: BlockKind<typeof truncationShape, TruncationValue> = {
  ...truncationErrorDescription,
  evaluate: evaluateTruncation,
};
