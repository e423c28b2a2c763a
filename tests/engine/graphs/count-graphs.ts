/** Graphs of one real field in the fewest words, and the exact sum of their weights. */
import { Rational } from "#engine/exact/rational.ts";
import { enumerateGraphs } from "#engine/graphs/enumerate.ts";
import type { Graph, GraphRequest } from "#engine/graphs/graph.ts";

export type Options = Omit<GraphRequest, "fields" | "vertices" | "external">;

/** `scalarGraphs({ 4: 2 }, 4)`: two φ⁴ vertices, four legs. */
export function scalarGraphs(
  vertices: Readonly<Record<number, number>>,
  legs: number,
  options: Options = {},
): readonly Graph[] {
  return enumerateGraphs({
    fields: [{ id: "phi", directed: false }],
    vertices: Object.entries(vertices).map(([n, count]) => ({
      id: `phi${n}`,
      legs: { plain: [Number(n)], conjugate: [0] },
      count,
    })),
    external: { plain: [legs], conjugate: [0] },
    ...options,
  }).graphs;
}

/** Sum of 1/S over graphs with labelled legs. */
export function weightOf(graphs: readonly Graph[]): Rational {
  return graphs.reduce(
    (sum, { symmetry, labellings }) => sum.plus(Rational.of(BigInt(labellings), BigInt(symmetry))),
    Rational.zero,
  );
}
