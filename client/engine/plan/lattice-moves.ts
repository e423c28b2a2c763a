/** What becomes of a cut through a lattice of orders when the probe or the heavy scale moves. */
import { roundFloat } from "../evaluation.ts";
import type { CountingParameter } from "../counting/value.ts";
import type { Rational } from "../exact/rational.ts";

export interface LatticeMove {
  readonly what: "probe up" | "probe down" | "heavy up" | "heavy down";
  /** Left out by the same cut; null where a parameter reaches 1. */
  readonly leftOut: number | null;
  readonly meetsTarget: boolean;
}
export interface SizedPoint {
  readonly order: readonly Rational[];
  /** How many terms and products stand here, each of this size. */
  readonly count: number;
  readonly size: number;
}
export function totalOf(points: readonly SizedPoint[]): number {
  return points.reduce((sum, { count, size }) => sum + count * size, 0);
}

type Sized = CountingParameter & { readonly size: number };
type Scale = "probe" | "heavy";

/** Sizes after a scale has grown by a factor; null where a parameter is no power of it, or reaches 1. */
function movedBy(
  points: readonly SizedPoint[],
  parameters: readonly Sized[],
  scale: Scale,
  factor: number,
): number | null {
  const powers: number[] = [];
  for (const { follows, size } of parameters) {
    if (follows === null || size * factor ** follows[scale] >= 1) return null;
    powers.push(follows[scale]);
  }
  return totalOf(
    points.map((point) => ({
      ...point,
      size:
        point.size *
        factor ** point.order.reduce((sum, power, at) => sum + power.toFloat() * (powers[at] ?? 0), 0),
    })),
  );
}

const knows = (parameters: readonly Sized[]) => parameters.every(({ follows }) => follows !== null);

export function latticeMoved(
  beyond: readonly SizedPoint[],
  parameters: readonly Sized[],
  target: number,
  relative: Readonly<Record<Scale, number>>,
): readonly LatticeMove[] {
  if (!knows(parameters)) return [];
  return (["probe", "heavy"] as const).flatMap((scale) =>
    relative[scale] === 0
      ? []
      : (["up", "down"] as const).map((way): LatticeMove => {
          const factor = 1 + (way === "up" ? 1 : -1) * relative[scale];
          const leftOut = factor > 0 ? movedBy(beyond, parameters, scale, factor) : null;
          return {
            what: `${scale} ${way}`,
            leftOut: leftOut === null ? null : roundFloat(leftOut),
            meetsTarget: leftOut !== null && leftOut < target,
          };
        }),
  );
}

/**
 * The largest factor by which the probe scale may grow before what is left out reaches the target or a parameter
 * reaches 1: bisection in its logarithm. Null where a parameter does not follow the probe scale as a power, none does,
 * or nothing is left out.
 */
export function largestProbeOf(
  beyond: readonly SizedPoint[],
  parameters: readonly Sized[],
  target: number,
): number | null {
  const ends = parameters.flatMap(({ follows, size }) =>
    follows !== null && follows.probe > 0 ? [-Math.log(size) / follows.probe] : [],
  );
  if (!knows(parameters) || ends.length === 0 || beyond.length === 0) return null;
  const isEnough = (log: number) => {
    const left = movedBy(beyond, parameters, "probe", Math.exp(log));
    return left !== null && left < target;
  };
  let [low, high] = [0, Math.min(...ends)];
  if (!isEnough(low)) return null;
  for (let halving = 0; halving < 100 && high - low > 1e-13; halving += 1) {
    const middle = (low + high) / 2;
    if (isEnough(middle)) low = middle;
    else high = middle;
  }
  return roundFloat(Math.exp(low));
}
