/** The couplings of a theory as things that run, and what they stand before. */
import type { Rational } from "../exact/rational.ts";
import type { CoefficientFactor } from "../notation/monomial.ts";
import type { Part, Polynomial } from "./polynomial.ts";

/** A real scalar, or one of the two halves of a complex one: a variable of the potential. */
export interface ScalarVariable {
  /** "phi"; "phi*" for the conjugate. */
  readonly name: string;
  /** Its own name when real. */
  readonly conjugate: string;
  readonly latex: string;
  /** N of O(N): the variable is the length of a vector with so many components. */
  readonly components: number;
}

export interface Parameter {
  /** "lambda", "m^2"; also what a person types to give its value. */
  readonly id: string;
  /** Its variable in polynomials. */
  readonly variable: string;
  readonly latex: string;
  readonly factors: readonly CoefficientFactor[];
  /** Scales that stand with it and do not run, such as 1/Λ²: the coefficient is number × scale × parameter. */
  readonly scale: Part;
  readonly rowIds: readonly string[];
  /** Rational numbers times products of scalar variables; zero for a Yukawa coupling. */
  readonly operator: Polynomial;
  readonly yukawa: readonly YukawaEntry[];
  /** Dimension of the parameter alone, in powers of energy in four dimensions. */
  readonly energy: Rational;
  /** Number of fields in its operator, of fewest legs. */
  readonly legs: number;
}

/** −L holds `coefficient` × parameter × boson × first second + h.c., for left-handed two-component spinors. */
export interface YukawaEntry {
  readonly boson: string;
  readonly first: string;
  readonly second: string;
  readonly coefficient: Rational;
}

/** A left-handed two-component spinor: a Weyl or Majorana field, or half of a Dirac field. */
export interface Spinor {
  readonly name: string;
  /** Copies that all couple alike. */
  readonly copies: number;
}

export interface Model {
  readonly scalars: readonly ScalarVariable[];
  readonly spinors: readonly Spinor[];
  readonly parameters: readonly Parameter[];
}

/** Variables of polynomials: fields and scales by their symbols, running parameters with a mark no symbol has. */
export function parameterVariable(id: string): string {
  return `#${id}`;
}
