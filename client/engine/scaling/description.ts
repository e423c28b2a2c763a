/** What the Scaling block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { scalingShape } from "./inputs.ts";

export const scalingDescription: BlockDescription<typeof scalingShape> = {
  kind: "scaling",
  title: "Scaling",
  purpose:
    "Dimension, class and size of every term: relevant, marginal or irrelevant, and how large at the probe scale.",
  shape: scalingShape,
  premises: "required",
};
