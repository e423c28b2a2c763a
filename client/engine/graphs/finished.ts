/** A finished graph as plain JSON, and what can be said of its parts. */
import type { Canonical, Coloured } from "./canonical.ts";
import { allVertices, neighboursOf, reachable } from "./connectivity.ts";
import type { Graph, GraphEdge, GraphLeg } from "./graph.ts";
import { tally } from "./line-codes.ts";
import type { PartialGraph, Setting } from "./partial-graph.ts";
import { symmetryOf } from "./symmetry.ts";

/** Vertices stand in the order of their kinds, those of one kind in canonical order. */
export function finishedGraph(
  graph: PartialGraph,
  coloured: Coloured,
  canonical: Canonical,
  setting: Setting,
): Graph {
  const { codes, size, request } = setting;
  const order = [...canonical.order].sort((a, b) => (graph.kinds[a] ?? 0) - (graph.kinds[b] ?? 0));
  const edges: GraphEdge[] = [];
  const legs: GraphLeg[] = [];
  order.forEach((u, from) => {
    order.forEach((v, to) => {
      if (to < from) return;
      for (const [type, count] of tally(codes.itemsOf(graph.codes[u * size + v] ?? 0))) {
        const field = type >> 1;
        // A line runs away from its conjugate leg.
        const away = type % 2 === 1 || !request.fields[field]?.directed;
        edges.push(away ? { from, to, field, count } : { from: to, to: from, field, count });
      }
    });
    for (const [group, count] of tally(codes.itemsOf(graph.legs[u] ?? 0))) {
      const type = setting.outside[group] ?? 0;
      legs.push({
        vertex: from,
        field: type >> 1,
        conjugate: type % 2 === 1,
        count,
        label: request.labelledLegs ? group : null,
      });
    }
  });
  const { symmetry, labellings } = symmetryOf(graph, coloured, canonical.automorphisms, setting);
  return {
    vertices: order.map((v) => graph.kinds[v] ?? 0),
    edges,
    legs,
    loops: edges.reduce((sum, { count }) => sum + count, 0) - order.length + 1,
    symmetry: symmetry.toString(),
    labellings: labellings.toString(),
  };
}

/** Whether a part without external legs hangs on a single vertex: no external momentum flows through it. */
export function hasTadpole(graph: PartialGraph, { size }: Setting): boolean {
  const n = graph.kinds.length;
  const count = (u: number, v: number) => (graph.codes[u * size + v] === 0 ? 0 : 1);
  if (graph.kinds.some((_, v) => (graph.codes[v * size + v] ?? 0) !== 0)) return true;
  if (graph.legs.every((code) => code === 0)) return false;
  const neighbours = neighboursOf(n, count);
  for (let v = 0; v < n; v += 1) {
    const rest = allVertices(n) & ~(1 << v);
    for (let u = 0; u < n; u += 1) {
      if (u === v) continue;
      const part = reachable(u, neighbours, rest);
      if (graph.legs.every((code, w) => code === 0 || (part & (1 << w)) === 0)) return true;
    }
  }
  return false;
}
