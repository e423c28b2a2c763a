import type { RunningValue } from "#engine/running/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { Plot, type Guide } from "../parts/plot.tsx";

/** Above this ratio of largest to smallest the couplings stand on a logarithmic axis. */
const WIDE = 3;

/** Couplings against the scale; thresholds and the pole are upright lines. */
export function RunningPlot({ value }: ResultProps<RunningValue>) {
  const { plot } = value;
  if (!plot || plot.curves.length === 0) return null;
  const points = plot.curves.flatMap((curve) => curve.points);
  const scales = points.map(([scale]) => scale);
  const sizes = points.map(([, size]) => size);
  const [least, most] = [Math.min(...sizes), Math.max(...sizes)];
  const isLog = least > 0 && most / least > WIDE;
  const room = (most - least || Math.abs(most) || 1) * 0.08;
  const unit = plot.unit === "" ? "" : ` in ${plot.unit}`;
  const ends = [
    Math.min(...scales, ...(plot.pole ? [plot.pole.at] : [])),
    Math.max(...scales, ...(plot.pole ? [plot.pole.at] : [])),
  ] as const;
  const guides: Guide[] = plot.thresholds.map(({ at, label }) => ({
    axis: "x",
    value: at,
    label,
    color: "tick",
  }));
  if (plot.pole) guides.push({ axis: "x", value: plot.pole.at, label: plot.pole.label, color: "relevant" });
  return (
    <Plot
      name="Couplings against the scale"
      x={{ kind: "log", label: `scale μ${unit}`, domain: ends }}
      y={
        isLog
          ? { kind: "log", label: "couplings", domain: [least / 1.15, Math.min(most * 1.15, 1e3)] }
          : { kind: "linear", label: "couplings", domain: [least - room, most + room] }
      }
      curves={plot.curves.map(({ id, label, points: own }, index) => ({
        key: id,
        label,
        points: own,
        style: index,
        color: "ink",
      }))}
      guides={guides}
      table={{ x: `μ${unit}` }}
    />
  );
}
