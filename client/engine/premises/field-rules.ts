/**
 * What each kind of field brings: statistics, whether it is its own conjugate, its dimension and ultraviolet weight.
 *
 * The action is dimensionless, so a field whose kinetic term has k derivatives has dimension (d − k)/2
 * (Peskin and Schroeder 1995, sections 4.1 and 10.1). The weight δ is read off the propagator, p^(2δ − d); it is
 * higher for massive vectors and massive spin 3/2, whose propagators fall off less than their kinetic terms suggest.
 * Anisotropic scaling, measure D + z: ψ†∂ₜψ gives D/2, (∂ₜφ)² gives (D − z)/2.
 */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { FieldKind, Spacetime } from "./theory.ts";

export interface FieldRule {
  readonly statistics: "boson" | "fermion";
  readonly conjugation: "self-conjugate" | "own conjugate unless charged" | "distinct conjugate";
  /** k in (d − k)/2, and k of the weight; null where the kind has no meaning in isotropic spacetime. */
  readonly isotropic: { readonly dimension: number; readonly weight: number } | null;
  /** Time derivatives of the kinetic term: 1 gives D/2, 2 gives (D − z)/2; null where the kind has no such meaning. */
  readonly anisotropic: 1 | 2 | null;
}

const same = (k: number) => ({ dimension: k, weight: k });
const boson = { statistics: "boson" } as const;
const fermion = { statistics: "fermion" } as const;

export const fieldRules: Readonly<Record<FieldKind, FieldRule>> = {
  "real scalar": { ...boson, conjugation: "self-conjugate", isotropic: same(2), anisotropic: 2 },
  "complex scalar": { ...boson, conjugation: "distinct conjugate", isotropic: same(2), anisotropic: 2 },
  "Weyl spinor": { ...fermion, conjugation: "distinct conjugate", isotropic: same(1), anisotropic: 1 },
  "Majorana spinor": { ...fermion, conjugation: "self-conjugate", isotropic: same(1), anisotropic: 1 },
  "Dirac spinor": { ...fermion, conjugation: "distinct conjugate", isotropic: same(1), anisotropic: 1 },
  "gauge potential": {
    ...boson,
    conjugation: "own conjugate unless charged",
    isotropic: same(2),
    anisotropic: null,
  },
  "massive vector": {
    ...boson,
    conjugation: "own conjugate unless charged",
    isotropic: { dimension: 2, weight: 0 },
    anisotropic: null,
  },
  "massive vector, conserved current": {
    ...boson,
    conjugation: "own conjugate unless charged",
    isotropic: same(2),
    anisotropic: null,
  },
  "static heavy field": { ...fermion, conjugation: "distinct conjugate", isotropic: same(1), anisotropic: 1 },
  "spin 3/2": { ...fermion, conjugation: "distinct conjugate", isotropic: same(1), anisotropic: null },
  "massive spin 3/2": {
    ...fermion,
    conjugation: "distinct conjugate",
    isotropic: { dimension: 1, weight: -1 },
    anisotropic: null,
  },
  "metric fluctuation": { ...boson, conjugation: "self-conjugate", isotropic: same(2), anisotropic: null },
  "field strength": {
    ...boson,
    conjugation: "own conjugate unless charged",
    isotropic: same(0),
    anisotropic: null,
  },
  ghost: {
    statistics: "fermion",
    conjugation: "distinct conjugate",
    isotropic: same(2),
    anisotropic: null,
  },
  "Schrödinger field": { ...boson, conjugation: "distinct conjugate", isotropic: null, anisotropic: 1 },
  "anisotropic scalar": {
    ...boson,
    conjugation: "own conjugate unless charged",
    isotropic: null,
    anisotropic: 2,
  },
};

const half = Rational.of(1, 2);

/** Dimension and weight of a kind, or null where it has none in this spacetime. */
export function canonicalDimensions(
  kind: FieldKind,
  spacetime: Spacetime,
): { readonly dimension: LinearForm; readonly weight: LinearForm } | null {
  const rule = fieldRules[kind];
  if (spacetime.geometry === "isotropic") {
    if (!rule.isotropic) return null;
    const lower = (k: number) => spacetime.d.minus(LinearForm.constant(k)).times(half);
    return { dimension: lower(rule.isotropic.dimension), weight: lower(rule.isotropic.weight) };
  }
  if (rule.anisotropic === null) return null;
  const { D, z } = spacetime;
  const dimension = (rule.anisotropic === 1 ? D : D.minus(z)).times(half);
  return { dimension, weight: dimension };
}

/** The rule as LaTeX, with the symbols of the geometry: "\frac{d - 2}{2}". */
export function canonicalDimensionLatex(kind: FieldKind, geometry: Spacetime["geometry"]): string | null {
  const rule = fieldRules[kind];
  if (geometry === "isotropic") {
    if (!rule.isotropic) return null;
    const k = rule.isotropic.dimension;
    return k === 0 ? "\\frac{d}{2}" : `\\frac{d - ${k}}{2}`;
  }
  if (rule.anisotropic === null) return null;
  return rule.anisotropic === 1 ? "\\frac{D}{2}" : "\\frac{D - z}{2}";
}
