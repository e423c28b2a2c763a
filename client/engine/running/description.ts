/** What the Running block is and takes, without its computation. */
import type { BlockDescription } from "../kind.ts";
import { runningShape } from "./inputs.ts";

export const runningDescription: BlockDescription<typeof runningShape> = {
  kind: "running",
  title: "Running",
  purpose:
    "How couplings change with the scale: β functions, values at other scales, poles and fixed points.",
  shape: runningShape,
  premises: "optional",
};
