import type { BandAlong, CurveValue } from "#engine/truncation/curve-value.ts";
import type { Band } from "#engine/truncation/value.ts";
import { Plot, type Curve } from "../parts/plot.tsx";
import { axisLabel, pointsOf, rangeOf, spanOf } from "./plot-shapes.ts";

interface Props {
  readonly curve: CurveValue;
  readonly highlighted: Band | null;
  readonly unit: string;
}

/** X along x, order by order, with the band of the chosen method around the last order, and what was measured. */
export function BandsAlong({ curve, highlighted, unit }: Props) {
  const { x, orders, bands, measured } = curve;
  const last = orders.at(-1);
  if (!last) return null;
  const drawn = bands.filter(
    (band) =>
      band.order === last.order &&
      band.method === highlighted?.method &&
      band.omitted === highlighted.omitted,
  );
  const widest = drawn.at(-1);
  const reach = last.values.flatMap((value, index) => {
    const half = widest?.halfWidths[index] ?? 0;
    return value === null ? [] : [value - half, value + half];
  });
  const others = orders.slice(-3).flatMap(({ values }) => values.flatMap((value) => value ?? []));
  const shown = orders.slice(-4);
  return (
    <Plot
      name={`The quantity along ${axisLabel(curve.variable, curve.xUnit)}, order by order, with the band of ${highlighted?.method ?? "no method"} around order ${last.order}`}
      x={{ kind: "linear", label: axisLabel(curve.variable, curve.xUnit), domain: spanOf(x) }}
      y={{
        kind: "linear",
        label: unit,
        domain: rangeOf([...reach, ...others, ...measured.map(({ value }) => value)]),
      }}
      curves={[
        ...shown.map(({ order, values }, index) => ({
          key: String(order),
          label: `n = ${order}`,
          points: pointsOf(x, values),
          style: shown.length - 1 - index,
          color: order === last.order ? ("ink" as const) : ("irrelevant" as const),
        })),
        ...measuredCurve(measured),
      ]}
      guides={[{ axis: "x", value: curve.at, label: "", color: "tick" }]}
      bands={[...drawn].reverse().map((band, index) => ({
        key: band.degree ?? "band",
        label: band.degree === null ? "band" : `${band.degree} %`,
        of: String(last.order),
        points: ribbonOf(band, x, last.values),
        tone: index === drawn.length - 1 && drawn.length > 1 ? "inner" : "outer",
      }))}
      table={{ x: axisLabel(curve.variable, curve.xUnit) }}
    />
  );
}

function ribbonOf({ halfWidths }: BandAlong, x: readonly number[], values: readonly (number | null)[]) {
  return x.map((at, index) => {
    const [value, half] = [values[index] ?? null, halfWidths[index] ?? null];
    return value === null || half === null ? null : { x: at, low: value - half, high: value + half };
  });
}

/** What was measured, as marks with their errors. */
function measuredCurve(measured: CurveValue["measured"]): Curve[] {
  if (measured.length === 0) return [];
  const hasErrors = measured.some(({ error }) => error !== null);
  return [
    {
      key: "measured",
      label: "measured",
      points: measured.map(({ x, value }) => [x, value] as const),
      ...(hasErrors ? { errors: measured.map(({ error }) => error) } : {}),
      style: 3,
      color: "relevant",
      draw: "marks",
    },
  ];
}
