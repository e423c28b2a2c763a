/** The graphs that given vertices and legs have, to be drawn: each with its symmetry factor and nested divergences. */
import { enumerateGraphs } from "../graphs/enumerate.ts";
import type { Graph, GraphRequest, VertexKind } from "../graphs/graph.ts";
import type { Term, Theory } from "../premises/theory.ts";
import type { GraphParts } from "./degree.ts";
import { cancelsByCharge } from "./charge-conjugation.ts";
import { closingSplits } from "./graph-existence.ts";
import { conjugated, sameHalfEdges, totalOf } from "./half-edges.ts";
import type { DivergenceInputs } from "./inputs.ts";
import { lineStyle, vertexMark } from "./line-styles.ts";
import { nestedDivergences, type Allowance } from "./nested.ts";
import type { GraphPictures } from "./value.ts";

/** Bounds that keep typing quick: partial graphs looked at, graphs told, choices of lines for nested divergences. */
const MOST_STEPS = 6_000;
const MOST_TOLD = 60;
const MOST_LOOPS = 6;
const MOST_LEGS = 10;
const MOST_VERTICES = 12;
/** Many sources make graphs with so many symmetries that telling them apart takes long. */
const MOST_SOURCES = 4;
const MOST_CHOICES = 12_000;

/** Which graphs are listed, and whether their legs are told apart. */
export type Listing = Pick<DivergenceInputs, "leftOut" | "toldLegs" | "furry">;

interface Kinds {
  readonly vertices: readonly VertexKind[];
  /** The term of each kind, and whether it is the Hermitian conjugate. */
  readonly terms: readonly { readonly term: Term; readonly mirrored: boolean }[];
}

/** A term stands for itself and its Hermitian conjugate: each way to take them apart that closes the lines. */
function kindsOf({ vertices, legs }: GraphParts, theory: Theory): Kinds[] {
  return closingSplits(vertices, legs, theory).map((split) => {
    const kinds = vertices.flatMap(({ term, edges, count }, index) => {
      const plain = split[index] ?? count;
      const mirror = conjugated(edges, theory);
      if (sameHalfEdges(edges, mirror)) return [{ term, edges, count, mirrored: false }];
      return [
        { term, edges, count: plain, mirrored: false },
        { term, edges: mirror, count: count - plain, mirrored: true },
      ].filter((kind) => kind.count > 0);
    });
    return {
      vertices: kinds.map(({ term, edges, count, mirrored }) => ({
        id: mirrored ? `${term.rowId}*` : term.rowId,
        legs: edges,
        count,
      })),
      terms: kinds.map(({ term, mirrored }) => ({ term, mirrored })),
    };
  });
}

/**
 * One-particle irreducible graphs; where there are none, the connected ones. Lists are cut at fixed bounds, and say so.
 *
 * @returns null above six loops, ten legs, twelve vertices or four of them with a single leg
 */
export function picturesOf(
  graph: GraphParts,
  loops: number,
  theory: Theory,
  listing: Listing,
): GraphPictures | null {
  const vertexCount = graph.vertices.reduce((sum, { count }) => sum + count, 0);
  if (loops > MOST_LOOPS || totalOf(graph.legs) > MOST_LEGS || vertexCount > MOST_VERTICES) return null;
  const sources = graph.vertices.reduce((sum, { edges, count }) => sum + (totalOf(edges) < 2 ? count : 0), 0);
  if (sources > MOST_SOURCES) return null;
  const kinds = kindsOf(graph, theory);
  const irreducible = listAll(kinds, graph, theory, listing, true);
  // Where graphs are left out on request, an empty list says so: reducible ones are no substitute.
  const isEmpty = listing.leftOut === "nothing" && irreducible.graphs.length === 0 && !irreducible.truncated;
  const all = isEmpty ? listAll(kinds, graph, theory, listing, false) : irreducible;
  const graphs =
    listing.furry === "no"
      ? all.graphs
      : all.graphs.filter(
          ({ found, split }) =>
            !cancelsByCharge(found, kinds[split]?.terms.map(({ term }) => term) ?? [], theory),
        );
  const allowance: Allowance = { choices: MOST_CHOICES };
  // Kinds of every split are told in one list, so that a graph's vertices can name them.
  const offsets = kinds.map((_, n) => kinds.slice(0, n).reduce((sum, { terms }) => sum + terms.length, 0));
  const allTerms = kinds.flatMap(({ terms }) => terms);
  return {
    irreducible: !isEmpty,
    count: graphs.length,
    complete: !all.truncated,
    labelled: listing.toldLegs === "labelled",
    leftOut: listing.leftOut,
    cancelled: listing.furry === "no" ? null : all.graphs.length - graphs.length,
    fields: theory.fields.map((field, f) => ({
      symbol: field.symbol,
      latex: field.latex,
      style: lineStyle(field, f, theory),
      directed: !field.selfConjugate,
    })),
    kinds: allTerms.map(({ term, mirrored }) => ({
      termRowId: term.rowId,
      latex: mirrored ? `\\bigl(${term.latex}\\bigr)^\\dagger` : term.latex,
      mark: vertexMark(term, theory),
    })),
    list: graphs.slice(0, MOST_TOLD).map(({ found, split }) => {
      const shifted = { ...found, vertices: found.vertices.map((kind) => kind + (offsets[split] ?? 0)) };
      return {
        ...shifted,
        nested:
          found.loops < 1
            ? []
            : nestedDivergences(
                shifted,
                allTerms.map(({ term }) => term),
                theory,
                allowance,
              ),
      };
    }),
  };
}

function listAll(
  kinds: readonly Kinds[],
  { legs }: GraphParts,
  theory: Theory,
  { leftOut, toldLegs }: Listing,
  onlyOneParticleIrreducible: boolean,
): { graphs: { readonly found: Graph; readonly split: number }[]; truncated: boolean } {
  const graphs: { found: Graph; split: number }[] = [];
  let truncated = false;
  const fields: GraphRequest["fields"] = theory.fields.map(({ symbol, selfConjugate }) => ({
    id: symbol,
    directed: !selfConjugate,
  }));
  for (const [split, { vertices }] of kinds.entries()) {
    const list = enumerateGraphs({
      fields,
      vertices,
      external: legs,
      onlyOneParticleIrreducible,
      dropSelfLoops: leftOut !== "nothing",
      dropTadpoles: leftOut === "tadpole parts",
      labelledLegs: toldLegs === "labelled",
      mostSteps: Math.floor(MOST_STEPS / kinds.length),
    });
    graphs.push(...list.graphs.map((found) => ({ found, split })));
    truncated ||= list.truncated;
  }
  return { graphs, truncated };
}
