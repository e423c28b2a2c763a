/** What symmetries say about external legs: their charges must add to nothing, and fermions come in pairs. */
import { Rational } from "../exact/rational.ts";
import type { Symmetry, Theory } from "../premises/theory.ts";
import { countOf, type HalfEdges } from "./half-edges.ts";

/** The first symmetry whose charges do not add to zero (modulo n for Z_n); null when all allow the legs. */
export function forbiddingSymmetry(legs: HalfEdges, theory: Theory): Symmetry | null {
  const broken = theory.symmetries.find((symmetry, s) => {
    const charge = theory.fields.reduce((sum, field, f) => {
      const net = (legs.plain[f] ?? 0) - (legs.conjugate[f] ?? 0);
      return sum.plus((field.charges[s] ?? Rational.zero).times(Rational.of(net)));
    }, Rational.zero);
    return symmetry.modulus === null
      ? charge.sign() !== 0
      : !charge.over(Rational.of(symmetry.modulus)).isInteger();
  });
  return broken ?? null;
}

/** Whether an odd number of fermions is left over, which rotation by 2π forbids. Ghosts anticommute and count too. */
export function isFermionOdd(legs: HalfEdges, theory: Theory): boolean {
  const fermions = theory.fields.reduce(
    (sum, field, f) => sum + (field.statistics === "fermion" ? countOf(legs, f) : 0),
    0,
  );
  return fermions % 2 !== 0;
}
