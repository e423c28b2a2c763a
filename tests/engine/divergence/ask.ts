/** Asks a Divergence block about one graph or the whole theory, in the fewest words. */
import { evaluateDivergence } from "#engine/divergence/evaluate.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { divergenceShape } from "#engine/divergence/inputs.ts";
import type { GraphDivergence, TheoryDivergence } from "#engine/divergence/value.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";

function inputs(given: object) {
  return schemaOf(divergenceShape).parse(given);
}

/** Vertices by term row id; legs by symbol, "psi~" for conjugates: `askGraph(qed, { e: 2 }, { A: 2 })`. */
export function askGraph(
  theory: Theory,
  vertices: Record<string, number>,
  legs: Record<string, number> = {},
): Evaluation<GraphDivergence> {
  const asked = inputs({
    vertices: Object.entries(vertices).map(([term, count], n) => ({ id: `v${n}`, term, count })),
    legs: Object.entries(legs).map(([symbol, count], n) => ({
      id: `l${n}`,
      field: symbol.replace("~", ""),
      leg: symbol.endsWith("~") ? "conjugate" : "field",
      count,
    })),
  });
  // Mode "one graph" is the initial choice, so the value is a graph's.
  return evaluateDivergence(asked, theory) as Evaluation<GraphDivergence>;
}

export function graphOf(
  theory: Theory,
  vertices: Record<string, number>,
  legs: Record<string, number> = {},
): GraphDivergence {
  const { value, problems } = askGraph(theory, vertices, legs);
  if (!value) throw new Error(`refused: ${problems.map(({ code }) => code).join(", ")}`);
  return value;
}

export function refusalOf(
  theory: Theory,
  vertices: Record<string, number>,
  legs: Record<string, number> = {},
): string[] {
  return askGraph(theory, vertices, legs).problems.map(({ code }) => code);
}

export function askTheory(
  theory: Theory,
  caps: { maxLoops?: string; maxLegs?: string; maxOrder?: string; symmetries?: string } = {},
): Evaluation<TheoryDivergence> {
  // Mode "whole theory" is asked for, so the value is a theory's.
  return evaluateDivergence(
    inputs({ mode: "whole theory", ...caps }),
    theory,
  ) as Evaluation<TheoryDivergence>;
}

export function listOf(theory: Theory, caps: Parameters<typeof askTheory>[1] = {}): TheoryDivergence {
  const { value, problems } = askTheory(theory, caps);
  if (!value) throw new Error(`refused: ${problems.map(({ code }) => code).join(", ")}`);
  return value;
}

/** The divergent amplitudes with their degrees: { "phi^2": "2", … }. */
export function divergent(
  theory: Theory,
  caps: Parameters<typeof askTheory>[1] = {},
): Record<string, string> {
  const { amplitudes } = listOf(theory, caps);
  return Object.fromEntries(
    amplitudes
      .filter(({ status }) => status === "divergent")
      .map(({ legs, omega }) => [legs.text, omega.text]),
  );
}
