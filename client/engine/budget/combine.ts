/** Adds up uncertainties (JCGM 100:2008, the GUM, 5.1.2 and 5.2.2). */

export interface Contribution {
  /** Standard uncertainty with the sign of its sensitivity. */
  readonly size: number;
  /** "" moves with nothing else. */
  readonly group: string;
}

/**
 * u² = Σ u_i² + 2 Σ_{i<j} r_ij u_i u_j, GUM eq. (16), with r the coefficient of the group two sources share, else 0.
 * Negative only when the coefficients of a group contradict each other, which `contradictoryGroups` tells.
 *
 * @example variance([{ size: 3, group: "" }, { size: 4, group: "" }], () => 1) // 25
 * @example variance([{ size: 3, group: "a" }, { size: 4, group: "a" }], () => 1) // 49
 */
export function variance(
  contributions: readonly Contribution[],
  coefficientOf: (group: string) => number,
): number {
  return shares(contributions, coefficientOf).reduce((sum, share) => sum + share, 0);
}

/** Each source's part of the variance: its own, and half of what it has with every other. */
export function shares(
  contributions: readonly Contribution[],
  coefficientOf: (group: string) => number,
): readonly number[] {
  return contributions.map(({ size, group }, index) =>
    contributions.reduce((sum, other, at) => {
      if (at === index) return sum + size * size;
      const correlated = group !== "" && other.group === group;
      return correlated ? sum + coefficientOf(group) * size * other.size : sum;
    }, 0),
  );
}

/** −1/3 is typed as a decimal. */
const ROUNDING = 1e-3;

/**
 * Groups whose sources no random numbers can follow: n of them, each two with coefficient r, need r ≥ −1/(n − 1), or
 * their matrix of correlations has the negative eigenvalue 1 + (n − 1) r. Sources of size 0 say nothing.
 *
 * @example contradictoryGroups(["a", "a", "a"].map((group) => ({ size: 1, group })), () => -0.6) // ["a"]
 */
export function contradictoryGroups(
  contributions: readonly Contribution[],
  coefficientOf: (group: string) => number,
): readonly string[] {
  const groups = new Set(contributions.map(({ group }) => group));
  return [...groups].filter((group) => {
    if (group === "") return false;
    const count = contributions.filter((one) => one.group === group && one.size !== 0).length;
    return 1 + (count - 1) * coefficientOf(group) < -ROUNDING;
  });
}
/** Σ |u_i|: the most that errors of unknown dependence can add up to. */
export function linearSum(contributions: readonly Contribution[]): number {
  return contributions.reduce((sum, { size }) => sum + Math.abs(size), 0);
}
