/**
 * The blocks of a graph: the parts that hang together at single vertices only. Their loop integrals multiply, so an
 * overall divergence of the graph is a product of theirs: without one of a block there is none of the graph.
 */
import type { Graph } from "../graphs/graph.ts";

export interface Block {
  readonly vertices: readonly number[];
  /** Lines by field. */
  readonly lines: ReadonlyMap<number, number>;
  readonly loops: number;
}

/**
 * Blocks in the order in which they are found; a line from a vertex to itself is a block of its own. By depth-first
 * search (Hopcroft, Tarjan 1973).
 *
 * @example two bubbles in a row: two blocks of one loop each; the sunset: one of two loops
 */
export function blocksOf({ vertices, edges }: Graph): Block[] {
  const blocks: Block[] = [];
  const joins = edges.map((edge, e) => ({ ...edge, e })).filter(({ from, to }) => from !== to);
  for (const { from, to, field, count } of edges)
    if (from === to)
      for (let n = 0; n < count; n += 1)
        blocks.push({ vertices: [from], lines: new Map([[field, 1]]), loops: 1 });

  const depth: (number | undefined)[] = vertices.map(() => undefined);
  const lowest: number[] = vertices.map(() => 0);
  const seen = new Set<number>();
  const pile: (typeof joins)[number][] = [];
  let next = 0;
  const visit = (vertex: number): void => {
    depth[vertex] = lowest[vertex] = next;
    next += 1;
    for (const join of joins) {
      if (seen.has(join.e) || (join.from !== vertex && join.to !== vertex)) continue;
      seen.add(join.e);
      const other = join.from === vertex ? join.to : join.from;
      const at = pile.push(join) - 1;
      if (depth[other] === undefined) {
        visit(other);
        if ((lowest[other] ?? 0) >= (depth[vertex] ?? 0)) blocks.push(blockOf(pile.splice(at)));
      }
      lowest[vertex] = Math.min(lowest[vertex] ?? 0, lowest[other] ?? 0, depth[other] ?? 0);
    }
  };
  for (const vertex of vertices.keys()) if (depth[vertex] === undefined) visit(vertex);
  return blocks;
}

function blockOf(joins: readonly { from: number; to: number; field: number; count: number }[]): Block {
  const vertices = [...new Set(joins.flatMap(({ from, to }) => [from, to]))];
  const lines = new Map<number, number>();
  for (const { field, count } of joins) lines.set(field, (lines.get(field) ?? 0) + count);
  const all = joins.reduce((sum, { count }) => sum + count, 0);
  return { vertices, lines, loops: all - vertices.length + 1 };
}
