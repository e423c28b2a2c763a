/** What the ruler says at some probe scale and target: from the plan's own numbers, by their exponents. */
import type { RulerMark, RulerModel, RulerOrder } from "./ruler-model.ts";

export interface ReadMark {
  readonly mark: RulerMark;
  readonly size: number;
  /** Within the order to stop at; without a target everything is. */
  readonly included: boolean;
}

export interface Reading {
  readonly probe: number;
  readonly target: number | null;
  readonly Q: number;
  readonly marks: readonly ReadMark[];
  /** The order to stop at; null when the listed terms do not reach the target, or without a target. */
  readonly order: RulerOrder | null;
  /** Of the lowest order beyond that, the largest. */
  readonly firstOut: ReadMark | null;
}

/** At the model's own p and target this is what its Order plan says. */
export function readAt(model: RulerModel, probe: number, target: number | null): Reading {
  const factor = probe / model.probe.value;
  const order =
    target === null
      ? null
      : (model.orders.find((candidate) => leftOutAt(model, candidate, probe) <= target) ?? null);
  const marks = model.marks.map((mark) => ({
    mark,
    size: factor === 1 ? mark.size : mark.size * factor ** mark.power,
    included: order === null || mark.order <= order.order,
  }));
  return { probe, target, Q: model.Q.value * factor, marks, order, firstOut: firstOutOf(marks) };
}

function firstOutOf(marks: readonly ReadMark[]): ReadMark | null {
  const out = marks.filter(({ included }) => !included);
  const lowest = Math.min(...out.map(({ mark }) => mark.order));
  return out
    .filter(({ mark }) => mark.order === lowest)
    .reduce<ReadMark | null>(
      (largest, mark) => (largest && largest.size >= mark.size ? largest : mark),
      null,
    );
}

/**
 * What is left out when one stops at an order, at another p: along the plan's curve, which is straight between its points
 * where both are logarithmic. Where the plan has no curve, nothing is claimed: the order does not meet any target there.
 */
export function leftOutAt(model: RulerModel, { leftOut, curve }: RulerOrder, probe: number): number {
  if (probe === model.probe.value) return leftOut;
  const points = curve.filter(([, value]) => value > 0);
  const after = points.findIndex(([at]) => at >= probe);
  const [low, high] = [points[Math.max(after, 1) - 1], points[Math.max(after, 1)]];
  // The list ends below this p, or has no two points.
  if (after === -1 || !low || !high)
    return curve.length > 0 && curve.every(([, value]) => value === 0) ? 0 : Infinity;
  const share = Math.log(probe / low[0]) / Math.log(high[0] / low[0]);
  return low[1] * (high[1] / low[1]) ** share;
}
