/** Adds up uncertainties (JCGM 100:2008, the GUM, 5.1.2 and 5.2.2). */

export interface Contribution {
  /** Its row, by which a pair names it. */
  readonly rowId: string;
  /** Standard uncertainty with the sign of its sensitivity. */
  readonly size: number;
  /** "" moves with nothing else. */
  readonly group: string;
}

/** r of two different sources, −1 to 1. */
export type Correlation = (one: Contribution, other: Contribution) => number;

/**
 * u² = Σ u_i² + 2 Σ_{i<j} r_ij u_i u_j, GUM eq. (16).
 * Negative only when coefficients contradict each other, which `isContradictory` tells.
 *
 * @example variance([{ rowId: "a", size: 3, group: "" }, { rowId: "b", size: 4, group: "" }], () => 0) // 25
 * @example variance([{ rowId: "a", size: 3, group: "" }, { rowId: "b", size: 4, group: "" }], () => 1) // 49
 */
export function variance(contributions: readonly Contribution[], correlationOf: Correlation): number {
  return shares(contributions, correlationOf).reduce((sum, share) => sum + share, 0);
}

/** Each source's part of the variance: its own, and half of what it has with every other. */
export function shares(
  contributions: readonly Contribution[],
  correlationOf: Correlation,
): readonly number[] {
  return contributions.map((one, index) =>
    contributions.reduce(
      (sum, other, at) => sum + (at === index ? 1 : correlationOf(one, other)) * one.size * other.size,
      0,
    ),
  );
}

/** −1/3 is typed as a decimal. */
const ROUNDING = 1e-3;
/** A matrix of more is not looked through at every keystroke. */
export const MOST_CORRELATED = 300;

/**
 * Whether no random numbers can be correlated so: their matrix of coefficients then has a negative eigenvalue. Sources of
 * size 0 say nothing; those that are correlated with nothing are left out. For n sources of one group with one
 * coefficient the eigenvalue is 1 + (n − 1) r, so three cannot all be opposed.
 */
export function isContradictory(contributions: readonly Contribution[], correlationOf: Correlation): boolean {
  const present = contributions.filter(({ size }) => size !== 0);
  const correlated = correlatedAmong(present, correlationOf);
  const matrix = correlated.map((one, index) =>
    correlated.map((other, at) => (at === index ? 1 + ROUNDING : correlationOf(one, other))),
  );
  return !isPositive(matrix);
}

/** Those that have a coefficient other than 0 with another. */
export function correlatedAmong(
  contributions: readonly Contribution[],
  correlationOf: Correlation,
): readonly Contribution[] {
  return contributions.filter((one) =>
    contributions.some((other) => other !== one && correlationOf(one, other) !== 0),
  );
}

/** Whether a symmetric matrix has positive eigenvalues only: elimination (Cholesky's) then finds positive pivots. */
function isPositive(matrix: readonly number[][]): boolean {
  const rest = matrix.map((row) => [...row]);
  for (const [index, pivotRow] of rest.entries()) {
    const pivot = pivotRow[index] ?? NaN;
    if (!(pivot > 0)) return false;
    for (const row of rest.slice(index + 1)) {
      const factor = (row[index] ?? NaN) / pivot;
      if (factor === 0) continue;
      for (let column = index; column < row.length; column += 1)
        row[column] = (row[column] ?? NaN) - factor * (pivotRow[column] ?? NaN);
    }
  }
  return true;
}

/** Σ |u_i|: the most that errors of unknown dependence can add up to. */
export function linearSum(contributions: readonly Contribution[]): number {
  return contributions.reduce((sum, { size }) => sum + Math.abs(size), 0);
}
