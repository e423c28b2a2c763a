/**
 * How likely the coefficients along x are, given a length scale ℓ and a breakdown scale: the correlated model of
 * Melendez, Furnstahl, Phillips, Pratola, Wesolowski 2019, Phys. Rev. C 100, 044001, section III and appendix A.
 *
 *   ln pr = −(ν/2) ln(ν₀τ₀² + Σ_n c_nᵀ R⁻¹ c_n) − (n_c/2) ln|R| − Σ_n n Σ_i ln Q(x_i) + const,   ν = ν₀ + n_c N
 *
 * The last term is the Jacobian from predictions to coefficients; without it any large Q would be preferred. R is
 * factorised once for each ℓ; how c_nᵀ R⁻¹ c_n moves with the breakdown scale costs a multiplication when Q is inverse
 * to it, and a few forward substitutions otherwise.
 */
import { whiten } from "./cholesky.ts";
import type { CoefficientsAlong } from "./coefficients-along.ts";
import { factorOf } from "./kernel.ts";

export interface Prior {
  readonly nu0: number;
  readonly tau0: number;
}

/** Coefficients, and how Q changes when the breakdown scale is e^s times what is stated. */
export interface Observable {
  readonly coefficients: CoefficientsAlong;
  /** Q at x for a given s; null when Q is exactly e^−s times what is stated, or no scale is estimated. */
  readonly parameterAt: ((x: number, s: number) => number) | null;
  /** As asked for; see `factorOf`. */
  readonly nugget: number;
}

/** Everything about one ℓ that the breakdown scale does not change. */
export interface LengthFit {
  readonly length: number;
  /** The nugget that was needed. */
  readonly nugget: number;
  readonly condition: number;
  /** c_nᵀ R⁻¹ c_n for each order used, with the breakdown scale as stated. */
  readonly squares: readonly number[];
  /** ln pr up to a constant that ℓ and s do not change. */
  logLikelihood(s: number): number;
}

/** What vanishing coefficients without a prior are taken for: their likelihood would be without bound. */
const LEAST = 1e-200;
/** Chebyshev nodes in s at which a Q that is not inverse to the breakdown scale is followed exactly. */
const NODES = 15;

/** @param range of s that will be asked for */
export function likelihoodOf(
  { coefficients, parameterAt, nugget }: Observable,
  { nu0, tau0 }: Prior,
  range: readonly [number, number],
): (length: number) => LengthFit {
  const { x, q, orders } = coefficients;
  const nu = nu0 + orders.length * x.length;
  const powers = orders.reduce((sum, { power }) => sum + power, 0);
  const logQ = q.reduce((sum, one) => sum + Math.log(one), 0);
  const places = chebyshev(range);
  const nodes = parameterAt && range[1] > range[0] ? nodesAlong(coefficients, parameterAt, places) : null;

  return (length) => {
    const { factor, nugget: needed } = factorOf(x, length, nugget);
    const squaresOf = (values: ArrayLike<number>) =>
      whiten(factor, values).reduce((sum, z) => sum + z * z, 0);
    const squares = orders.map(({ values }) => squaresOf(values));
    const log = (total: number, logQNow: number) =>
      -(nu / 2) * Math.log(Math.max(nu0 * tau0 ** 2 + total, LEAST)) -
      (orders.length / 2) * factor.logDeterminant -
      powers * logQNow;
    const inverse = (s: number) => {
      const total = orders.reduce(
        (sum, { power }, index) => sum + (squares[index] ?? NaN) * Math.exp(2 * power * s),
        0,
      );
      return log(total, logQ - x.length * s);
    };
    const fit = { length, nugget: needed, condition: factor.condition, squares };
    if (!nodes) return { ...fit, logLikelihood: inverse };
    const exact = nodes.map(({ values, logQ: there }) =>
      log(
        values.reduce((sum, one) => sum + squaresOf(one), 0),
        there,
      ),
    );
    return { ...fit, logLikelihood: (s) => interpolate(places, exact, s) };
  };
}

function nodesAlong(
  { x, q, orders }: CoefficientsAlong,
  parameterAt: (x: number, s: number) => number,
  places: readonly number[],
): readonly { readonly values: readonly Float64Array[]; readonly logQ: number }[] {
  return places.map((s) => {
    const there = x.map((at) => parameterAt(at, s));
    const ratio = there.map((one, point) => (q[point] ?? NaN) / one);
    return {
      values: orders.map(({ power, values }) =>
        values.map((value, point) => value * (ratio[point] ?? NaN) ** power),
      ),
      logQ: there.reduce((sum, one) => sum + Math.log(one), 0),
    };
  });
}

function chebyshev([from, to]: readonly [number, number]): number[] {
  return Array.from(
    { length: NODES },
    (_, index) => (from + to) / 2 - ((to - from) / 2) * Math.cos((Math.PI * index) / (NODES - 1)),
  );
}

/** The polynomial through all nodes, in its barycentric form (Berrut, Trefethen 2004, SIAM Rev. 46, 501). */
function interpolate(places: readonly number[], values: readonly number[], at: number): number {
  let [over, under] = [0, 0];
  for (let index = 0; index < places.length; index += 1) {
    const distance = at - (places[index] ?? NaN);
    if (distance === 0) return values[index] ?? NaN;
    const isEnd = index === 0 || index === places.length - 1;
    const weight = ((index % 2 === 0 ? 1 : -1) * (isEnd ? 0.5 : 1)) / distance;
    over += weight * (values[index] ?? NaN);
    under += weight;
  }
  return over / under;
}
