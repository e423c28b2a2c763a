import type { ScalingValue } from "#engine/scaling/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { Plot, type Curve } from "../parts/plot.tsx";

/** Size against probe scale, both logarithmic; the working point is the upright line. */
export function ScalingPlot({ value }: ResultProps<ScalingValue>) {
  const { plot } = value;
  if (!plot || plot.curves.length === 0) return null;
  const curves = grouped(value);
  const points = curves.flatMap((curve) => curve.points).filter(([, size]) => size > 0);
  if (points.length === 0) return null;
  const sizes = points.map(([, size]) => size);
  const scales = points.map(([scale]) => scale);
  const unit = plot.unit === "" ? "" : ` in ${plot.unit}`;
  return (
    <Plot
      name={`Size of the terms against the probe scale; at ${plot.probe.text} the working point`}
      x={{ kind: "log", label: `probe scale p${unit}`, domain: [Math.min(...scales), Math.max(...scales)] }}
      y={{ kind: "log", label: "size", domain: [Math.max(Math.min(...sizes), 1e-12), Math.max(1, ...sizes)] }}
      curves={curves}
      guides={[{ axis: "x", value: plot.probe.value, label: plot.probe.text, color: "ink" }]}
      table={{ x: `p${unit}` }}
    />
  );
}

/** Terms of one dimension and natural coefficient lie on one line: drawn once, named by the dimension. */
function grouped({ plot, rows }: ScalingValue): Curve[] {
  const rowOf = new Map(rows.map((row) => [row.rowId, row]));
  const byLine = new Map<string, Omit<Curve, "label"> & { readonly names: Set<string> }>();
  for (const { rowId, points, scalingClass } of plot?.curves ?? []) {
    const row = rowOf.get(rowId);
    if (!row || row.kinetic || !row.allowed) continue;
    const [first, last] = [points[0], points.at(-1)];
    // A size given by hand is known at the working point only: a point, never part of a line.
    const key = `${points.length} ${first?.[1]} ${last?.[1]}`;
    const name = row.sizeFrom === "assigned" ? "assigned" : `Δ = ${row.dimension.text}`;
    const known = byLine.get(key);
    if (known) {
      known.names.add(name);
      continue;
    }
    byLine.set(key, {
      key: rowId,
      points: points.filter(([scale, size]) => scale > 0 && size > 0),
      style: byLine.size,
      color: scalingClass ?? "ink",
      names: new Set([name]),
    });
  }
  return [...byLine.values()].map(({ names, ...curve }) => ({
    ...curve,
    label: [...names].sort().reverse().join(", "),
  }));
}
