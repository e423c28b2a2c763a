/** Every connected, or one-particle irreducible, graph with given vertices and external legs, each once. */
import { canonicalForm, type Canonical, type Coloured } from "./canonical.ts";
import { allVertices, bridgeSides, neighboursOf } from "./connectivity.ts";
import { finishedGraph, hasTadpole } from "./finished.ts";
import type { Graph, GraphList, GraphRequest } from "./graph.ts";
import {
  firstVertex,
  settingOf,
  typedLegs,
  withLeg,
  withLine,
  withVertex,
  type PartialGraph,
  type Setting,
} from "./partial-graph.ts";

/** Sets of vertices are bits of a number. */
const MOST_VERTICES = 30;

/**
 * Joins all free legs of one vertex of a partial graph in every way, then of a next one, keeping one partial graph of
 * each isomorphism class; with `onlyOneParticleIrreducible` a partial graph is dropped as soon as one of its bridges
 * can no longer be closed.
 *
 * @param request up to 30 vertices; `mostSteps` bounds the partial graphs looked at, `most` the graphs listed
 * @returns graphs in a fixed order, with exact symmetry factors; throws on more than 30 vertices
 * @example one φ⁴ vertex with two legs: one graph, a closed line, S = 2
 */
export function enumerateGraphs(request: GraphRequest): GraphList {
  const setting = settingOf(request);
  if (setting.size > MOST_VERTICES) throw new RangeError("graphs have at most 30 vertices");
  const used = request.vertices.flatMap(({ count }, kind) => (count > 0 ? [{ kind, count }] : []));
  const rarest = used.reduce(
    (best, one) => (one.count < best.count ? one : best),
    used[0] ?? { kind: 0, count: 0 },
  );
  if (rarest.count === 0 || !legsCanClose(setting)) return { graphs: [], truncated: false };

  const seen = new Set<string>();
  const graphs: Graph[] = [];
  const most = request.most ?? Infinity;
  let left = request.mostSteps ?? Infinity;
  let truncated = false;
  const colourOf = makeColours();

  const visit = (graph: PartialGraph): void => {
    if (truncated) return;
    const coloured = colouredOf(graph, setting, colourOf);
    const canonical = canonicalForm(coloured);
    if (seen.has(canonical.certificate)) return;
    seen.add(canonical.certificate);
    const vertex = nextOpen(graph, canonical, setting);
    if (vertex === null) {
      if (request.dropTadpoles && hasTadpole(graph, setting)) return;
      if (graphs.length >= most) truncated = true;
      else graphs.push(finishedGraph(graph, coloured, canonical, setting));
      return;
    }
    joinAll(graph, vertex, setting, (next) => {
      left -= 1;
      if (left < 0) truncated = true;
      if (!truncated && canBeFinished(next, setting)) visit(next);
      return !truncated;
    });
  };
  visit(firstVertex(rarest.kind, setting));
  return { graphs, truncated };
}

/** Whether what is left after the external legs can pair up, field by field. */
function legsCanClose({ request, kindLegs, types, partner }: Setting): boolean {
  const external = typedLegs(request.external);
  const rest = Array.from({ length: types }, (_, type) =>
    request.vertices.reduce(
      (sum, { count }, kind) => sum + count * (kindLegs[kind]?.[type] ?? 0),
      -(external[type] ?? 0),
    ),
  );
  return rest.every((count, type) =>
    count < 0 ? false : partner(type) === type ? count % 2 === 0 : count === rest[partner(type)],
  );
}

/** Numbers the combinations of kind, closed lines and external legs of a vertex, in the order in which they occur. */
function makeColours(): (kind: number, closed: number, legs: number) => number {
  const known = new Map<string, number>();
  return (kind, closed, legs) => {
    const key = `${kind} ${closed} ${legs}`;
    const colour = known.get(key) ?? known.size + 1;
    known.set(key, colour);
    return colour;
  };
}

function colouredOf(
  { kinds, codes, legs }: PartialGraph,
  { size }: Setting,
  colourOf: ReturnType<typeof makeColours>,
): Coloured {
  const n = kinds.length;
  const compact: number[] = [];
  for (let u = 0; u < n; u += 1) for (let v = 0; v < n; v += 1) compact.push(codes[u * size + v] ?? 0);
  return {
    colours: kinds.map((kind, v) => colourOf(kind, codes[v * size + v] ?? 0, legs[v] ?? 0)),
    codes: compact,
  };
}

/** The first vertex in canonical order with free legs: the same choice whichever way a partial graph came about. */
function nextOpen({ free }: PartialGraph, { order }: Canonical, { types }: Setting): number | null {
  for (const vertex of order) {
    for (let type = 0; type < types; type += 1) if ((free[vertex * types + type] ?? 0) > 0) return vertex;
  }
  return null;
}

/** Every way to spend the free legs of a vertex, with legs of one type going to targets in rising order; `found` says whether to go on. */
function joinAll(
  start: PartialGraph,
  vertex: number,
  setting: Setting,
  found: (graph: PartialGraph) => boolean,
): void {
  const { request, types, outside, partner } = setting;
  let goesOn = true;
  const spend = (graph: PartialGraph, type: number, least: number): void => {
    if (!goesOn) return;
    if (type === types) {
      goesOn = found(graph);
      return;
    }
    if ((graph.free[vertex * types + type] ?? 0) === 0) return spend(graph, type + 1, 0);
    for (const [group, wanted] of graph.wanted.entries()) {
      if (group >= least && outside[group] === type && wanted > 0)
        spend(withLeg(graph, vertex, group, setting), type, group);
    }
    const other = partner(type);
    const past = outside.length;
    for (let u = 0; u < graph.kinds.length; u += 1) {
      if (u === vertex && request.dropSelfLoops) continue;
      const needed = u === vertex && other === type ? 2 : 1;
      if (past + u >= least && (graph.free[u * types + other] ?? 0) >= needed)
        spend(withLine(graph, vertex, type, u, setting), type, past + u);
    }
    for (const [kind, count] of graph.pool.entries()) {
      if (count === 0 || (setting.kindLegs[kind]?.[other] ?? 0) === 0) continue;
      const u = graph.kinds.length;
      spend(withLine(withVertex(graph, kind, setting), vertex, type, u, setting), type, past + u);
    }
  };
  spend(start, 0, 0);
}

/** False when a partial graph is closed before all vertices and legs are in, or has a bridge that stays one. */
function canBeFinished(graph: PartialGraph, setting: Setting): boolean {
  const { size, types, codes, request, outside, kindLegs } = setting;
  const n = graph.kinds.length;
  let open = 0;
  for (let v = 0; v < n; v += 1) {
    for (let type = 0; type < types; type += 1) if ((graph.free[v * types + type] ?? 0) > 0) open |= 1 << v;
  }
  if (open === 0 && (n < size || graph.wanted.some((count) => count > 0))) return false;
  for (const [group, wanted] of graph.wanted.entries()) {
    const type = outside[group] ?? 0;
    let supply = graph.pool.reduce((sum, count, kind) => sum + count * (kindLegs[kind]?.[type] ?? 0), 0);
    for (let v = 0; v < n; v += 1) supply += graph.free[v * types + type] ?? 0;
    if (supply < wanted) return false;
  }
  if (!request.onlyOneParticleIrreducible) return true;
  const count = (u: number, v: number) => codes.itemsOf(graph.codes[u * size + v] ?? 0).length;
  const within = allVertices(n);
  return bridgeSides(neighboursOf(n, count), within, (u, v) => count(u, v) === 1).every(
    (side) => (side & open) !== 0 && (within & ~side & open) !== 0,
  );
}
