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

/** Nodes in s at which a Q that is not inverse to the breakdown scale is followed exactly. */
const NODES = 25;

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
  const step = (range[1] - range[0]) / (NODES - 1);
  const nodes = parameterAt && step > 0 ? nodesAlong(coefficients, parameterAt, range[0], step) : null;

  return (length) => {
    const { factor, nugget: needed } = factorOf(x, length, nugget);
    const squaresOf = (values: ArrayLike<number>) =>
      whiten(factor, values).reduce((sum, z) => sum + z * z, 0);
    const squares = orders.map(({ values }) => squaresOf(values));
    const log = (total: number, logQNow: number) =>
      -(nu / 2) * Math.log(nu0 * tau0 ** 2 + total) -
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
    return { ...fit, logLikelihood: (s) => interpolate(exact, (s - range[0]) / step) };
  };
}

function nodesAlong(
  { x, q, orders }: CoefficientsAlong,
  parameterAt: (x: number, s: number) => number,
  from: number,
  step: number,
): readonly { readonly values: readonly Float64Array[]; readonly logQ: number }[] {
  return Array.from({ length: NODES }, (_, index) => {
    const there = x.map((at) => parameterAt(at, from + index * step));
    const ratio = there.map((one, point) => (q[point] ?? NaN) / one);
    return {
      values: orders.map(({ power, values }) =>
        values.map((value, point) => value * (ratio[point] ?? NaN) ** power),
      ),
      logQ: there.reduce((sum, one) => sum + Math.log(one), 0),
    };
  });
}

/** Cubic through the four nodes around. */
function interpolate(values: readonly number[], at: number): number {
  const first = Math.min(Math.max(Math.floor(at) - 1, 0), values.length - 4);
  const t = at - first;
  const [a = NaN, b = NaN, c = NaN, d = NaN] = values.slice(first, first + 4);
  return (
    (-a * (t - 1) * (t - 2) * (t - 3)) / 6 +
    (b * t * (t - 2) * (t - 3)) / 2 -
    (c * t * (t - 1) * (t - 3)) / 2 +
    (d * t * (t - 1) * (t - 2)) / 6
  );
}
