/** Size against probe scale: every term is a power law, a straight line where both axes are logarithmic. */
import { roundFloat } from "../evaluation.ts";
import { shown } from "../notation/quantity.ts";
import { presentMeasured } from "../premises/present-measured.ts";
import type { ScalingPlot, ScalingRow } from "./value.ts";
import type { WorkingPoint } from "./working-point.ts";

const SAMPLES = 25;
/** How far below the probe scale the axis begins, and how far above the larger scale it ends. */
const ROOM_BELOW = 10;
const ROOM_ABOVE = 1.5;

/**
 * Null without p, Λ and at least one sized term that is not kinetic. The axis is in the probe's unit. An assigned size
 * is one at p; its coefficient is fixed, so it follows p with the power of its dimension all the same. Where that
 * dimension is symbolic the size is known at p only.
 */
export function scalingPlot(point: WorkingPoint, rows: readonly ScalingRow[]): ScalingPlot | null {
  const { probe, heavy, expansion } = point;
  if (!probe?.quantity || !heavy?.quantity || !expansion) return null;
  const p = shown(probe.quantity);
  const heavyInUnit = p.value / expansion.value;
  // Scales so far apart that their ratio leaves the range of a double have no common axis.
  if (!Number.isFinite(heavyInUnit * ROOM_ABOVE) || !(p.value / ROOM_BELOW > 0)) return null;
  const [from, to] = [
    Math.min(p.value, heavyInUnit) / ROOM_BELOW,
    Math.max(p.value, heavyInUnit) * ROOM_ABOVE,
  ];
  const xs = Array.from({ length: SAMPLES }, (_, i) => from * (to / from) ** (i / (SAMPLES - 1)));
  const curves = rows.flatMap(({ rowId, latex, scalingClass, size, kinetic, coefficient }) => {
    if (!size || kinetic) return [];
    const exponent = -ratio(coefficient.text);
    const at = (x: number) => {
      const growth = x === p.value ? 1 : (x / p.value) ** exponent;
      return [roundFloat(x), roundFloat(size.value * growth)] as const;
    };
    const points = (Number.isFinite(exponent) ? xs : [p.value])
      .map(at)
      .filter(([, y]) => Number.isFinite(y) && y > 0);
    return [{ rowId, latex, scalingClass, points }];
  });
  if (curves.length === 0) return null;
  const relative = heavyInUnit / shown(heavy.quantity).value;
  return {
    unit: p.unit,
    probe: presentMeasured(p.value, p.sigma, p.unit),
    heavy: presentMeasured(heavyInUnit, shown(heavy.quantity).sigma * relative, p.unit),
    curves,
  };
}

/** Canonical text of a rational as a float; NaN where symbols are left in it. */
function ratio(text: string): number {
  const [over = "0", under = "1"] = text.split("/");
  return Number(over) / Number(under);
}
