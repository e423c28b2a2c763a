/** What the Counting rules block is and takes, without its computation. */
import type { BlockDescription } from "../kind.ts";
import { countingShape } from "./inputs.ts";

export const countingDescription: BlockDescription<typeof countingShape> = {
  kind: "countingRules",
  title: "Counting rules",
  purpose:
    "Where counting is not by dimension: small parameters, what everything counts in powers of them, the order of terms and graphs.",
  shape: countingShape,
  premises: "required",
};
