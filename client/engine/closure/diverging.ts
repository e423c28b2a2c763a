/** Whether a graph can have an overall divergence of its own, beyond what its degree says. */
import { isRetarded } from "../divergence/retarded.ts";
import type { Graph } from "../graphs/graph.ts";
import { blocksOf } from "./blocks.ts";
import type { Frame } from "./frame.ts";

/**
 * No closed way forward in time along retarded lines, and every block with ω ≥ 0: the loops of different blocks
 * multiply, so one that converges leaves subdivergences only (own derivation). `evenLoops` asks for an even number of
 * loops of each block, as poles in odd dimensions do.
 *
 * @param derivatives weight of the derivatives of each kind of vertex, in units of the frame
 */
export function canDiverge(
  graph: Graph,
  derivatives: readonly number[],
  evenLoops: boolean,
  frame: Frame,
): boolean {
  if (runsInCircle(graph, frame)) return false;
  return blocksOf(graph).every(({ vertices, lines, loops }) => {
    if (evenLoops && loops % 2 === 1) return false;
    let omega = frame.measure * loops;
    for (const [field, count] of lines) omega -= count * (frame.measure - 2 * (frame.weights[field] ?? 0));
    for (const vertex of vertices) omega += derivatives[graph.vertices[vertex] ?? 0] ?? 0;
    return omega >= 0;
  });
}

/** Whether retarded lines, which run forward in time, close on themselves. */
function runsInCircle({ vertices, edges }: Graph, { theory }: Frame): boolean {
  const retarded = theory.fields.map(isRetarded);
  const forward = edges.filter(({ field }) => retarded[field]);
  const left = new Set(vertices.keys());
  for (let shrank = true; shrank;) {
    shrank = false;
    for (const vertex of left) {
      // A vertex that nothing which is left leads to is earliest, and on no circle.
      if (forward.some(({ from, to }) => to === vertex && left.has(from))) continue;
      left.delete(vertex);
      shrank = true;
    }
  }
  return left.size > 0;
}
