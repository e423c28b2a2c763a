import { curveMonotoneX, line as lineShape } from "d3-shape";
import type { Axis } from "./plot-scales.ts";
import { dashOf, markOf, type Curve, type RangeBand, type RangePoint } from "./plot-model.ts";

interface Axes {
  readonly x: Axis;
  readonly y: Axis;
}

/** Half the length of the stroke that stands for a level. */
const LEVEL = 20;
/** More marks than these are drawn small, or they would hide what they stand beside. */
const MANY = 16;

/** Curves as lines with dashes, or as marks with shapes, and the error bars of marks. */
export function Curves({ curves, x, y }: Axes & { readonly curves: readonly Curve[] }) {
  const path = lineShape<readonly [number, number]>()
    .defined(([at, value]) => Number.isFinite(x.position(at)) && Number.isFinite(y.position(value)))
    .x(([at]) => x.position(at))
    .y(([, value]) => y.position(value))
    .curve(curveMonotoneX);
  return curves.map((curve) => {
    const { key, points, style, color, draw = "line" } = curve;
    if (draw !== "line" || points.length === 1)
      return (
        <g key={key}>
          {points.map(([at, value], index) => (
            <g key={index}>
              <ErrorBar curve={curve} index={index} x={x} y={y} />
              <path
                d={draw === "levels" ? `M${-LEVEL},0H${LEVEL}` : markOf(style)}
                transform={`translate(${x.position(at).toFixed(2)} ${y.position(value).toFixed(2)})${draw === "marks" && points.length > MANY ? " scale(0.55)" : ""}`}
                className={`${draw === "levels" ? "plot-value" : "plot-point"} plot-${color}`}
              />
            </g>
          ))}
        </g>
      );
    return (
      <path
        key={key}
        d={path([...points]) ?? ""}
        className={`plot-curve plot-${color}`}
        strokeDasharray={dashOf(style)}
      />
    );
  });
}

function ErrorBar({ curve, index, x, y }: Axes & { readonly curve: Curve; readonly index: number }) {
  const [at, value] = curve.points[index] ?? [NaN, NaN];
  const half = curve.errors?.[index] ?? null;
  if (half === null) return null;
  return (
    <line
      className={`plot-${curve.color}`}
      x1={x.position(at)}
      x2={x.position(at)}
      y1={y.position(floored(value - half, y))}
      y2={y.position(value + half)}
    />
  );
}

/** On a logarithmic axis nothing reaches below what is shown. */
function floored(value: number, { kind, domain }: Axis): number {
  return kind === "log" ? Math.max(value, domain[0] / 10) : value;
}

const tones = { outer: "plot-band-outer", inner: "plot-band-middle", core: "plot-band-inner" } as const;

export function RangeBands({ bands, x, y }: Axes & { readonly bands: readonly RangeBand[] }) {
  return bands.map(({ key, points, tone, box }) =>
    box === undefined ? (
      <path key={key} className={tones[tone]} d={outline(points, x, y)} />
    ) : (
      <g key={key}>
        {points.map((point, index) => {
          if (!point) return null;
          const [left, right] = [x.position(point.x - box), x.position(point.x + box)];
          const [top, bottom] = [y.position(floored(point.high, y)), y.position(floored(point.low, y))];
          return (
            <rect
              key={index}
              className={tones[tone]}
              x={left}
              width={right - left}
              y={top}
              height={Math.max(1, bottom - top)}
            />
          );
        })}
      </g>
    ),
  );
}

/** The outline of a band, in pieces where it is interrupted. */
function outline(points: readonly (RangePoint | null)[], x: Axis, y: Axis): string {
  const pieces: RangePoint[][] = [[]];
  for (const point of points) {
    if (point) pieces.at(-1)?.push(point);
    else pieces.push([]);
  }
  const place = (at: number, value: number) =>
    `${x.position(at).toFixed(1)},${y.position(floored(value, y)).toFixed(1)}`;
  return pieces
    .filter((piece) => piece.length > 0)
    .map((piece) => {
      const there = piece.map(({ x: at, high }) => place(at, high));
      const back = [...piece].reverse().map(({ x: at, low }) => place(at, low));
      return `M${[...there, ...back].join("L")}Z`;
    })
    .join("");
}
