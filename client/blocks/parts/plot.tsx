import { curveMonotoneX, line as lineShape } from "d3-shape";
import { useId, type ReactNode } from "react";
import { axisOf, plain, type Axis, type AxisSpec } from "./plot-scales.ts";
import { ScrollBox } from "./scroll-box.tsx";

export interface Curve {
  readonly key: string;
  /** For the legend at the curve's end: plain text. */
  readonly label: string;
  readonly points: readonly (readonly [number, number])[];
  /** 0, 1, 2, …: the dashes that tell curves apart without colour. */
  readonly style: number;
  /** A token of the palette, without its dashes: "irrelevant". */
  readonly color: PlotColor;
}
export type PlotColor = "ink" | "relevant" | "marginal" | "irrelevant" | "hairline" | "tick";

export interface Guide {
  readonly axis: "x" | "y";
  readonly value: number;
  readonly label: string;
  readonly color: PlotColor;
}

interface Props {
  /** Said by a screen reader instead of the drawing. */
  readonly name: string;
  readonly x: AxisSpec;
  readonly y: AxisSpec;
  readonly curves: readonly Curve[];
  readonly guides?: readonly Guide[];
  /** Drawn between the grid and the curves, in the plot's coordinates. */
  readonly below?: (x: Axis, y: Axis) => ReactNode;
  /** The same as a table: the heading of the first column, then one column per curve. */
  readonly table: { readonly x: string };
}

export const plotFrame = { width: 340, height: 208, left: 46, right: 62, top: 22, bottom: 38 } as const;
const dashes = ["", "7 3", "3 2.5", "1.5 3", "9 3 1.5 3", "5 2 1.5 2 1.5 2"];

export function dashOf(style: number): string {
  return dashes[style % dashes.length] ?? "";
}

/** Curves on two axes. Styles of line stand beside colours; the numbers are there as a table too. */
export function Plot({ name, x: xSpec, y: ySpec, curves, guides = [], below, table }: Props) {
  const clip = useId();
  const { width, height, left, right, top, bottom } = plotFrame;
  const x = axisOf(xSpec, [left, width - right], 5);
  const y = axisOf(ySpec, [height - bottom, top], 6);
  const draw = lineShape<readonly [number, number]>()
    .x(([at]) => x.position(at))
    .y(([, value]) => y.position(value))
    .curve(curveMonotoneX);
  return (
    <figure className="plot">
      <svg viewBox={`0 0 ${width} ${height}`} role="img" aria-label={name}>
        <clipPath id={clip}>
          <rect x={left} y={top} width={width - left - right} height={height - top - bottom} />
        </clipPath>
        <Axes x={x} y={y} xLabel={xSpec.label} yLabel={ySpec.label} />
        <g clipPath={`url(#${clip})`}>
          {below?.(x, y)}
          {curves.map(({ key, points, style, color }) =>
            points.length === 1 ? (
              <circle
                key={key}
                cx={x.position(points[0]?.[0] ?? 0)}
                cy={y.position(points[0]?.[1] ?? 0)}
                r={3.2}
                className={`plot-point plot-${color}`}
              />
            ) : (
              <path
                key={key}
                d={draw([...points]) ?? ""}
                className={`plot-curve plot-${color}`}
                strokeDasharray={dashOf(style)}
              />
            ),
          )}
          {guides.map(({ axis, value, color, label }) => (
            <line
              key={`${axis} ${label}`}
              className={`plot-guide plot-${color}`}
              {...(axis === "x"
                ? { x1: x.position(value), x2: x.position(value), y1: top, y2: height - bottom }
                : { x1: left, x2: width - right, y1: y.position(value), y2: y.position(value) })}
            />
          ))}
        </g>
        <EndLabels curves={curves} x={x} y={y} />
        {guides.map(({ axis, value, label, color }) =>
          axis === "x" ? (
            <text
              key={label}
              className={`plot-guide-label plot-text-${color}`}
              x={x.position(value) + 3}
              y={top + 8}
            >
              {label}
            </text>
          ) : (
            <text
              key={label}
              className={`plot-guide-label plot-text-${color}`}
              x={left + 4}
              y={y.position(value) - 3}
            >
              {label}
            </text>
          ),
        )}
      </svg>
      <details className="plot-table">
        <summary>as a table</summary>
        <PointTable name={name} heading={table.x} curves={curves} />
      </details>
    </figure>
  );
}

