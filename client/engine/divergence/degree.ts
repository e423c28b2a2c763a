/** The superficial degree of divergence, computed in two ways that must agree. */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { internalLines } from "./graph-existence.ts";
import { weigh, type HalfEdges } from "./half-edges.ts";

export interface GraphParts {
  readonly vertices: readonly { readonly term: Term; readonly edges: HalfEdges; readonly count: number }[];
  readonly legs: HalfEdges;
}

export interface Degree {
  /** Internal lines of each field. */
  readonly lines: readonly number[];
  readonly loops: number;
  readonly omega: LinearForm;
}

/** Lines and loops come in halves when no graph exists; the degree is exact all the same. */
function exact(count: number): Rational {
  return Rational.of(Math.round(2 * count), 2);
}

/** Σ I_f (measure − 2δ_f): the powers of momentum that the propagators take away. */
export function propagatorPowers(lines: readonly number[], theory: Theory): LinearForm {
  return theory.fields.reduce(
    (sum, field, f) => sum.plus(theory.measure.minus(field.weight.times(2)).times(exact(lines[f] ?? 0))),
    LinearForm.zero,
  );
}

/**
 * Degree by counting momenta: ω = measure·L − Σ I_f (measure − 2δ_f) + Σ V_i k_i, with L = Σ I_f − Σ V_i + 1;
 * and by dimensions: ω = measure − Σ E_f δ_f − Σ V_i [g_i]. Both follow from I_f = (Σ V_i n_if − E_f)/2 alone.
 * Source: Weinberg, The Quantum Theory of Fields I (1995), section 12.1; Peskin, Schroeder (1995), section 10.1.
 *
 * @returns exact forms in d, or D and z; throws if the two ways differ, which would be our own mistake.
 * @example two φ⁴ vertices and four legs in d = 4: lines [2], loops 1, ω = 0
 */
export function degreeOf({ vertices, legs }: GraphParts, theory: Theory): Degree {
  const lines = internalLines(vertices, legs, theory);
  const vertexCount = vertices.reduce((sum, { count }) => sum + count, 0);
  const loops = lines.reduce((sum, count) => sum + count, 0) - vertexCount + 1;
  const derivatives = vertices.reduce(
    (sum, { term, count }) => sum.plus(term.derivativeWeight.times(count)),
    LinearForm.zero,
  );
  const byMomenta = theory.measure
    .times(exact(loops))
    .minus(propagatorPowers(lines, theory))
    .plus(derivatives);
  const couplings = vertices.reduce(
    (sum, { term, count }) => sum.plus(term.ultravioletCoefficient.times(count)),
    LinearForm.zero,
  );
  const byDimensions = theory.measure.minus(weigh(legs, theory, (field) => field.weight)).minus(couplings);
  if (!byMomenta.equals(byDimensions)) {
    throw new Error(
      `degree of divergence: ${byMomenta.toString()} by momenta, ${byDimensions.toString()} by dimensions`,
    );
  }
  return { lines, loops, omega: byDimensions };
}
