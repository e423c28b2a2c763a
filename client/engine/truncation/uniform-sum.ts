/** The distribution of a sum of uniform variables of different widths. */

/** P(|S| ≤ s) for S = Σ a_j u_j with u_j uniform on [−1, 1]. */
export interface UniformSum {
  /** Σ a_j: |S| is never larger. */
  readonly reach: number;
  /** Where the coverage bends, for whoever integrates it: panels should end there. */
  readonly bends: readonly number[];
  /** For s from 0 to `reach` and beyond. */
  coverage(s: number): number;
}

const GRID = 1500;
/** Widths below this share of the whole change no digit that is shown. */
const NEGLIGIBLE = 1e-6;

/**
 * One width is a ramp, two make a trapezoid, both in closed form. Each further one averages the distribution function
 * over its window, C(s) → (1/2a) ∫ C over [s − a, s + a], on a grid of 1500 steps.
 *
 * @param widths a_j > 0, at least one
 * @example uniformSum([0.09, 0.027]).coverage(0.045) // 0.5
 */
export function uniformSum(widths: readonly number[]): UniformSum {
  const sorted = [...widths].sort((a, b) => b - a);
  const [first = 0, second = 0, ...rest] = sorted;
  const reach = sorted.reduce((sum, width) => sum + width, 0);
  let coverage = (s: number) => trapezoid(s, first, second);
  for (const width of rest) if (width > NEGLIGIBLE * reach) coverage = averaged(coverage, width, reach);
  return { reach, bends: rest.length === 0 && first > second ? [first - second, reach] : [reach], coverage };
}

/** The coverage of two uniform variables, a ≥ b ≥ 0. */
function trapezoid(s: number, a: number, b: number): number {
  if (s >= a + b) return 1;
  if (s <= a - b) return s / a;
  const missing = a + b - s;
  return 1 - (missing * missing) / (4 * a * b);
}

function averaged(coverage: (s: number) => number, width: number, reach: number): (s: number) => number {
  const step = reach / GRID;
  const values = Float64Array.from({ length: GRID + 3 }, (_, index) => coverage(index * step));
  const integral = integrated(values, step);
  const next = Float64Array.from({ length: GRID + 3 }, (_, index) => {
    const s = index * step;
    return (integral(s + width) - integral(Math.abs(s - width))) / (2 * width);
  });
  return (s) => (s >= reach ? 1 : cubic(next, s / step));
}

/** ∫ C from 0 to s: cubics through the samples, and C = 1 beyond them. */
function integrated(values: Float64Array, step: number): (s: number) => number {
  const last = values.length - 1;
  const at = (index: number) => (index < 0 ? -(values[-index] ?? 0) : (values[index] ?? 1));
  const sums = new Float64Array(values.length);
  for (let index = 0; index < last; index += 1) {
    const piece = 13 * (at(index) + at(index + 1)) - at(index - 1) - at(index + 2);
    sums[index + 1] = (sums[index] ?? 0) + (step * piece) / 24;
  }
  return (s) => {
    const index = Math.floor(s / step);
    if (index >= last) return (sums[last] ?? 0) + s - last * step;
    const t = s / step - index;
    const [from, to] = [sums[index] ?? 0, sums[index + 1] ?? 0];
    const [slope, nextSlope] = [at(index) * step, at(index + 1) * step];
    const rise = to - from;
    return from + t * (slope + t * (3 * rise - 2 * slope - nextSlope + t * (slope + nextSlope - 2 * rise)));
  };
}

/** Through the four samples around; the coverage is odd at 0. */
function cubic(values: Float64Array, at: number): number {
  const index = Math.floor(at);
  const t = at - index;
  const a = index === 0 ? -(values[1] ?? 0) : (values[index - 1] ?? 1);
  const b = values[index] ?? 1;
  const c = values[index + 1] ?? 1;
  const d = values[index + 2] ?? 1;
  return b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)));
}

/** Sums by their widths, each computed once: they depend on Q alone, and two degrees of belief and two sets share them. */
export type UniformSums = (widths: readonly number[]) => UniformSum;
export function rememberSums(): UniformSums {
  const known = new Map<string, UniformSum>();
  return (widths) => {
    const name = widths.join(" ");
    const sum = known.get(name) ?? uniformSum(widths);
    known.set(name, sum);
    return sum;
  };
}
