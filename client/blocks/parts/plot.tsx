import { useId, useRef, useState, type ReactNode } from "react";
import { Axes, EndLabels, GuideLabels, GuideLines } from "./plot-axes.tsx";
import { Curves, RangeBands } from "./plot-lines.tsx";
import {
  isPositive,
  plainWords,
  plotFrame,
  type Curve,
  type Guide,
  type PlotWords,
  type RangeBand,
} from "./plot-model.ts";
import { PlotReader, ReadingMark, usePlotReader } from "./plot-reader.tsx";
import { axisOf, type Axis, type AxisSpec } from "./plot-scales.ts";
import { PlotTools, type AxisScale } from "./plot-tools.tsx";

export type { Curve, Guide, PlotColor } from "./plot-model.ts";

interface Props {
  /** Said by a screen reader instead of the drawing. */
  readonly name: string;
  readonly x: AxisSpec;
  readonly y: AxisSpec;
  readonly curves: readonly Curve[];
  /** Wide and pale first: each is drawn over those before it. */
  readonly bands?: readonly RangeBand[];
  readonly guides?: readonly Guide[];
  /** Drawn between the grid and the curves, in the plot's coordinates. */
  readonly below?: (x: Axis, y: Axis) => ReactNode;
  /** The same as a table: the heading of the first column, then one column per curve. */
  readonly table: { readonly x: string };
  /** How its numbers are written out; four digits unless told otherwise. */
  readonly words?: PlotWords;
}

/**
 * Curves on two axes. Dashes and shapes stand beside colours; values are read by pointer and by arrow keys, and all of
 * them are there as a table and as files. Whether an axis is logarithmic is a choice of the reader, kept nowhere.
 */
export function Plot({
  name,
  x: xSpec,
  y: ySpec,
  curves,
  bands = [],
  guides = [],
  below,
  table,
  words,
}: Props) {
  const clip = useId();
  const drawing = useRef<SVGSVGElement>(null);
  const [xScale, xSwitch] = useScale("x", xSpec, curves);
  const [yScale, ySwitch] = useScale("y", ySpec, curves);
  const { width, height, left, right, top, bottom } = plotFrame;
  const x = axisOf(xScale, [left, width - right], 5);
  const y = axisOf(yScale, [height - bottom, top], 6);
  const reader = usePlotReader(curves, x, y);
  const said = words ?? plainWords;
  return (
    <figure className="plot">
      <div className="plot-drawing">
        <svg ref={drawing} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={name}>
          <clipPath id={clip}>
            <rect x={left} y={top} width={width - left - right} height={height - top - bottom} />
          </clipPath>
          <Axes x={x} y={y} xLabel={xSpec.label} yLabel={ySpec.label} />
          <g clipPath={`url(#${clip})`}>
            {below?.(x, y)}
            <RangeBands bands={bands} x={x} y={y} />
            <Curves curves={curves} x={x} y={y} />
            <GuideLines guides={guides} x={x} y={y} />
            <ReadingMark shown={reader.shown} curves={curves} x={x} y={y} />
          </g>
          <EndLabels curves={curves} x={x} y={y} />
          <GuideLabels guides={guides} x={x} y={y} />
        </svg>
        <PlotReader name={name} xLabel={table.x} curves={curves} bands={bands} words={said} reader={reader} />
      </div>
      <PlotTools
        name={name}
        heading={table.x}
        curves={curves}
        bands={bands}
        words={said}
        drawing={drawing}
        scales={[xSwitch, ySwitch].filter((one) => one !== null)}
      />
    </figure>
  );
}

/** An axis as drawn first or as switched; it can be switched where all that is drawn has a logarithm. */
function useScale(
  axis: "x" | "y",
  spec: AxisSpec,
  curves: readonly Curve[],
): readonly [AxisSpec, AxisScale | null] {
  const [chosen, setChosen] = useState<AxisSpec["kind"] | null>(null);
  if (spec.ticks || !isPositive(axis, curves)) return [spec, null];
  const kind = chosen ?? spec.kind;
  const [low, high] = spec.domain;
  const least = Math.min(
    ...curves.flatMap(({ points }) => points.map((point) => point[axis === "x" ? 0 : 1])),
  );
  // A linear axis may begin at zero or below it, where a logarithmic one has no place.
  const from = kind === "log" && low <= 0 ? least / (axis === "x" ? 1 : 1.3) : low;
  const usable = from > 0 && from < high;
  if (kind === "log" && !usable) return [spec, null];
  return [
    { ...spec, kind, domain: [from, high] },
    { axis, kind, choose: setChosen },
  ];
}
