/** A term as understood: rational prefactor × couplings and scales × fields × derivatives. */
import type { Rational } from "../exact/rational.ts";

export interface CoefficientFactor {
  /** Canonical symbol: "c_6", "Lambda", "pi". */
  readonly symbol: string;
  /** Nonzero; may be negative or fractional. */
  readonly power: Rational;
}

export interface FieldFactor {
  readonly symbol: string;
  /** True for psibar, phi^\dagger, phi*. */
  readonly conjugated: boolean;
  /** Positive integer. */
  readonly count: number;
}

export interface Monomial {
  readonly prefactor: Rational;
  readonly coefficients: readonly CoefficientFactor[];
  readonly fields: readonly FieldFactor[];
  /** Number of spacetime (isotropic) or space derivatives. */
  readonly derivatives: number;
  /** Number of time derivatives, anisotropic theories only. */
  readonly timeDerivatives: number;
}
