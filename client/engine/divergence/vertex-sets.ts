/** Every multiset of interactions that graphs within the caps can be made of. */
import type { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { addHalfEdges, countOf, halfEdgesOf, noHalfEdges, totalOf, type HalfEdges } from "./half-edges.ts";

export interface Interaction {
  readonly term: Term;
  readonly edges: HalfEdges;
  readonly legs: number;
  /** [g] with ultraviolet weights. */
  readonly coefficient: Rational;
  /** Order in 1/Λ that one insertion costs: max(0, −[g]). */
  readonly order: Rational;
}

/** Vertices with total n − 2 = `surplus`, so that L = surplus/2 − E/2 + 1. */
export interface VertexSet {
  readonly vertices: readonly {
    readonly interaction: Interaction;
    readonly edges: HalfEdges;
    readonly count: number;
  }[];
  readonly edges: HalfEdges;
  /** Σ V (n − 2). */
  readonly surplus: number;
  /** Σ V [g]: what the vertices take from the degree. */
  readonly coefficients: Rational;
  readonly order: Rational;
  /** The order as text, to find sets of equal order by. */
  readonly orderKey: string;
}

/** Interactions as they stand, for any dimension: what is neither kinetic nor a source. */
export function interactionTerms(theory: Theory): { readonly term: Term; readonly edges: HalfEdges }[] {
  return theory.terms.flatMap((term) => {
    const edges = halfEdgesOf(term.monomial, theory);
    return term.kinetic || !edges || totalOf(edges) < 2 ? [] : [{ term, edges }];
  });
}

/**
 * The interactions that can raise a degree or close a loop. Bilinear terms of dimension [g] ≥ 0 (masses) only lower it
 * and change neither loops nor legs, and sources have one leg: both are left out. Null when a dimension is symbolic.
 */
export function interactionsOf(theory: Theory): Interaction[] | null {
  const found: Interaction[] = [];
  for (const { term, edges } of interactionTerms(theory)) {
    const coefficient = term.ultravioletCoefficient.asRational();
    if (!coefficient) return null;
    const legs = totalOf(edges);
    if (legs === 2 && coefficient.sign() >= 0) continue;
    const order = coefficient.sign() < 0 ? coefficient.negated() : Rational.zero;
    found.push({ term, edges, legs, coefficient, order });
  }
  return found;
}

/** @returns null when there are more than `most`. The empty set is among them. */
export function vertexSets(
  interactions: readonly Interaction[],
  theory: Theory,
  caps: { readonly surplus: number; readonly order: Rational },
  most: number,
): VertexSet[] | null {
  const empty: VertexSet = {
    vertices: [],
    edges: noHalfEdges(theory),
    surplus: 0,
    coefficients: Rational.zero,
    order: Rational.zero,
    orderKey: "0",
  };
  let sets: VertexSet[] = [empty];
  for (const interaction of interactions) {
    const grown: VertexSet[] = [];
    for (const set of sets) {
      for (let count = 0; ; count += 1) {
        const next = count === 0 ? set : insert(set, interaction, count);
        if (next.surplus > caps.surplus || next.order.compare(caps.order) > 0) break;
        grown.push(next);
        if (grown.length > most) return null;
      }
    }
    sets = grown;
  }
  return sets;
}

/** Terminates above because an interaction costs either legs or order: bilinears with [g] ≥ 0 are not among them. */
function insert(set: VertexSet, interaction: Interaction, count: number): VertexSet {
  const times = Rational.of(count);
  const order = set.order.plus(interaction.order.times(times));
  return {
    vertices: [...set.vertices, { interaction, edges: interaction.edges, count }],
    edges: addHalfEdges(set.edges, interaction.edges, count),
    surplus: set.surplus + count * (interaction.legs - 2),
    coefficients: set.coefficients.plus(interaction.coefficient.times(times)),
    order,
    orderKey: order.toString(),
  };
}

/** Vertex sets by what a graph fixes about them: Σ V (n − 2), and whether each field has an even number of legs. */
export interface SetIndex {
  /** Those from which L loops and the given legs can be made, as far as numbers go; least taken from the degree first. */
  find(loops: number, legs: HalfEdges): readonly VertexSet[];
}

export function indexSets(sets: readonly VertexSet[]): SetIndex {
  const keyOf = (surplus: number, edges: HalfEdges) =>
    `${surplus}|${edges.plain.map((_, f) => countOf(edges, f) % 2).join("")}`;
  // Of sets with the same legs and order only the one that takes least from the degree can matter.
  const strongest = new Map<string, VertexSet>();
  for (const set of sets) {
    const key = `${set.edges.plain.join(",")}|${set.edges.conjugate.join(",")}|${set.surplus}|${set.orderKey}`;
    const rival = strongest.get(key);
    if (!rival || set.coefficients.compare(rival.coefficients) < 0) strongest.set(key, set);
  }
  const groups = new Map<string, VertexSet[]>();
  for (const set of strongest.values()) {
    const key = keyOf(set.surplus, set.edges);
    const group = groups.get(key);
    if (group) group.push(set);
    else groups.set(key, [set]);
  }
  for (const group of groups.values()) group.sort((a, b) => a.coefficients.compare(b.coefficients));
  return { find: (loops, legs) => groups.get(keyOf(2 * (loops - 1) + totalOf(legs), legs)) ?? [] };
}

/** A number as a linear form, for weights that must be numbers here. */
export function numberOf(form: LinearForm): Rational {
  const value = form.asRational();
  if (!value) throw new Error(`a number was expected where ${form.toString()} stands`);
  return value;
}
