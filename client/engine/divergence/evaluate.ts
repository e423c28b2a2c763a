import type { Evaluation } from "../evaluation.ts";
import type { Theory } from "../premises/theory.ts";
import type { DivergenceInputs } from "./inputs.ts";
import type { DivergenceValue } from "./value.ts";

/** The whole block: inputs and theory to result. Without premises there is nothing to count. */
export function evaluateDivergence(_inputs: DivergenceInputs, theory: Theory | null): Evaluation<DivergenceValue> {
  const code = theory === null ? "premises-missing" : "divergence-unavailable";
  return { value: null, problems: [{ code, path: [], facts: {} }], notices: [], scalars: [], working: [] };
}
