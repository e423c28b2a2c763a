/** How a small parameter follows the probe and the heavy scale, so that a plan can ask what happens when they move. */
import { readQuantity } from "../notation/read-quantity.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { ScaleRole, Theory } from "../premises/theory.ts";

export interface Follows {
  readonly probe: number;
  readonly heavy: number;
}

const SAME = 1e-9;

/** By id; those that are no power of both scales, as a maximum or a sum, are left out. */
export function followsOf(
  rows: readonly { readonly id: string; readonly value: string }[],
  theory: Theory,
): ReadonlyMap<string, Follows> {
  return new Map(
    rows.flatMap(({ id, value }) => {
      const [probe, heavy] = [powerOf("probe", value, theory), powerOf("heavy", value, theory)];
      return probe === null || heavy === null ? [] : [[id, { probe, heavy }] as const];
    }),
  );
}

/** d ln value / d ln scale where it is the same from half to twice the scale; null elsewhere. */
function powerOf(role: ScaleRole, text: string, theory: Theory): number | null {
  const at = (factor: number): number => {
    const read = readQuantity(text, declaredScales(scaled(theory, role, factor)), "follows");
    return read.ok && read.value.quantity.value > 0 ? Math.log(read.value.quantity.value) : Number.NaN;
  };
  const [below, here, above] = [at(0.5), at(1), at(2)];
  const [down, up] = [(here - below) / Math.LN2, (above - here) / Math.LN2];
  if (!(Math.abs(up - down) < SAME)) return null;
  // Halves, thirds and the like are what people write; rounding is not.
  return Math.round(up * 1e9) / 1e9;
}

function scaled(theory: Theory, role: ScaleRole, factor: number): Theory {
  return {
    ...theory,
    scales: theory.scales.map((scale) =>
      scale.role === role && scale.value !== null ? { ...scale, value: scale.value * factor } : scale,
    ),
  };
}
