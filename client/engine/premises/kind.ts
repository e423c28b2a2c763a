import type { BlockKind } from "../kind.ts";
import { evaluatePremises } from "./evaluate.ts";
import { premisesShape } from "./inputs.ts";
import type { PremisesValue } from "./value.ts";

export const premises: BlockKind<typeof premisesShape, PremisesValue> = {
  kind: "premises",
  title: "Premises",
  purpose: "States the theory: spacetime, fields, symmetries, scales and the terms of the Lagrangian.",
  shape: premisesShape,
  premises: "none",
  evaluate: evaluatePremises,
};
