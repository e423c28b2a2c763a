/** The Divergence block: inputs and theory to result. */
import type { Evaluation } from "../evaluation.ts";
import type { Theory } from "../premises/theory.ts";
import type { DivergenceInputs } from "./inputs.ts";
import { evaluateGraph } from "./one-graph.ts";
import type { DivergenceValue } from "./value.ts";
import { evaluateTheory } from "./whole-theory.ts";

/**
 * The superficial degree of divergence of one graph, or the divergent amplitudes of a whole theory, with counterterms.
 *
 * @returns a value without problems, or problems without a value: a graph that does not exist has no degree.
 */
export function evaluateDivergence(
  inputs: DivergenceInputs,
  theory: Theory | null,
): Evaluation<DivergenceValue> {
  if (theory === null) {
    return {
      value: null,
      problems: [{ code: "premises-missing", path: ["standsOn"], facts: {} }],
      notices: [],
      scalars: [],
      working: [],
    };
  }
  return inputs.mode === "one graph" ? evaluateGraph(inputs, theory) : evaluateTheory(inputs, theory);
}
