/**
 * The four estimates as plain formulas. X = X_ref Σ c_n Qⁿ is known through order k;
 * `nextOrder` is the first order after k that exists. All give a half-width h in the unit of X: X ± h.
 */
/** X through one order that exists. */
export interface KnownOrder {
  readonly order: number;
  readonly value: number;
  /** Shift from the previous order that exists; the value itself for the lowest one. */
  readonly shift: number;
}

/**
 * Powers of Q that were left out: the first, and the sums of Qⁿ and Q²ⁿ over all orders n ≥ nextOrder but the absent ones.
 * The sums are null for Q ≥ 1, where they do not exist.
 */
export interface OmittedPowers {
  readonly first: number;
  readonly linear: number | null;
  readonly square: number | null;
}

/** @example omittedPowers(0.3, 3, []).linear // 0.0385714… */
export function omittedPowers(q: number, nextOrder: number, absent: readonly number[]): OmittedPowers {
  const first = q ** nextOrder;
  if (q >= 1) return { first, linear: null, square: null };
  let linear = first / (1 - q);
  let square = first ** 2 / (1 - q ** 2);
  for (const order of absent) {
    if (order < nextOrder) continue;
    linear -= q ** order;
    square -= q ** (2 * order);
  }
  return { first, linear, square };
}

/** c̄ = max |c_n|; null when there is none. */
export function largestSize(coefficients: readonly number[]): number | null {
  return coefficients.length === 0 ? null : Math.max(...coefficients.map(Math.abs));
}

/**
 * Differences of orders: max(Q^m |X⁰|, Q^(m−j) |ΔX^(j)|) over the orders j ≤ k that exist, m the next one, and not
 * less than the largest |X^(i) − X^(j)| over all known orders i, j ≥ k.
 * Source: Epelbaum, Krebs, Meißner 2015, Eur. Phys. J. A 51, 53; general form Binder et al. 2016, Phys. Rev. C 93, 044002.
 *
 * @param orders all known orders, rising; `upTo` is the index of order k among them
 */
export function differencesOfOrders(
  orders: readonly KnownOrder[],
  upTo: number,
  nextOrder: number,
  q: number,
): number {
  const known = orders.slice(0, upTo + 1);
  const later = orders.slice(upTo).map(({ value }) => value);
  const shifts = known.map(({ order, shift }) => q ** (nextOrder - order) * Math.abs(shift));
  return Math.max(...shifts, Math.max(...later) - Math.min(...later));
}

/**
 * Half-width in units of |X_ref| c̄ Q^(k+1) for a uniform prior on |c_n| ≤ c̄, log-uniform c̄ without limits, first omitted term.
 * Source: Cacciari, Houdeau 2011, J. High Energy Phys. 09, 039; set A of Furnstahl, Klco, Phillips, Wesolowski 2015,
 * Phys. Rev. C 92, 024005, with c̄ limits taken to 0 and ∞.
 *
 * @param count n_c ≥ 1
 * @param probability two-sided degree of belief in (0, 1)
 * @example uniformPriorFactor(3, 0.68) // 0.906666…
 */
export function uniformPriorFactor(count: number, probability: number): number {
  return probability <= count / (count + 1)
    ? (probability * (count + 1)) / count
    : ((count + 1) * (1 - probability)) ** (-1 / count);
}

export interface ConjugatePosterior {
  readonly nu: number;
  /** τ². */
  readonly tau2: number;
}

/**
 * Posterior of c̄² for Gaussian c_n and a scaled inverse χ² prior: ν = ν₀ + n_c, ντ² = ν₀τ₀² + Σ c_n².
 * Null when ν = 0: neither prior nor data.
 * Source: Melendez, Furnstahl, Phillips, Pratola, Wesolowski 2019, Phys. Rev. C 100, 044001.
 */
export function conjugatePosterior(
  coefficients: readonly number[],
  nu0: number,
  tau0: number,
): ConjugatePosterior | null {
  const nu = nu0 + coefficients.length;
  if (nu === 0) return null;
  const squares = coefficients.reduce((sum, c) => sum + c ** 2, 0);
  return { nu, tau2: (nu0 * tau0 ** 2 + squares) / nu };
}

/**
 * Scale of the Student-t_ν error: its square is X_ref² τ² · `squareSum`, which is Q^(2(k+1))/(1 − Q²) for all omitted
 * orders and Q^(2(k+1)) for the first. The half-width is the quantile times it. Same source.
 */
export function conjugateScale({ tau2 }: ConjugatePosterior, reference: number, squareSum: number): number {
  return Math.abs(reference) * Math.sqrt(tau2 * squareSum);
}
