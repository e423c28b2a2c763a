/** What the Basis count block is and takes, without its computation. */
import type { BlockDescription } from "../kind.ts";
import { basisShape } from "./inputs.ts";

export const basisCountDescription: BlockDescription<typeof basisShape> = {
  kind: "basisCount",
  title: "Basis count",
  purpose: "Count the independent operators at each mass dimension for given fields and symmetries.",
  shape: basisShape,
  premises: "none",
  long: true,
};
