/** A graph in the making: some vertices joined, their other legs still free, further vertices still to come. */
import type { GraphRequest, Legs } from "./graph.ts";
import { makeLineCodes, type LineCodes } from "./line-codes.ts";

/**
 * Legs are of types: 2f for a field, 2f + 1 for its conjugate. What joins u to v is the multiset of the types of u's
 * legs in it, so that the code from v to u holds the partners.
 */
export interface Setting {
  readonly request: GraphRequest;
  readonly types: number;
  /** Number of vertices in all: the width of `codes`. */
  readonly size: number;
  readonly kindLegs: readonly (readonly number[])[];
  /** The type of each external leg, or group of interchangeable ones. */
  readonly outside: readonly number[];
  readonly codes: LineCodes;
  partner(type: number): number;
}

export interface PartialGraph {
  /** Kind of each vertex so far. */
  readonly kinds: number[];
  /** At u * size + v. */
  readonly codes: number[];
  /** Code of the external legs of each vertex. */
  readonly legs: number[];
  /** Free legs of each vertex by type, at v * types + type. */
  readonly free: number[];
  /** Vertices of each kind, and external legs of each group, still to come. */
  readonly pool: number[];
  readonly wanted: number[];
}

export function typedLegs({ plain, conjugate }: Legs): number[] {
  return plain.flatMap((count, f) => [count, conjugate[f] ?? 0]);
}

export function settingOf(request: GraphRequest): Setting {
  const external = typedLegs(request.external);
  return {
    request,
    types: 2 * request.fields.length,
    size: request.vertices.reduce((sum, { count }) => sum + count, 0),
    kindLegs: request.vertices.map(({ legs }) => typedLegs(legs)),
    outside: external.flatMap((count, type) =>
      request.labelledLegs ? Array.from({ length: count }, () => type) : count > 0 ? [type] : [],
    ),
    codes: makeLineCodes(),
    partner: (type) => (request.fields[type >> 1]?.directed ? type ^ 1 : type),
  };
}

/** The graph of one vertex of a kind, nothing joined yet. */
export function firstVertex(kind: number, setting: Setting): PartialGraph {
  const { request, size, types } = setting;
  const external = typedLegs(request.external);
  const empty: PartialGraph = {
    kinds: [],
    codes: Array.from({ length: size * size }, () => 0),
    legs: [],
    free: Array.from({ length: size * types }, () => 0),
    pool: request.vertices.map(({ count }) => count),
    wanted: setting.outside.map((type) => (request.labelledLegs ? 1 : (external[type] ?? 0))),
  };
  return withVertex(empty, kind, setting);
}

export function copyOf(graph: PartialGraph): PartialGraph {
  return {
    kinds: graph.kinds.slice(),
    codes: graph.codes.slice(),
    legs: graph.legs.slice(),
    free: graph.free.slice(),
    pool: graph.pool.slice(),
    wanted: graph.wanted.slice(),
  };
}

export function withVertex(graph: PartialGraph, kind: number, { kindLegs, types }: Setting): PartialGraph {
  const next = copyOf(graph);
  const vertex = next.kinds.length;
  next.kinds.push(kind);
  next.legs.push(0);
  kindLegs[kind]?.forEach((count, type) => (next.free[vertex * types + type] = count));
  next.pool[kind] = (next.pool[kind] ?? 0) - 1;
  return next;
}

/** Joins a leg of the type at u to its partner at v; u may be v. */
export function withLine(
  graph: PartialGraph,
  u: number,
  type: number,
  v: number,
  setting: Setting,
): PartialGraph {
  const { size, types, codes, partner } = setting;
  const next = copyOf(graph);
  const other = partner(type);
  const spend = (place: number) => (next.free[place] = (next.free[place] ?? 0) - 1);
  spend(u * types + type);
  spend(v * types + other);
  const join = (place: number, item: number) => (next.codes[place] = codes.add(next.codes[place] ?? 0, item));
  // A closed line has one of each type at its vertex: the conjugate's stands for both.
  if (u === v) join(u * size + u, Math.max(type, other));
  else {
    join(u * size + v, type);
    join(v * size + u, other);
  }
  return next;
}

/** Makes a leg of the type at a vertex external, as one of a group. */
export function withLeg(graph: PartialGraph, vertex: number, group: number, setting: Setting): PartialGraph {
  const next = copyOf(graph);
  const place = vertex * setting.types + (setting.outside[group] ?? 0);
  next.free[place] = (next.free[place] ?? 0) - 1;
  next.legs[vertex] = setting.codes.add(next.legs[vertex] ?? 0, group);
  next.wanted[group] = (next.wanted[group] ?? 0) - 1;
  return next;
}
