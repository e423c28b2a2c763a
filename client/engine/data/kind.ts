/** The Data block: a table of predictions order by order, or of measurements. */
import type { BlockKind } from "../kind.ts";
import { dataDescription } from "./description.ts";
import { evaluateData } from "./evaluate.ts";
import type { dataShape } from "./inputs.ts";
import type { DataValue } from "./value.ts";

export const data: BlockKind<typeof dataShape, DataValue> = { ...dataDescription, evaluate: evaluateData };
