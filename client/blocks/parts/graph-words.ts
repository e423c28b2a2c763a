/** A graph in words, for whoever does not see the drawing. */
import type { Graph } from "#engine/graphs/graph.ts";

const times = (count: number, what: string) => (count === 1 ? what : `${String(count)} ${what}`);

/** "vertices 1 and 2; 2 lines phi from 1 to 2; legs: 2 phi at 1, 2 phi at 2" */
export function graphInWords(graph: Graph, fields: readonly { readonly symbol: string }[]): string {
  const nameOf = (field: number) => fields[field]?.symbol ?? "";
  const lines = graph.edges.map(({ from, to, field, count }) => {
    const what = `${times(count, nameOf(field))} ${count === 1 ? "line" : "lines"}`;
    return from === to
      ? `${what} closed at ${String(from + 1)}`
      : `${what} from ${String(from + 1)} to ${String(to + 1)}`;
  });
  const legs = graph.legs.map(
    ({ vertex, field, conjugate, count }) =>
      `${times(count, `${nameOf(field)}${conjugate ? " conjugate" : ""}`)} at ${String(vertex + 1)}`,
  );
  const count = graph.vertices.length;
  return [
    `${String(count)} ${count === 1 ? "vertex" : "vertices"}`,
    ...(lines.length > 0 ? [lines.join(", ")] : []),
    legs.length > 0 ? `external legs: ${legs.join(", ")}` : "no external legs",
  ].join("; ");
}
