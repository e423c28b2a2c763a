/** How the order to stop at moves: with one standard deviation of each scale, over p, and what is left out along p. */
import { roundFloat } from "../evaluation.ts";
import { shown } from "../exact/shown.ts";
import type { Rational } from "../exact/rational.ts";
import type { PlanScales } from "./read-scales.ts";
import type { Point } from "./powers.ts";
import { leftOutAt, leftOutByOrder, orderFor, slopesOfLeftOut, type Expansion } from "./sums.ts";
import type { PlanTerm } from "./terms.ts";
import type { LeftOutCurve, ProbeRow, Shift } from "./value.ts";

const probeFactors = [0.25, 0.5, 0.75, 1, 1.25, 1.5, 2, 3, 4, 6];
const CURVE_POINTS = 48;
const MOST_CURVES = 6;

function outcomeAt(expansion: Expansion, point: Point): Pick<ProbeRow, "Q" | "order" | "leftOut"> {
  const order = orderFor(expansion, point);
  return {
    Q: roundFloat((expansion.Q * point.probe) / point.heavy),
    order: order && shown(order),
    leftOut: order && roundFloat(leftOutAt(expansion, order, point).used),
  };
}

/** Rows for the scales that have an uncertainty; a scale that would fall to zero or below is not moved down. */
export function shiftsOf(expansion: Expansion, { probe, heavy }: PlanScales): Shift[] {
  const moved = (what: Shift["what"], factor: number, point: Point): Shift[] =>
    factor > 0 && factor !== 1 ? [{ what, ...outcomeAt(expansion, point) }] : [];
  const up = (scale: PlanScales["probe"]) => 1 + scale.sigma / scale.value;
  const down = (scale: PlanScales["probe"]) => 1 - scale.sigma / scale.value;
  return [
    ...moved("probe up", up(probe), { probe: up(probe), heavy: 1 }),
    ...moved("probe down", down(probe), { probe: down(probe), heavy: 1 }),
    ...moved("heavy up", up(heavy), { probe: 1, heavy: up(heavy) }),
    ...moved("heavy down", down(heavy), { probe: 1, heavy: down(heavy) }),
  ];
}

export function probeTable(expansion: Expansion, { probe }: PlanScales): ProbeRow[] {
  return probeFactors
    .filter((factor) => factor * expansion.Q < 1)
    .map((factor) => ({
      probe: roundFloat(factor * probe.value),
      ...outcomeAt(expansion, { probe: factor, heavy: 1 }),
    }));
}

/** From a tenth of p to just below Λ, equally spaced in the logarithm. */
export function curvesOf(expansion: Expansion, { probe }: PlanScales): LeftOutCurve[] {
  const first = Math.log(0.1);
  const last = Math.log(0.97 / expansion.Q);
  const factors = Array.from({ length: CURVE_POINTS }, (_, n) =>
    Math.exp(first + ((last - first) * n) / (CURVE_POINTS - 1)),
  );
  const points = factors.map((factor) => ({
    probe: roundFloat(factor * probe.value),
    leftOutAt: leftOutByOrder(expansion, { probe: factor, heavy: 1 }),
  }));
  return expansion.orders.slice(0, MOST_CURVES).map((order) => ({
    order: shown(order),
    points: points.map((point) => ({
      probe: point.probe,
      leftOut: roundFloat(point.leftOutAt(order).used),
    })),
  }));
}

/**
 * Standard uncertainty of what is left out, to first order: from every source that p and Λ rest on, and from each size
 * given by hand. A size given by hand does not move with Λ.
 */
export function sigmaOfLeftOut(
  expansion: Expansion,
  order: Rational,
  terms: readonly PlanTerm[],
  { probe, heavy }: PlanScales,
): number {
  const slopes = slopesOfLeftOut(expansion, order);
  const relative = ({ quantity }: PlanScales["probe"], source: string) =>
    (quantity.spread.get(source) ?? 0) / quantity.value;
  const sources = new Set([...probe.quantity.spread.keys(), ...heavy.quantity.spread.keys()]);
  const byScales = [...sources].map(
    (source) => slopes.probe * relative(probe, source) + slopes.heavy * relative(heavy, source),
  );
  const byHand = terms.map(({ rowId, assigned }) =>
    assigned && assigned.value !== 0
      ? ((slopes.byHand.get(rowId) ?? 0) * assigned.sigma) / Math.abs(assigned.value)
      : 0,
  );
  return Math.hypot(...byScales, ...byHand);
}
