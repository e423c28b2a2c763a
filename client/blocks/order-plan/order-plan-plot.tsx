import type { OrderPlanValue } from "#engine/plan/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { sizeText, withUnit } from "../parts/number-text.ts";
import { Plot, type Curve } from "../parts/plot.tsx";
import { plain, powerOf } from "../parts/plot-scales.ts";

/** What is left out against the probe scale, one curve for each order one might stop at; the target is the hairline. */
export function OrderPlanPlot({ value }: ResultProps<OrderPlanValue>) {
  const { probe, target, order } = value;
  const curves = value.curves
    .map((curve, index): Curve => ({
      key: curve.order.text,
      label: powerOf("Q", curve.order.text),
      points: curve.points
        .filter(({ leftOut }) => leftOut > 0)
        .map(({ probe: at, leftOut }) => [at, leftOut] as const),
      style: index,
      color: curve.order.text === order?.text ? "ink" : "irrelevant",
    }))
    .filter(({ points }) => points.length > 1);
  if (curves.length === 0) return null;
  const scales = curves.flatMap(({ points }) => points.map(([at]) => at));
  const lefts = curves.flatMap(({ points }) => points.map(([, left]) => left));
  const unit = probe.unit === "" ? "" : ` in ${probe.unit}`;
  const lowest = Math.max(Math.min(...lefts), Math.min(target, probe.value > 0 ? 1 : target) * 1e-4, 1e-12);
  return (
    <Plot
      name={`What is left out against the probe scale, for each order to stop at; the target is ${plain(target)}`}
      x={{ kind: "log", label: `probe scale p${unit}`, domain: [Math.min(...scales), Math.max(...scales)] }}
      y={{ kind: "log", label: "left out", domain: [lowest, Math.max(1, Math.min(10, Math.max(...lefts)))] }}
      curves={curves}
      guides={[
        { axis: "y", value: target, label: "target", color: "hairline" },
        {
          axis: "x",
          value: probe.value,
          label: withUnit(sizeText(probe.value, 3), probe.unit),
          color: "ink",
        },
      ]}
      table={{ x: `p${unit}` }}
    />
  );
}
