/** What the Truncation error block is and takes, without its computation: forms and documents need no more. */
import type { BlockDescription } from "../kind.ts";
import { isPriorSet, setChoices, truncationShape } from "./shape.ts";

export const truncationErrorDescription: BlockDescription<typeof truncationShape> = {
  kind: "truncationError",
  title: "Truncation error",
  purpose: "Estimate what the omitted orders may amount to, from predictions order by order.",
  shape: truncationShape,
  premises: "optional",
  // One point is quick; fits along x, and numerical integrals at each x, are not.
  long: ({ data, method, sets }) =>
    data !== "" && (method === "correlated along x" || sets === setChoices[1] || isPriorSet(method)),
};
