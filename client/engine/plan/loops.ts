/** Loops that go with an order. Dimensions do not count them: a loop of marginal couplings costs no power of Q. */
import type { Theory } from "../premises/theory.ts";
import type { Entry } from "./entries.ts";
import type { PlanTerm } from "./terms.ts";

/** Γ at half-integers and integers by recurrence; d/2 with whole d is one of them. */
function gammaOfHalf(twice: number): number {
  let value = twice % 2 === 0 ? 1 : Math.sqrt(Math.PI);
  for (let x = twice % 2 === 0 ? 1 : 0.5; x < twice / 2; x += 1) value *= x;
  return value;
}

/**
 * Size of one loop with couplings of 1: ∫ dᵈk/(2π)ᵈ has the angular factor 1/((4π)^(d/2) Γ(d/2)), up to a factor of 2
 * that estimates do not see. 1/(16π²) in d = 4. Source: Manohar, Georgi 1984, Nucl. Phys. B 234, 189, for d = 4.
 *
 * @returns null unless d is a positive whole number.
 */
export function loopFactor(theory: Theory): number | null {
  if (theory.spacetime.geometry !== "isotropic") return null;
  const d = theory.spacetime.d.asRational();
  if (!d?.isInteger() || d.sign() <= 0 || d.numerator > 40n) return null;
  const whole = Number(d.numerator);
  return 1 / ((4 * Math.PI) ** (whole / 2) * gammaOfHalf(whole));
}

/** Most loops that insertions of suppressed terms can make by themselves: L = Σ V (n − 2)/2 − E/2 + 1 with E ≥ 2. */
export function loopsOfInsertions(entries: readonly Entry[]): number {
  const loopsOf = (side: Entry["insertions"]) =>
    Math.max(0, Math.floor(side.reduce((sum, { term, count }) => sum + (count * (term.legs - 2)) / 2, 0)));
  return entries.reduce((most, { sides }) => Math.max(most, ...sides.map(loopsOf)), 0);
}

/** Whether leading interactions exist that can close loops without a power of Q. */
export function hasLeadingLoops(terms: readonly PlanTerm[]): boolean {
  return terms.some(({ order, legs }) => order.sign() === 0 && legs > 2);
}

/** The fewest L for which one loop more, at `factor` each, falls below the target. */
export function loopsForTarget(size: number, factor: number, target: number): number {
  let loops = 0;
  while (size * factor ** (loops + 1) >= target && loops < 50) loops += 1;
  return loops;
}
