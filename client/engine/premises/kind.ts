import type { BlockKind } from "../kind.ts";
import { evaluatePremises } from "./evaluate.ts";
import { premisesDescription } from "./description.ts";
import type { premisesShape } from "./inputs.ts";
import type { PremisesValue } from "./value.ts";

export const premises: BlockKind<typeof premisesShape, PremisesValue> = {
  ...premisesDescription,
  evaluate: evaluatePremises,
};
