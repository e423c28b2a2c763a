import type { BandAlong, CurveValue } from "#engine/truncation/curve-value.ts";
import type { Band } from "#engine/truncation/value.ts";
import type { Axis } from "../parts/plot-scales.ts";
import { Plot } from "../parts/plot.tsx";
import { axisLabel, pointsOf, rangeOf, ribbonPath, spanOf } from "./plot-shapes.ts";

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
      curves={shown.map(({ order, values }, index) => ({
        key: String(order),
        label: `n = ${order}`,
        points: pointsOf(x, values),
        style: shown.length - 1 - index,
        color: order === last.order ? "ink" : "irrelevant",
      }))}
      guides={[{ axis: "x", value: curve.at, label: "", color: "tick" }]}
      below={(xAxis, yAxis) => (
        <>
          {[...drawn].reverse().map((band, index) => (
            <path
              key={band.degree ?? ""}
              className={
                index === drawn.length - 1 && drawn.length > 1 ? "truncation-band-inner" : "plot-band-outer"
              }
              d={ribbonPath(ribbonOf(band, x, last.values), xAxis, yAxis)}
            />
          ))}
          <Measured measured={measured} x={xAxis} y={yAxis} />
        </>
      )}
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

function Measured({
  measured,
  x,
  y,
}: {
  readonly measured: CurveValue["measured"];
  readonly x: Axis;
  readonly y: Axis;
}) {
  return measured.map(({ x: at, value, error }) => (
    <g key={at} className="truncation-measured">
      {error !== null && (
        <line
          x1={x.position(at)}
          x2={x.position(at)}
          y1={y.position(value - error)}
          y2={y.position(value + error)}
        />
      )}
      <circle cx={x.position(at)} cy={y.position(value)} r={1.8} />
    </g>
  ));
}
