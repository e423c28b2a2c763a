/** The divergent subgraphs of a graph: what has to be subtracted before its overall divergence is local. */
import { LinearForm } from "../exact/linear-form.ts";
import type { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import { bridgeSides, neighboursOf, reachable } from "../graphs/connectivity.ts";
import type { Graph } from "../graphs/graph.ts";
import type { Theory } from "../premises/theory.ts";
import { propagatorPowers, type GraphParts } from "./degree.ts";
import type { NestedDivergence } from "./value.ts";

/** How many choices of lines may still be looked at, over several graphs: a bound on time that is the same everywhere. */
export interface Allowance {
  choices: number;
}

/**
 * Every one-particle irreducible proper subgraph with a loop and ω ≥ 0: a choice of lines, and the vertices they meet.
 * Its degree is measure·L − Σ I_f (measure − 2δ_f) + Σ k_i, with the derivatives of all its vertices: an upper bound,
 * as some may act on lines outside. Source: Weinberg, The Quantum Theory of Fields I (1995), section 12.1.
 *
 * @param vertexKinds what the indices in `graph.vertices` mean
 * @returns null when the degree is no number, or when the allowance does not suffice to look at every choice
 * @example the φ⁴ sunset in d = 4: two of its three lines, ω = 0, in 3 ways
 */
export function nestedDivergences(
  graph: Graph,
  vertexKinds: readonly GraphParts["vertices"][number]["term"][],
  theory: Theory,
  allowance: Allowance,
): NestedDivergence[] | null {
  const choices = graph.edges.reduce((product, { count }) => product * (count + 1), 1);
  if (choices > allowance.choices) return null;
  allowance.choices -= choices;
  const found: NestedDivergence[] = [];
  const whole = graph.edges.reduce((sum, { count }) => sum + count, 0);
  const taken = graph.edges.map(() => 0);
  const degrees = { symbolic: false };

  const choose = (index: number): void => {
    const edge = graph.edges[index];
    if (edge) {
      for (let count = 0; count <= edge.count; count += 1) {
        taken[index] = count;
        choose(index + 1);
      }
      taken[index] = 0;
      return;
    }
    const lines = taken.reduce((sum, count) => sum + count, 0);
    if (lines === 0 || lines === whole) return;
    const vertices = irreducibleVertices(graph, taken);
    if (!vertices) return;
    const omega = degreeOfPart(graph, taken, vertices, vertexKinds, theory);
    if (omega === null) degrees.symbolic = true;
    else if (omega.sign() >= 0) {
      found.push({
        vertices,
        lines,
        loops: lines - vertices.length + 1,
        omega: shown(omega),
        ways: graph.edges.reduce((ways, { count }, e) => ways * binomial(count, taken[e] ?? 0), 1),
      });
    }
  };
  choose(0);
  if (degrees.symbolic) return null;
  return found.sort((a, b) => a.loops - b.loops || a.vertices.length - b.vertices.length);
}

/** Binomial coefficient of small numbers. */
function binomial(n: number, k: number): number {
  let result = 1;
  for (let i = 1; i <= k; i += 1) result = (result * (n - k + i)) / i;
  return Math.round(result);
}

/** The vertices that chosen lines meet; null unless they hang together, without a bridge. */
function irreducibleVertices(graph: Graph, taken: readonly number[]): number[] | null {
  const size = graph.vertices.length;
  const counts = new Map<number, number>();
  let within = 0;
  graph.edges.forEach(({ from, to }, e) => {
    const count = taken[e] ?? 0;
    if (count === 0) return;
    within |= (1 << from) | (1 << to);
    for (const place of from === to ? [] : [from * size + to, to * size + from])
      counts.set(place, (counts.get(place) ?? 0) + count);
  });
  const count = (u: number, v: number) => counts.get(u * size + v) ?? 0;
  const neighbours = neighboursOf(size, count);
  const vertices = graph.vertices.map((_, v) => v).filter((v) => (within & (1 << v)) !== 0);
  if (reachable(vertices[0] ?? 0, neighbours, within) !== within) return null;
  if (bridgeSides(neighbours, within, (u, v) => count(u, v) === 1).length > 0) return null;
  return vertices;
}

function degreeOfPart(
  graph: Graph,
  taken: readonly number[],
  vertices: readonly number[],
  vertexKinds: Parameters<typeof nestedDivergences>[1],
  theory: Theory,
): Rational | null {
  const lines = theory.fields.map((_, f) =>
    graph.edges.reduce((sum, { field }, e) => sum + (field === f ? (taken[e] ?? 0) : 0), 0),
  );
  const loops = lines.reduce((sum, count) => sum + count, 0) - vertices.length + 1;
  const derivatives = vertices.reduce(
    (sum, v) => sum.plus(vertexKinds[graph.vertices[v] ?? 0]?.derivativeWeight ?? LinearForm.zero),
    LinearForm.zero,
  );
  return theory.measure.times(loops).minus(propagatorPowers(lines, theory)).plus(derivatives).asRational();
}
