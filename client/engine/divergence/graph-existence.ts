/**
 * Whether any connected graph has given vertices and legs. Two questions: do the internal lines close (each ψ of a
 * vertex meets a ψ̄), and can the vertices be joined into one piece.
 */
import type { Theory } from "../premises/theory.ts";
import { addHalfEdges, conjugated, countOf, netOf, noHalfEdges, type HalfEdges } from "./half-edges.ts";

export interface VertexCount {
  readonly edges: HalfEdges;
  readonly count: number;
}

/** How many of each vertex enter as written; the rest enter as their Hermitian conjugate. */
type Split = readonly number[];

/**
 * Every way to take some of the vertices as their Hermitian conjugates such that lines of charged fields close:
 * Σ (n_ψ − n_ψ̄) over the vertices equals that of the legs. A Lagrangian is real, so "y φ χ χ" stands for itself + h.c.
 */
export function closingSplits(vertices: readonly VertexCount[], legs: HalfEdges, theory: Theory): Split[] {
  const wanted = netOf(legs, theory);
  const nets = vertices.map(({ edges }) => netOf(edges, theory));
  const found: Split[] = [];
  const choose = (index: number, missing: readonly number[], split: Split): void => {
    const vertex = vertices[index];
    const net = nets[index];
    if (!vertex || !net) {
      if (missing.every((count) => count === 0)) found.push(split);
      return;
    }
    if (net.every((count) => count === 0)) return choose(index + 1, missing, [...split, vertex.count]);
    for (let plain = vertex.count; plain >= 0 && found.length < 50; plain -= 1) {
      const surplus = 2 * plain - vertex.count;
      choose(
        index + 1,
        missing.map((count, f) => count - surplus * (net[f] ?? 0)),
        [...split, plain],
      );
    }
  };
  choose(0, wanted, []);
  return found;
}

/** Beyond this many steps of the search a graph is taken to exist: every case met in practice ends within a few hundred. */
const LONGEST_SEARCH = 20_000;

/**
 * Whether the pieces can be joined by a tree of at most `lines[f]` lines of each field f. Once they are, what is left
 * of the legs pairs up in any way, so a connected graph exists exactly when such a tree does. The piece with the fewest
 * free legs is joined first: it must be joined to something in the end, so trying all its partners is exhaustive.
 */
function canBeJoined(pieces: readonly HalfEdges[], lines: readonly number[], theory: Theory): boolean {
  const failed = new Set<string>();
  let steps = 0;
  const keyOf = (edges: HalfEdges) => `${edges.plain.join(",")}|${edges.conjugate.join(",")}`;
  const join = (left: readonly HalfEdges[], free: readonly number[]): boolean => {
    if (left.length <= 1 || steps > LONGEST_SEARCH) return true;
    steps += 1;
    // Nearly every search succeeds at once: states are only told apart once one has failed.
    const stateKey = () => `${left.map(keyOf).sort().join(";")}#${free.join(",")}`;
    if (failed.size > 0 && failed.has(stateKey())) return false;
    const sizes = left.map((piece) => piece.plain.reduce((sum, _, f) => sum + countOf(piece, f), 0));
    const chosen = sizes.indexOf(Math.min(...sizes));
    const piece = left[chosen];
    if (!piece) return false;
    const tried = new Set<HalfEdges>();
    for (const [index, partner] of left.entries()) {
      if (index === chosen || tried.has(partner)) continue;
      tried.add(partner);
      for (const joined of joinings(piece, partner, free, theory)) {
        const rest = left.filter((_, other) => other !== chosen && other !== index);
        if (join([...rest, joined.piece], joined.free)) return true;
      }
    }
    failed.add(stateKey());
    return false;
  };
  return join(pieces, lines);
}

/** Whether the kinds of vertices hang together by fields that have internal lines: necessary, and quickly settled. */
function shareFields(vertices: readonly VertexCount[], lines: readonly number[]): boolean {
  if (vertices.length <= 1) return true;
  const reached = new Set([vertices[0]]);
  for (let grew = true; grew;) {
    grew = false;
    for (const vertex of vertices) {
      const meets = (other: VertexCount | undefined) =>
        other !== undefined &&
        lines.some((count, f) => count > 0 && countOf(vertex.edges, f) > 0 && countOf(other.edges, f) > 0);
      if (reached.has(vertex) || ![...reached].some(meets)) continue;
      reached.add(vertex);
      grew = true;
    }
  }
  return reached.size === vertices.length;
}

/** The pieces that one line can make of two, largest supply of lines first. */
function joinings(a: HalfEdges, b: HalfEdges, free: readonly number[], theory: Theory) {
  const sum = addHalfEdges(a, b);
  const made: { piece: HalfEdges; free: readonly number[]; supply: number }[] = [];
  theory.fields.forEach((field, f) => {
    const supply = free[f] ?? 0;
    if (supply === 0) return;
    const has = (side: readonly number[]) => (side[f] ?? 0) > 0;
    const possible = field.selfConjugate
      ? has(a.plain) && has(b.plain)
      : (has(a.plain) && has(b.conjugate)) || (has(a.conjugate) && has(b.plain));
    if (!possible) return;
    const less = (side: readonly number[], by: number) =>
      side.map((count, g) => (g === f ? count - by : count));
    const piece = field.selfConjugate
      ? { plain: less(sum.plain, 2), conjugate: sum.conjugate }
      : { plain: less(sum.plain, 1), conjugate: less(sum.conjugate, 1) };
    made.push({ piece, free: less(free, 1), supply });
  });
  return made.sort((one, other) => other.supply - one.supply);
}

export type Existence = "exists" | "lines do not close" | "falls apart";

/**
 * @param lines internal lines of each field, whole and not negative
 * @returns "lines do not close" when no choice of Hermitian conjugates conserves the fields' numbers,
 *   "falls apart" when the vertices cannot be joined into one piece.
 */
export function graphExists(
  vertices: readonly VertexCount[],
  legs: HalfEdges,
  lines: readonly number[],
  theory: Theory,
): Existence {
  const splits = closingSplits(vertices, legs, theory);
  if (splits.length === 0) return "lines do not close";
  if (!shareFields(vertices, lines)) return "falls apart";
  const exists = splits.some((split) => {
    const pieces = vertices.flatMap(({ edges, count }, index) => {
      const plain = split[index] ?? 0;
      const mirror = plain < count ? conjugated(edges, theory) : edges;
      return Array.from({ length: count }, (_, n) => (n < plain ? edges : mirror));
    });
    return canBeJoined(pieces, lines, theory);
  });
  return exists ? "exists" : "falls apart";
}

/** I_f = (Σ V n_f − E_f)/2 for each field; halves and negative numbers are left for the caller to refuse. */
export function internalLines(vertices: readonly VertexCount[], legs: HalfEdges, theory: Theory): number[] {
  const ends = vertices.reduce(
    (sum, { edges, count }) => addHalfEdges(sum, edges, count),
    noHalfEdges(theory),
  );
  return theory.fields.map((_, f) => (countOf(ends, f) - countOf(legs, f)) / 2);
}
