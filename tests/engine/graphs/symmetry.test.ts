/** Symmetry factors against two counts that know nothing of canonical forms. */
import { describe, expect, it } from "vitest";
import type { Graph } from "#engine/graphs/graph.ts";
import { scalarGraphs } from "./count-graphs.ts";

function permutations(n: number): number[][] {
  if (n === 0) return [[]];
  return permutations(n - 1).flatMap((rest) =>
    Array.from({ length: n }, (_, place) => [...rest.slice(0, place), n - 1, ...rest.slice(place)]),
  );
}
const factorial = (n: number): number => (n <= 1 ? 1 : n * factorial(n - 1));

/** Lines between u and v, closed ones on the diagonal, as a table; legs in an extra column. */
function tableOf(graph: Graph): { lines: number[][]; legs: number[] } {
  const lines = graph.vertices.map(() => graph.vertices.map(() => 0));
  for (const { from, to, count } of graph.edges) {
    for (const [u, v] of from === to
      ? [[from, to]]
      : [
          [from, to],
          [to, from],
        ]) {
      const row = lines[u ?? 0];
      if (row) row[v ?? 0] = (row[v ?? 0] ?? 0) + count;
    }
  }
  const legs = graph.vertices.map((_, v) =>
    graph.legs.reduce((sum, leg) => sum + (leg.vertex === v ? leg.count : 0), 0),
  );
  return { lines, legs };
}

/** |Aut| with legs held: permutations of vertices without legs, times those of equal lines. */
function symmetryByPermutations(graph: Graph): number {
  const { lines, legs } = tableOf(graph);
  const kept = permutations(legs.length).filter((to) =>
    lines.every(
      (row, u) =>
        ((legs[u] ?? 0) === 0 || to[u] === u) &&
        legs[to[u] ?? 0] === legs[u] &&
        row.every((count, v) => lines[to[u] ?? 0]?.[to[v] ?? 0] === count),
    ),
  ).length;
  return lines.reduce(
    (product, row, u) =>
      row.reduce(
        (sofar, count, v) => sofar * (v < u ? 1 : factorial(count) * (u === v ? 2 ** count : 1)),
        product,
      ),
    kept,
  );
}

/** How often each graph occurs among all pairings of the legs of labelled vertices. */
function pairings(legsPerVertex: number, vertices: number, external: number): Map<string, number> {
  const ends = [
    ...Array.from({ length: vertices * legsPerVertex }, (_, n) => Math.floor(n / legsPerVertex)),
    ...Array.from({ length: external }, (_, n) => vertices + n),
  ];
  const orders = permutations(vertices);
  const keys = new Map<string, string>();
  const found = new Map<string, number>();
  const pair = (left: readonly number[], lines: readonly (readonly [number, number])[]): void => {
    const [first, ...rest] = left;
    if (first === undefined) {
      const drawn = lines.map(([u, v]) => `${u}-${v}`).join(" ");
      const key = keys.get(drawn) ?? keyOf(lines, orders, vertices);
      keys.set(drawn, key);
      found.set(key, (found.get(key) ?? 0) + 1);
      return;
    }
    rest.forEach((second, n) => {
      pair([...rest.slice(0, n), ...rest.slice(n + 1)], [...lines, [first, second]]);
    });
  };
  pair(ends, []);
  return found;
}

/** The least of all relabellings, external ends all called "x". */
function keyOf(
  lines: readonly (readonly [number, number])[],
  orders: readonly number[][],
  vertices: number,
): string {
  const name = (order: readonly number[], end: number) => (end >= vertices ? "x" : String(order[end] ?? 0));
  return (
    orders
      .map((order) =>
        lines
          .map(([u, v]) => [name(order, u), name(order, v)].sort().join("-"))
          .sort()
          .join(" "),
      )
      .sort()[0] ?? ""
  );
}

function keyOfGraph(graph: Graph): string {
  const n = graph.vertices.length;
  const lines = graph.edges.flatMap(({ from, to, count }) =>
    Array.from({ length: count }, () => [from, to] as const),
  );
  const legs = graph.legs.flatMap(({ vertex, count }) =>
    Array.from({ length: count }, () => [vertex, n] as const),
  );
  return keyOf([...lines, ...legs], permutations(n), n);
}

describe("each graph's multiplicity is what pairing all legs by hand gives", () => {
  it.each([
    [4, 2, 0],
    [4, 2, 2],
    [4, 3, 0],
    [3, 2, 2],
    [3, 3, 1],
    [3, 4, 0],
    [6, 2, 0],
  ])("φ^%i, %i vertices, %i legs", (n, vertices, external) => {
    const found = pairings(n, vertices, external);
    const graphs = scalarGraphs({ [n]: vertices }, external);
    expect(new Set(graphs.map(keyOfGraph)).size).toBe(graphs.length);
    const all = factorial(n) ** vertices * factorial(vertices);
    for (const graph of graphs) {
      expect(found.get(keyOfGraph(graph))).toBe((all * Number(graph.labellings)) / Number(graph.symmetry));
    }
  });
});

describe("symmetry factors are orders of automorphism groups", () => {
  it.each([
    [{ 4: 5 }, 0],
    [{ 4: 5 }, 4],
    [{ 4: 4 }, 2],
    [{ 3: 6 }, 0],
    [{ 3: 4, 4: 1 }, 2],
    [{ 3: 2, 6: 2 }, 2],
  ])("vertices %o, %i legs", (vertices, legs) => {
    for (const graph of scalarGraphs(vertices, legs)) {
      expect(Number(graph.symmetry)).toBe(symmetryByPermutations(graph));
    }
  });
});

describe("labelled legs", () => {
  it("are as many graphs as the interchangeable ones have labellings, with the same factors", () => {
    for (const [vertices, legs] of [
      [{ 4: 3 }, 4],
      [{ 3: 4 }, 2],
      [{ 3: 3 }, 3],
    ] as const) {
      const together = scalarGraphs(vertices, legs);
      const apart = scalarGraphs(vertices, legs, { labelledLegs: true });
      const expected = together.flatMap(({ symmetry, labellings }) =>
        Array.from({ length: Number(labellings) }, () => symmetry),
      );
      expect(apart.map(({ symmetry }) => symmetry).sort()).toEqual(expected.sort());
    }
  });
});

describe("limits", () => {
  it("cut the list short and say so", () => {
    expect(scalarGraphs({ 4: 4 }, 4, { most: 5 })).toHaveLength(5);
    expect(scalarGraphs({ 4: 4 }, 4, { mostSteps: 3 }).length).toBeLessThan(37);
  });
  it("no graph has an odd number of ends", () => {
    expect(scalarGraphs({ 3: 1 }, 2)).toEqual([]);
  });
});
