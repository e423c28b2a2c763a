/** The terms of a theory as an order plan counts them: an order and a size that follows p and Λ. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";

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
    const size = sizeOf(read, Q);
    const refuse = (code: string) => problems.push({ code, path: ["standsOn"], facts: { latex, rowId } });
    if (Number.isNaN(size)) refuse("plan-size-unreadable");
    else if (excess.sign() < 0 && !assigned && size >= 1) refuse("plan-relevant-unassigned");
    else terms.push(read);
  }
  return { terms, problems };
}

/**
 * Size relative to the leading amplitude at the working point: ĝ Q^(Δ−d) by dimension, or what was given by hand.
 * Source: Weinberg 1979, Physica A 96, 327.
 */
export function sizeOf(term: PlanTerm, Q: number): number {
  return term.assigned ? Math.abs(term.assigned.value) : term.natural * Q ** term.excess.toFloat();
}

/**
 * How the size follows p and Λ, as powers. A size given by hand is one at the working point: as its coefficient is fixed
 * it follows p all the same, but does not know Λ. (Own derivation.)
 */
export function powersOf({ excess, assigned }: PlanTerm): { readonly probe: number; readonly heavy: number } {
  const power = excess.toFloat();
  return { probe: power, heavy: assigned ? 0 : -power };
}
