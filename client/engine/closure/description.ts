/** What the Closure block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { closureShape } from "./inputs.ts";

export const closureDescription: BlockDescription<typeof closureShape> = {
  kind: "closure",
  title: "Closure",
  purpose:
    "Every operator that renormalisation demands up to an order in 1/Λ, the graph that demands it, and which are missing.",
  shape: closureShape,
  premises: "required",
  long: true,
};
