/** The terms of a theory as an order plan counts them: an order and a size that follows p and Λ. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";

/** Where sizes are taken: factors relative to the working point. */
export interface Point {
  readonly probe: number;
  readonly heavy: number;
  /** Sizes given by hand, by row id, where they differ from what is stated. */
  readonly assigned?: ReadonlyMap<string, number>;
}
export const workingPoint: Point = { probe: 1, heavy: 1 };

export interface PlanTerm {
  readonly rowId: string;
  readonly latex: string;
  /** Fields of the term. */
  readonly legs: number;
  /** Power of Q it costs: Δ − d; 0 for relevant terms whose size is given by hand. */
  readonly order: Rational;
  /** Δ − d, which says how its size follows p whatever its order. */
  readonly excess: Rational;
  readonly natural: number;
  readonly assigned: Term["assigned"];
}

export interface PlanTerms {
  readonly terms: readonly PlanTerm[];
  readonly problems: readonly Problem[];
}

/**
 * Every term but the kinetic ones. A relevant term that outweighs the leading amplitude at its natural size and has no
 * size of its own is left out and named, and so is a term whose typed size cannot be read.
 *
 * @returns null when a dimension is symbolic.
 */
export function planTerms(theory: Theory, Q: number): PlanTerms | null {
  const problems: Problem[] = [];
  const terms: PlanTerm[] = [];
  for (const term of theory.terms) {
    const legs = term.monomial.fields.reduce((sum, { count }) => sum + count, 0);
    if (term.kinetic || legs === 0) continue;
    const excess = term.coefficient.asRational()?.negated();
    if (!excess) return null;
    const order = excess.sign() < 0 ? Rational.zero : excess;
    const { rowId, latex, assigned } = term;
    const read = { rowId, latex, legs, order, excess, natural: Math.abs(term.natural), assigned };
    const size = sizeOf(read, Q, workingPoint);
    const refuse = (code: string) => problems.push({ code, path: ["standsOn"], facts: { latex, rowId } });
    if (Number.isNaN(size)) refuse("plan-size-unreadable");
    else if (excess.sign() < 0 && !assigned && size >= 1) refuse("plan-relevant-unassigned");
    else terms.push(read);
  }
  return { terms, problems };
}

/**
 * Size relative to the leading amplitude. By dimension ĝ (p/Λ)^(Δ−d). A size given by hand is one at the working point;
 * its coefficient being fixed, it follows p with the same power, and does not know Λ.
 * Source: Weinberg 1979, Physica A 96, 327; the dependence of assigned sizes on p is an own derivation.
 *
 * @param Q p/Λ at the working point
 */
export function sizeOf(term: PlanTerm, Q: number, point: Point): number {
  const power = term.excess.toFloat();
  const given = point.assigned?.get(term.rowId) ?? term.assigned?.value;
  if (given !== undefined) return Math.abs(given) * point.probe ** power;
  return term.natural * ((Q * point.probe) / point.heavy) ** power;
}
