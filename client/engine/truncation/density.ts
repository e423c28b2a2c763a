/** A posterior density on a grid: its middle, its mode, its central intervals, and whether it is cut off by the prior. */
import type { Degree } from "./value.ts";

export interface Density {
  /** Rising; not evenly spaced. */
  readonly grid: readonly number[];
  /** Normalised by the trapezium rule. */
  readonly density: readonly number[];
  readonly mode: number;
  readonly median: number;
  /** Central intervals: equal probability on either side. */
  readonly intervals: readonly { readonly degree: string; readonly low: number; readonly high: number }[];
  /** At which end the density is cut off before it has fallen to a twentieth of its largest value. */
  readonly cutAt: "low" | "high" | "both" | null;
}

/** A density may be cut off at an end when it is above this share of its largest value there. */
const CUT = 0.05;

/** @param logDensity up to a constant; shape as the grid */
export function densityOf(
  grid: readonly number[],
  logDensity: readonly number[],
  degrees: readonly Degree[],
): Density {
  const top = Math.max(...logDensity);
  const raw = logDensity.map((value) => Math.exp(value - top));
  const steps = grid.map((at, index) =>
    index === 0 ? 0 : ((at - (grid[index - 1] ?? at)) * ((raw[index] ?? 0) + (raw[index - 1] ?? 0))) / 2,
  );
  const total = steps.reduce((sum, step) => sum + step, 0);
  const density = raw.map((value) => value / total);
  const quantile = quantileOf(
    grid,
    density,
    steps.map((step) => step / total),
  );
  const largest = raw.indexOf(1);
  const ends = [(raw[0] ?? 0) > CUT, (raw.at(-1) ?? 0) > CUT];
  return {
    grid,
    density,
    mode: vertex(grid, logDensity, largest),
    median: quantile(0.5),
    intervals: degrees.map(({ text, probability }) => ({
      degree: text,
      low: quantile((1 - probability) / 2),
      high: quantile((1 + probability) / 2),
    })),
    cutAt: ends[0] ? (ends[1] ? "both" : "low") : ends[1] ? "high" : null,
  };
}

/** Inside a step the density is linear, so its integral is a parabola that is solved for. */
function quantileOf(
  grid: readonly number[],
  density: readonly number[],
  steps: readonly number[],
): (probability: number) => number {
  return (probability) => {
    let below = 0;
    for (let index = 1; index < grid.length; index += 1) {
      const step = steps[index] ?? 0;
      if (below + step >= probability && step > 0) {
        const [from = 0, to = 0] = [grid[index - 1], grid[index]];
        const [a = 0, b = 0] = [density[index - 1], density[index]];
        const width = to - from;
        const wanted = probability - below;
        const slope = (b - a) / width;
        // a s + slope s²/2 = wanted, in the form that keeps its digits when the slope is small.
        return from + (2 * wanted) / (a + Math.sqrt(Math.max(0, a * a + 2 * slope * wanted)));
      }
      below += step;
    }
    return grid.at(-1) ?? NaN;
  };
}

/** Where a parabola through the largest value and its neighbours has its top. */
function vertex(grid: readonly number[], logDensity: readonly number[], index: number): number {
  const [x0, x1, x2] = [grid[index - 1], grid[index], grid[index + 1]];
  const [y0, y1, y2] = [logDensity[index - 1], logDensity[index], logDensity[index + 1]];
  if (x1 === undefined) return NaN;
  if (x0 === undefined || x2 === undefined || y0 === undefined || y1 === undefined || y2 === undefined)
    return x1;
  const left = (y1 - y0) / (x1 - x0);
  const right = (y2 - y1) / (x2 - x1);
  const bend = (right - left) / (x2 - x0);
  return bend < 0 ? Math.min(x2, Math.max(x0, (x0 + x1) / 2 - left / (2 * bend))) : x1;
}