function Axes({
  x,
  y,
  xLabel,
  yLabel,
}: {
  readonly x: Axis;
  readonly y: Axis;
  readonly xLabel: string;
  readonly yLabel: string;
}) {
  const { width, height, left, right, bottom } = plotFrame;
  const floor = height - bottom;
  return (
    <g aria-hidden="true">
      {y.ticks.map(({ value, label, major }) => (
        <g key={value}>
          {major && (
            <line
              className="plot-grid"
              x1={left}
              x2={width - right}
              y1={y.position(value)}
              y2={y.position(value)}
            />
          )}
          <text className="plot-tick-label" x={left - 6} y={y.position(value) + 3.5} textAnchor="end">
            {label}
          </text>
        </g>
      ))}
      <line className="plot-axis" x1={left} x2={width - right} y1={floor} y2={floor} />
      {x.ticks.map(({ value, label }) => (
        <g key={value}>
          <line
            className="plot-axis"
            x1={x.position(value)}
            x2={x.position(value)}
            y1={floor}
            y2={floor + (label === "" ? 3 : 5)}
          />
          <text className="plot-tick-label" x={x.position(value)} y={floor + 16} textAnchor="middle">
            {label}
          </text>
        </g>
      ))}
      <text className="plot-axis-label" x={(left + width - right) / 2} y={height - 5} textAnchor="middle">
        {xLabel}
      </text>
      {yLabel !== "" && (
        <text className="plot-axis-label" x={2} y={11}>
          {yLabel}
        </text>
      )}
    </g>
  );
}

/**
 * Labels at the right end of the curves, moved apart where they would lie on each other. They stand in the order of the
 * curves halfway along, where these are apart: sizes meet at the heavy scale, and their order there says nothing.
 */
function EndLabels({
  curves,
  x,
  y,
}: {
  readonly curves: readonly Curve[];
  readonly x: Axis;
  readonly y: Axis;
}) {
  const { height, top, bottom, width, right } = plotFrame;
  const wanted = curves
    .flatMap(({ key, label, points, color }) => {
      const inside = points.filter(([at, value]) => within(at, x.domain) && within(value, y.domain));
      const last = inside.at(-1);
      const halfway = points[Math.floor(points.length / 2)];
      return last && halfway
        ? [{ key, label, color, at: y.position(last[1]), rank: y.position(halfway[1]) }]
        : [];
    })
    .sort((a, b) => a.rank - b.rank);
  const placed = spread(
    wanted.map(({ at }) => at).sort((a, b) => a - b),
    11.5,
    top + 4,
    height - bottom,
  );
  return (
    <g aria-hidden="true">
      {wanted.map(({ key, label, color }, index) => (
        <text
          key={key}
          className={`plot-end-label plot-text-${color}`}
          x={width - right + 5}
          y={(placed[index] ?? 0) + 3.5}
        >
          {label}
        </text>
      ))}
    </g>
  );
}

/** Positions in rising order, at least `gap` apart, moved as little as a sweep down and up can. */
export function spread(positions: readonly number[], gap: number, low: number, high: number): number[] {
  const placed: number[] = [];
  for (const at of positions)
    placed.push(Math.max(at, low, (placed.at(-1) ?? Number.NEGATIVE_INFINITY) + gap));
  for (let index = placed.length - 1; index >= 0; index--) {
    placed[index] = Math.min(
      placed[index] ?? 0,
      index === placed.length - 1 ? high : (placed[index + 1] ?? high) - gap,
    );
  }
  return placed;
}

function within(value: number, [low, high]: readonly [number, number]): boolean {
  return value >= Math.min(low, high) * 0.999999 && value <= Math.max(low, high) * 1.000001;
}

const MOST_TABLE_ROWS = 12;

function PointTable({
  name,
  heading,
  curves,
}: {
  readonly name: string;
  readonly heading: string;
  readonly curves: readonly Curve[];
}) {
  const all = curves[0]?.points ?? [];
  const step = Math.max(1, Math.ceil(all.length / MOST_TABLE_ROWS));
  const rows = all.map((_, index) => index).filter((index) => index % step === 0 || index === all.length - 1);
  return (
    <ScrollBox what="table of the plot">
      <table className="block-table">
        <caption className="sr-only">{name}</caption>
        <thead>
          <tr>
            <th scope="col">{heading}</th>
            {curves.map(({ key, label }) => (
              <th key={key} scope="col" className="block-numeric">
                {label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((index) => (
            <tr key={index}>
              <th scope="row">{plain(all[index]?.[0] ?? 0)}</th>
              {curves.map(({ key, points }) => (
                <td key={key} className="block-numeric">
                  {points[index] ? plain(points[index][1]) : ""}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollBox>
  );
}
