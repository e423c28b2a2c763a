/** Whether a regulator offers what a graph of degree ω leaves to be made up beside an operator's derivatives. */
import { isAnalytic } from "../divergence/counterterms.ts";
import { Rational } from "../exact/rational.ts";
import type { Frame } from "./frame.ts";
import type { InsertionSet } from "./insertion-sets.ts";
import type { Target } from "./targets.ts";

const two = Rational.of(2);

function isOdd(value: Rational | null): boolean {
  return value?.isInteger() === true && !value.over(two).isInteger();
}

export interface Remainder {
  /** What masses that break chirality add to the order, in units of the frame. */
  readonly order: number;
  /** Whether each part of a graph whose loops are its own must have an even number of them. */
  readonly evenLoops: boolean;
}

/**
 * Dimensional regularisation: a pole's coefficient is a product of couplings and masses, so the rest is made up by
 * powers of masses, analytically. In odd d there is no pole at odd loop order, and none for Schrödinger lines alone when
 * D·L is odd; where the loops of parts multiply that holds for each part (Collins 1984, chapters 3 and 5; the rule for
 * Schrödinger lines is an own derivation).
 * Cutoff: powers of it make up any rest, except that an odd power too many in the symmetric integral over d·L momenta
 * needs a broken chirality (own derivation): a fermion's mass gets no linear divergence where chirality protects it.
 *
 * @param rest ω minus the weight of the derivatives, in units, not negative
 * @param oddMass order of the masses that break chirality; null where there are none
 * @returns null when it is not made up
 */
export function remainderOf(
  rest: number,
  set: InsertionSet,
  target: Target,
  loops: number,
  oddMass: number | null,
  frame: Frame,
): Remainder | null {
  const { theory, settings, units } = frame;
  const { spacetime } = theory;
  const left = units.exact(rest);
  const free: Remainder = { order: 0, evenLoops: false };
  const withOddMass = oddMass === null ? null : { ...free, order: oddMass };
  if (settings.cutoff) {
    const d = spacetime.geometry === "isotropic" ? spacetime.d.asRational() : null;
    if (!d?.isInteger() || !left.isInteger()) return free;
    return isOdd(left.minus(d.times(Rational.of(loops)))) ? withOddMass : free;
  }
  const lines = theory.fields.map((_, f) => ((set.counts[f] ?? 0) - (target.counts[f] ?? 0)) / 2);
  const onlySchroedinger = theory.fields.every(
    ({ kind }, f) => kind === "Schrödinger field" || lines[f] === 0,
  );
  const evenLoops =
    spacetime.geometry === "isotropic"
      ? isOdd(spacetime.d.asRational())
      : onlySchroedinger && isOdd(spacetime.D.asRational());
  if (evenLoops && loops % 2 === 1) return null;
  if (rest === 0) return { ...free, evenLoops };
  if (!lines.some((count, f) => count > 0 && frame.canHaveMass[f])) return null;
  const time = spacetime.geometry === "anisotropic" ? spacetime.z.asRational() : null;
  if (isAnalytic(left, time, target.schroedinger, false)) return { ...free, evenLoops };
  return withOddMass && isAnalytic(left, time, target.schroedinger, true)
    ? { ...withOddMass, evenLoops }
    : null;
}
