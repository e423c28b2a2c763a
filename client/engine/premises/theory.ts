/** The theory that premises state, read and exact: what every other kind computes from. */
import type { LinearForm } from "../exact/linear-form.ts";
import type { Rational } from "../exact/rational.ts";
import type { Problem } from "../evaluation.ts";
import type { Monomial } from "../notation/monomial.ts";

export const fieldKinds = [
  "real scalar",
  "complex scalar",
  "Weyl spinor",
  "Majorana spinor",
  "Dirac spinor",
  "gauge potential",
  "massive vector",
  "massive vector, conserved current",
  "static heavy field",
  "spin 3/2",
  "massive spin 3/2",
  "metric fluctuation",
  "field strength",
  "ghost",
  "Schrödinger field",
  "anisotropic scalar",
] as const;
export type FieldKind = (typeof fieldKinds)[number];

export type Spacetime =
  | { readonly geometry: "isotropic"; readonly d: LinearForm }
  | { readonly geometry: "anisotropic"; readonly D: LinearForm; readonly z: LinearForm };

export interface Symmetry {
  readonly rowId: string;
  readonly name: string;
  /** Charges add modulo `modulus` for Z_n; null for U(1). */
  readonly modulus: bigint | null;
}

export interface Field {
  readonly rowId: string;
  /** As typed, canonical: "chi", "psi". */
  readonly symbol: string;
  readonly latex: string;
  readonly kind: FieldKind;
  readonly statistics: "boson" | "fermion";
  /** Real fields: a leg is its own conjugate. Otherwise the conjugate is written psibar, phi^\dagger or phi*. */
  readonly selfConjugate: boolean;
  /** Engineering dimension, used by Scaling. */
  readonly dimension: LinearForm;
  /** Ultraviolet weight δ_f, propagator ~ p^{2δ_f − d}, used by Divergence. */
  readonly weight: LinearForm;
  readonly overridden: boolean;
  /** One charge per symmetry, in the order of `Theory.symmetries`; the conjugate carries the opposite. */
  readonly charges: readonly Rational[];
}

export type ScaleRole = "heavy" | "probe" | "light" | "other";
export interface Scale {
  readonly rowId: string;
  readonly symbol: string;
  readonly latex: string;
  readonly role: ScaleRole;
  /** In `unit`, with standard uncertainty; null when the scale has no number (or its text is in error). */
  readonly value: number | null;
  readonly sigma: number;
  /** "TeV", "fm^-1", "" for a pure number. */
  readonly unit: string;
  /**
   * What one standard deviation of each independent source does to `value`, signed: a scale made of others shares
   * their sources, so p/Λ knows how both move together. Absent: the scale is a source of its own.
   */
  readonly spread?: Readonly<Record<string, number>>;
  /** Value and uncertainty in GeV when `unit` is an energy or inverse length, else null. */
  readonly gev: { readonly value: number; readonly sigma: number } | null;
}

export interface Term {
  readonly rowId: string;
  readonly monomial: Monomial;
  /** Typeset as it is understood. */
  readonly latex: string;
  /** Operator dimension Δ: fields (engineering dimensions) and derivatives. */
  readonly dimension: LinearForm;
  /** Dimension of the whole coefficient, measure − Δ. */
  readonly coefficient: LinearForm;
  /** Dimension of the coefficient with ultraviolet weights, measure − Σ n_f δ_f − k, used by Divergence. */
  readonly ultravioletCoefficient: LinearForm;
  /** Σ derivatives, each ∂ₜ counting z. */
  readonly derivativeWeight: LinearForm;
  /** Natural coefficient ĝ, 1 unless stated; NaN when its text is in error, so that no size is claimed. */
  readonly natural: number;
  /** Relative size given by hand (tuned or protected couplings), with uncertainty; null when by dimension, NaN when in error. */
  readonly assigned: { readonly value: number; readonly sigma: number } | null;
  /** True for kinetic terms: bilinear, fixing the fields' dimensions (coefficient of dimension 0, two legs). */
  readonly kinetic: boolean;
  /** Whether every symmetry allows it. */
  readonly allowed: boolean;
}

export interface Theory {
  readonly name: string;
  readonly spacetime: Spacetime;
  /** Measure weight: d, or D + z. */
  readonly measure: LinearForm;
  readonly symmetries: readonly Symmetry[];
  readonly fields: readonly Field[];
  readonly scales: readonly Scale[];
  readonly terms: readonly Term[];
  /** Rows that could not be read are left out above and named here. */
  readonly problems: readonly Problem[];
}
