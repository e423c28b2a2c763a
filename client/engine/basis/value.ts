/** What a Basis count gives. Numbers are of real parameters: an operator that is not Hermitian counts twice. */

/** Exact, as canonical text and as LaTeX. */
export interface CountText {
  /** A whole number, or a polynomial in n_f: "397/12*n_f^4 + 15". */
  readonly text: string;
  readonly latex: string;
  /** At the chosen number of flavours: a whole number in digits. */
  readonly at: string;
}

export interface DimensionCount {
  /** "6", or "13/2" in odd d. */
  readonly dimension: string;
  readonly total: CountText;
  /** How many field contents have any. */
  readonly classes: number;
}

export interface ClassCount {
  readonly id: string;
  readonly dimension: string;
  /** The fields, without derivatives: "Q^{\\dagger}Q H^{2}". */
  readonly fieldsLatex: string;
  readonly fields: number;
  readonly derivatives: number;
  /** For this content alone, or with its Hermitian conjugate when `withConjugate`. */
  readonly number: CountText;
  readonly withConjugate: boolean;
}

export interface BasisValue {
  readonly d: number;
  readonly withParity: boolean;
  /** Whether any number depends on n_f. */
  readonly symbolic: boolean;
  /** Where n_f is taken. */
  readonly flavours: number;
  readonly totals: readonly DimensionCount[];
  /** In rising dimension; at most `MOST_CLASSES`. */
  readonly classes: readonly ClassCount[];
  /** How many more there are. */
  readonly classesLeftOut: number;
  /** The fields that were counted, with their conjugates. */
  readonly content: readonly { readonly latex: string; readonly kind: string; readonly charges: string }[];
}

/**
 * Number of operators at a mass dimension, in digits, at the chosen number of flavours; null outside the counted range.
 * For blocks that need it, such as the Order plan.
 */
export function operatorsAt({ totals }: BasisValue, dimension: string): string | null {
  return totals.find((total) => total.dimension === dimension)?.total.at ?? null;
}
