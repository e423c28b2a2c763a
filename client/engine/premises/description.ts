/** What the Premises block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { premisesShape } from "./inputs.ts";

export const premisesDescription: BlockDescription<typeof premisesShape> = {
  kind: "premises",
  title: "Premises",
  purpose: "States the theory: spacetime, fields, symmetries, scales and the terms of the Lagrangian.",
  shape: premisesShape,
  premises: "none",
};
