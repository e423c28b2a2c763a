/**
 * One-loop β functions of a potential. In minimal subtraction the divergence of the one-loop effective potential gives
 *   d = 4, one loop:  μ dV/dμ = (1/32π²) Tr (V″)²           (Coleman and Weinberg 1973; 't Hooft 1973)
 *   d = 3, two loops: μ dV/dμ = (1/3)(1/8π)² V_ijk V_ijk     (Pisarski 1982; O'Dwyer and Osborn 2008)
 * for canonically normalised real scalars. Complex ones are kept as φ and φ*: a sum over two real fields is a sum over
 * both, each contracted with its conjugate. A field of N components enters by its length r: V″ is then ∂²V/∂r² along
 * it and V′/r in the N − 1 directions across it.
 */
import { Rational } from "../exact/rational.ts";
import type { ScalarVariable } from "./model.ts";
import { Polynomial } from "./polynomial.ts";

/** V′/r, a polynomial when V is even in r. */
function across(potential: Polynomial, { name }: ScalarVariable): Polynomial {
  return potential.derivative(name).shifted({ coefficient: Rational.one, powers: new Map([[name, -1]]) });
}

function manifold(scalars: readonly ScalarVariable[]): readonly ScalarVariable[] {
  return scalars.filter(({ components }) => components !== 1);
}

/** Tr (V″)². @example traceOfSquare(λφ⁴/24, [φ]) // λ²φ⁴/4 */
export function traceOfSquare(potential: Polynomial, scalars: readonly ScalarVariable[]): Polynomial {
  const parts = scalars.flatMap((a) => {
    const first = potential.derivative(a.name);
    const barred = potential.derivative(a.conjugate);
    return scalars.map((b) => first.derivative(b.name).times(barred.derivative(b.conjugate)));
  });
  const crosswise = manifold(scalars).map((a) => {
    const w = across(potential, a);
    return w.times(w).scaled(Rational.of(a.components - 1));
  });
  return Polynomial.sum([...parts, ...crosswise]);
}

/**
 * V_ijk V_ijk. Of three directions two may be the same one across a vector of N components; V_tti is then ∂_i(V′/r), and
 * the odd one out stands in three places.
 */
export function squareOfThird(potential: Polynomial, scalars: readonly ScalarVariable[]): Polynomial {
  const parts = scalars.flatMap((a) =>
    scalars.flatMap((b) => {
      const second = potential.derivative(a.name).derivative(b.name);
      const barred = potential.derivative(a.conjugate).derivative(b.conjugate);
      return scalars.map((c) => second.derivative(c.name).times(barred.derivative(c.conjugate)));
    }),
  );
  const crosswise = manifold(scalars).flatMap((a) => {
    const w = across(potential, a);
    return scalars.map((c) =>
      w
        .derivative(c.name)
        .times(w.derivative(c.conjugate))
        .scaled(Rational.of(3 * (a.components - 1))),
    );
  });
  return Polynomial.sum([...parts, ...crosswise]);
}

/**
 * λ_aklm λ_bklm of the quartic terms, for two variables: γ_ab = λ_aklm λ_bklm / 12 (16π²)² at two loops
 * (Jack and Osborn 1990; for O(N) it is (N + 2) λ²/36). `b` is contracted with its conjugate.
 */
export function quarticSquare(
  quartic: Polynomial,
  scalars: readonly ScalarVariable[],
  a: ScalarVariable,
  b: ScalarVariable,
): Polynomial {
  const [one, other] = [quartic.derivative(a.name), quartic.derivative(b.conjugate)];
  const parts = scalars.flatMap((k) =>
    scalars.flatMap((l) =>
      scalars.map((m) =>
        [k, l, m]
          .reduce((of, { name }) => of.derivative(name), one)
          .times([k, l, m].reduce((of, { conjugate }) => of.derivative(conjugate), other)),
      ),
    ),
  );
  const crosswise = manifold(scalars).flatMap((c) => {
    const w = across(quartic, c);
    return scalars.map((m) =>
      w
        .derivative(a.name)
        .derivative(m.name)
        .times(w.derivative(b.conjugate).derivative(m.conjugate))
        .scaled(Rational.of(3 * (c.components - 1))),
    );
  });
  return Polynomial.sum([...parts, ...crosswise]);
}
