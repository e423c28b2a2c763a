/**
 * Legs of vertices and of amplitudes, counted by field. A leg ψ of an amplitude is a factor ψ of its vertices that no
 * internal line uses up, so that the counterterm of an amplitude has the amplitude's own legs as its factors.
 */
import { LinearForm } from "../exact/linear-form.ts";
import type { Monomial } from "../notation/monomial.ts";
import type { Field, Theory } from "../premises/theory.ts";

/** How many factors of each field of a theory, in the order of `Theory.fields`; self-conjugate fields count as plain. */
export interface HalfEdges {
  readonly plain: readonly number[];
  readonly conjugate: readonly number[];
}

export function noHalfEdges(theory: Theory): HalfEdges {
  const zeros = theory.fields.map(() => 0);
  return { plain: zeros, conjugate: zeros };
}

/** @returns null when the monomial names a field that the theory does not have. */
export function halfEdgesOf(monomial: Monomial, theory: Theory): HalfEdges | null {
  const plain = theory.fields.map(() => 0);
  const conjugate = theory.fields.map(() => 0);
  for (const factor of monomial.fields) {
    const index = theory.fields.findIndex(({ symbol }) => symbol === factor.symbol);
    const field = theory.fields[index];
    if (!field) return null;
    const side = factor.conjugated && !field.selfConjugate ? conjugate : plain;
    side[index] = (side[index] ?? 0) + factor.count;
  }
  return { plain, conjugate };
}

export function addHalfEdges(a: HalfEdges, b: HalfEdges, times = 1): HalfEdges {
  return {
    plain: a.plain.map((count, f) => count + times * (b.plain[f] ?? 0)),
    conjugate: a.conjugate.map((count, f) => count + times * (b.conjugate[f] ?? 0)),
  };
}

/** The legs of the Hermitian conjugate. */
export function conjugated(edges: HalfEdges, theory: Theory): HalfEdges {
  const swap = (one: readonly number[], other: readonly number[]) =>
    theory.fields.map((field, f) => (field.selfConjugate ? one[f] : other[f]) ?? 0);
  return { plain: swap(edges.plain, edges.conjugate), conjugate: swap(edges.conjugate, edges.plain) };
}

/** Legs of field and conjugate together. */
export function countOf(edges: HalfEdges, field: number): number {
  return (edges.plain[field] ?? 0) + (edges.conjugate[field] ?? 0);
}

export function totalOf(edges: HalfEdges): number {
  return edges.plain.reduce((sum, _, field) => sum + countOf(edges, field), 0);
}

/** ψ's minus ψ̄'s of each field; 0 for self-conjugate fields, whose lines have no direction. */
export function netOf(edges: HalfEdges, theory: Theory): number[] {
  return theory.fields.map((field, f) =>
    field.selfConjugate ? 0 : (edges.plain[f] ?? 0) - (edges.conjugate[f] ?? 0),
  );
}

export function sameHalfEdges(a: HalfEdges, b: HalfEdges): boolean {
  return (
    a.plain.every((count, f) => count === b.plain[f]) &&
    a.conjugate.every((count, f) => count === b.conjugate[f])
  );
}

/** Σ n_f x_f over the legs, x one exact number per field. */
export function weigh(edges: HalfEdges, theory: Theory, number: (field: Field) => LinearForm): LinearForm {
  return theory.fields.reduce((sum, field, f) => {
    const count = countOf(edges, f);
    return count === 0 ? sum : sum.plus(number(field).times(count));
  }, LinearForm.zero);
}
