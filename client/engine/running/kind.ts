/** The Running block: β functions, integration between scales, fixed points. */
import type { BlockKind } from "../kind.ts";
import { runningDescription } from "./description.ts";
import { evaluateRunning } from "./evaluate.ts";
import type { runningShape } from "./inputs.ts";
import type { RunningValue } from "./value.ts";

export const running: BlockKind<typeof runningShape, RunningValue> = {
  ...runningDescription,
  evaluate: evaluateRunning,
};
