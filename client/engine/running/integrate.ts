/**
 * Integrates a flow dy/dt = β(y), t = ln μ, and stops short of a pole. The one door to the ODE routine, ODEX: Gragg,
 * Bulirsch and Stoer extrapolation with step and order control and dense output (Hairer, Nørsett and Wanner 1993, II.9).
 */
import { Outcome, Solver } from "#odex";

/** Relative to each component; what stays below `ABSOLUTE` of a component's own size counts as nothing. */
export const RELATIVE_TOLERANCE = 1e-10;
const ABSOLUTE = 1e-14;
/** A component that has grown by this much, against its start or against 1, is at a pole. */
const POLE_GROWTH = 1e9;
const MOST_STEPS = 5000;

export interface Flow {
  derivative(y: readonly number[]): number[];
  /** Size of each component for tolerance and growth; positive. */
  readonly sizes: readonly number[];
}
export interface Path {
  /** One state per wanted t, in order; null from a pole on. */
  readonly states: readonly (readonly number[] | null)[];
  /** State at the end; null past a pole. */
  readonly end: readonly number[] | null;
  readonly pole: Pole | null;
}
export interface Pole {
  readonly t: number;
  readonly component: number;
}

/**
 * From `t0` to `t1`, either way; `at` lies between them, in the order of travel. The pole's place is corrected for the
 * rest of the way by the local law of growth, y ~ (t* − t)^(−1/(k − 1)) with k read off the slopes.
 *
 * @example integrate({ derivative: ([y = 0]) => [y * y], sizes: [1] }, [1], 0, 2, []).pole.t.toFixed(8) // "1.00000000"
 */
export function integrate(
  flow: Flow,
  start: readonly number[],
  t0: number,
  t1: number,
  at: readonly number[],
): Path {
  if (start.length === 0 || t0 === t1) return { states: at.map(() => start), end: start, pole: null };
  const solver = new Solver(start.length);
  solver.denseOutput = true;
  solver.relativeTolerance = RELATIVE_TOLERANCE;
  solver.absoluteTolerance = flow.sizes.map((size) => ABSOLUTE * size);
  solver.initialStepSize = Math.abs(t1 - t0) / 100;
  solver.maxSteps = MOST_STEPS;
  const states: (readonly number[])[] = [];
  const forward = t1 > t0;
  let last = { t: t0, y: start };
  const grown = (y: readonly number[]) =>
    y.findIndex((value, index) => !(Math.abs(value) <= POLE_GROWTH * (flow.sizes[index] ?? 1)));
  const result = solver.solve(
    (_, y) => flow.derivative(y),
    t0,
    start,
    t1,
    (step, _before, t, y, dense) => {
      if (step === 1 && t === t0) return undefined;
      if (grown(y) >= 0 && y.some((value) => !Number.isFinite(value))) return false;
      for (let next = at[states.length]; next !== undefined; next = at[states.length]) {
        if (forward ? next > t : next < t) break;
        const wanted = next;
        states.push(wanted === t ? [...y] : start.map((_value, index) => dense(index, wanted)));
      }
      last = { t, y: [...y] };
      return grown(y) >= 0 ? false : undefined;
    },
  );
  if (result.outcome === Outcome.Converged) return { states, end: result.y, pole: null };
  const component = fastest(flow, last.y);
  const pole = { t: last.t + remainder(flow, last.y, component), component };
  return { states: [...states, ...at.slice(states.length).map(() => null)], end: null, pole };
}

function fastest({ derivative, sizes }: Flow, y: readonly number[]): number {
  const rates = derivative(y).map((slope, index) =>
    Math.abs(slope / ((y[index] ?? 0) || (sizes[index] ?? 1))),
  );
  const grown = y.map((value, index) => Math.abs(value) / (sizes[index] ?? 1));
  return grown.reduce(
    (best, value, index) =>
      value * (rates[index] ?? 0) > (grown[best] ?? 0) * (rates[best] ?? 0) ? index : best,
    0,
  );
}

/** t* − t where y′ = a y^k: y / ((k − 1) y′), with k = y y″ / y′². */
function remainder({ derivative }: Flow, y: readonly number[], component: number): number {
  const slopes = derivative(y);
  const [value, slope] = [y[component] ?? 0, slopes[component] ?? 0];
  if (slope === 0) return 0;
  const step = (1e-5 * value) / slope;
  const ahead = derivative(y.map((one, index) => one + step * (slopes[index] ?? 0)))[component] ?? slope;
  const k = (value * (ahead - slope)) / step / slope ** 2;
  const rest = k > 1.05 ? value / ((k - 1) * slope) : 0;
  return Number.isFinite(rest) ? rest : 0;
}
