import type { Axis } from "./plot-scales.ts";
import { plotFrame, type Curve, type Guide } from "./plot-model.ts";

interface AxesProps {
  readonly x: Axis;
  readonly y: Axis;
  readonly xLabel: string;
  readonly yLabel: string;
}

export function Axes({ x, y, xLabel, yLabel }: AxesProps) {
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

/** Ends closer than this, in pixels, meet. */
const MEET = 4;

/**
 * Labels at the right end of the curves, moved apart where they would lie on each other. Where ends meet, as sizes do at
 * the heavy scale, their order there says nothing: those labels stand in the order of the curves halfway along.
 */
export function EndLabels({
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
    .flatMap(({ key, label, points, color, draw }) => {
      const inside = points.filter(([at, value]) => within(at, x.domain) && within(value, y.domain));
      const last = inside.at(-1);
      const halfway = points[Math.floor(points.length / 2)];
      return last && halfway && draw !== "levels"
        ? [{ key, label, color, at: y.position(last[1]), rank: y.position(halfway[1]) }]
        : [];
    })
    .sort((a, b) => (Math.abs(a.at - b.at) < MEET ? a.rank - b.rank : a.at - b.at));
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

export function GuideLines({
  guides,
  x,
  y,
}: {
  readonly guides: readonly Guide[];
  readonly x: Axis;
  readonly y: Axis;
}) {
  const { width, height, left, right, top, bottom } = plotFrame;
  return guides.map(({ axis, value, color, label }) => (
    <line
      key={`${axis} ${label} ${value}`}
      className={`plot-guide plot-${color}`}
      {...(axis === "x"
        ? { x1: x.position(value), x2: x.position(value), y1: top, y2: height - bottom }
        : { x1: left, x2: width - right, y1: y.position(value), y2: y.position(value) })}
    />
  ));
}

export function GuideLabels({
  guides,
  x,
  y,
}: {
  readonly guides: readonly Guide[];
  readonly x: Axis;
  readonly y: Axis;
}) {
  return guides.map(({ axis, value, label, color }) => (
    <text
      key={`${axis} ${label} ${value}`}
      className={`plot-guide-label plot-text-${color}`}
      x={axis === "x" ? x.position(value) + 3 : plotFrame.left + 4}
      y={axis === "x" ? plotFrame.top + 8 : y.position(value) - 3}
    >
      {label}
    </text>
  ));
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
