/** How the lines and vertices of a theory are drawn, by the conventions of the trade. */
import type { Field, Term, Theory } from "../premises/theory.ts";
import { countOf, halfEdgesOf, totalOf } from "./half-edges.ts";
import type { LineStyle, VertexMark } from "./value.ts";

/**
 * Fermions solid, vectors wavy or, where they meet themselves, curly, static fields and gravitons double, ghosts dotted.
 * Scalars are dashed beside other kinds; in a theory of scalars alone they are solid, as papers on them draw.
 */
export function lineStyle(field: Field, index: number, theory: Theory): LineStyle {
  switch (field.kind) {
    case "real scalar":
    case "complex scalar":
    case "anisotropic scalar":
      return theory.fields.every(({ kind }) => kind.endsWith("scalar")) ? "solid" : "dashed";
    case "gauge potential":
    case "field strength":
      return meetsItself(index, theory) ? "curly" : "wavy";
    case "massive vector":
    case "massive vector, conserved current":
      return "wavy";
    case "static heavy field":
    case "spin 3/2":
    case "massive spin 3/2":
      return "double";
    case "metric fluctuation":
      return "double wavy";
    case "ghost":
      return "dotted";
    default:
      return "solid";
  }
}

function meetsItself(index: number, theory: Theory): boolean {
  return theory.terms.some(({ monomial }) => {
    const edges = halfEdgesOf(monomial, theory);
    return edges !== null && countOf(edges, index) >= 3;
  });
}

/** A dot for what is inserted: two-legged terms, and those whose coefficient has a negative dimension. */
export function vertexMark(term: Term, theory: Theory): VertexMark {
  const edges = halfEdgesOf(term.monomial, theory);
  const isShort = edges !== null && totalOf(edges) <= 2;
  return isShort || (term.ultravioletCoefficient.asRational()?.sign() ?? 0) < 0 ? "insertion" : "vertex";
}
