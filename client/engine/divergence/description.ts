/** What the Divergence block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { divergenceShape } from "./inputs.ts";

export const divergenceDescription: BlockDescription<typeof divergenceShape> = {
  kind: "divergence",
  title: "Divergence",
  purpose:
    "The superficial degree of divergence of a graph or of a theory's amplitudes, and the counterterms it demands.",
  shape: divergenceShape,
  premises: "required",
};
