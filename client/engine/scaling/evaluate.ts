import type { Evaluation } from "../evaluation.ts";
import type { Theory } from "../premises/theory.ts";
import type { ScalingInputs } from "./inputs.ts";
import type { ScalingValue } from "./value.ts";

export function evaluateScaling(_inputs: ScalingInputs, theory: Theory | null): Evaluation<ScalingValue> {
  const problems = theory ? [] : [{ code: "premises-missing", path: [], facts: {} }];
  return { value: null, problems, notices: [], scalars: [], working: [] };
}
