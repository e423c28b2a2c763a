/** Every multiset of interactions that graphs within the caps can be made of. */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { addHalfEdges, halfEdgesOf, noHalfEdges, totalOf, type HalfEdges } from "./half-edges.ts";

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
  return {
    vertices: [...set.vertices, { interaction, edges: interaction.edges, count }],
    edges: addHalfEdges(set.edges, interaction.edges, count),
    surplus: set.surplus + count * (interaction.legs - 2),
    coefficients: set.coefficients.plus(interaction.coefficient.times(times)),
    order: set.order.plus(interaction.order.times(times)),
  };
}

/** A number as a linear form, for weights that must be numbers here. */
export function numberOf(form: LinearForm): Rational {
  const value = form.asRational();
  if (!value) throw new Error(`a number was expected where ${form.toString()} stands`);
  return value;
}
