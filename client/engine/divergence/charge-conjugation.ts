/** Furry's theorem: which graphs cancel against the one whose closed fermion line runs the other way. */
import type { Graph } from "../graphs/graph.ts";
import type { Field, Term, Theory } from "../premises/theory.ts";
import { halfEdgesOf, type HalfEdges } from "./half-edges.ts";

/**
 * Whether a closed Dirac line of the graph meets vector potentials an odd number of times. Every vertex on it must be
 * ψ̄ψ times real scalars and vectors, without derivatives: ψ̄ψ and ψ̄iγ₅ψ are even under charge conjugation and ψ̄γᵘψ is
 * odd. That the vector couplings are of this kind, without γ₅ and without matrices, is for whoever asks to say.
 * Source: Furry, Phys. Rev. 51 (1937) 125.
 *
 * @param kinds the term of each index in `graph.vertices`
 * @example the QED triangle with three photon legs: true; the box with four: false
 */
export function cancelsByCharge(graph: Graph, kinds: readonly Term[], theory: Theory): boolean {
  const terms = graph.vertices.map((kind) => kinds[kind]);
  const legs = terms.map((term) => (term ? halfEdgesOf(term.monomial, theory) : null));
  const vectorsAt = (vertex: number, fermion: number): number | null => {
    const [term, edges] = [terms[vertex], legs[vertex]];
    if (!term || !edges || term.derivativeWeight.asRational()?.sign() !== 0) return null;
    return vectorsBeside(edges, fermion, theory);
  };
  return theory.fields.some((field, f) => {
    if (field.kind !== "Dirac spinor") return false;
    const opened = new Set(graph.legs.flatMap((leg) => (leg.field === f ? [leg.vertex] : [])));
    return linesOf(graph, f).some((line) => {
      if (line.some((vertex) => opened.has(vertex))) return false;
      const vectors = line.map((vertex) => vectorsAt(vertex, f));
      return (
        vectors.every((count) => count !== null) &&
        vectors.reduce((sum: number, count) => sum + count, 0) % 2 === 1
      );
    });
  });
}

/** Vector legs of a vertex ψ̄ψ × real scalars and vectors; null for any other vertex. */
function vectorsBeside(edges: HalfEdges, fermion: number, theory: Theory): number | null {
  let vectors = 0;
  for (const [f, field] of theory.fields.entries()) {
    const [plain, conjugate] = [edges.plain[f] ?? 0, edges.conjugate[f] ?? 0];
    if (f === fermion) {
      if (plain !== 1 || conjugate !== 1) return null;
    } else if (isVector(field)) vectors += plain;
    else if (plain + conjugate > 0 && field.kind !== "real scalar") return null;
  }
  return vectors;
}

function isVector({ kind }: Field): boolean {
  return kind === "gauge potential" || kind.startsWith("massive vector");
}

/** The vertices that lines of one field join, piece by piece. */
function linesOf(graph: Graph, field: number): number[][] {
  const pieces: number[][] = [];
  for (const { from, to, field: other } of graph.edges) {
    if (other !== field) continue;
    const met = pieces.filter((piece) => piece.includes(from) || piece.includes(to));
    const merged = [...new Set([...met.flat(), from, to])];
    for (const piece of met) pieces.splice(pieces.indexOf(piece), 1);
    pieces.push(merged);
  }
  return pieces;
}
