import { useId } from "react";
import type { PlanLattice } from "#engine/plan/lattice.ts";

const WIDTH = 420;
const HEIGHT = 260;
const edge = { left: 46, right: 14, top: 16, bottom: 36 };

interface Place {
  readonly key: string;
  readonly at: readonly [number, number];
  readonly count: number;
  readonly included: boolean;
}

/**
 * Orders in two small parameters. Sizes fall along straight lines, so the cut is one: the red hairline runs between the
 * smallest size that is kept and the largest that is left out, and what lies beyond is hatched. The table says the same.
 */
export function LatticeDrawing({ lattice }: { readonly lattice: PlanLattice }) {
  const hatch = useId();
  const [first, second] = lattice.parameters;
  if (!first || !second) return null;
  const places = lattice.points.map(({ order, count, included }): Place => ({
    key: order.join(","),
    at: [numberOf(order[0]), numberOf(order[1])],
    count,
    included,
  }));
  const range = (axis: 0 | 1): readonly [number, number] => {
    const values = [0, ...places.map(({ at }) => at[axis])];
    const most = Math.min(Math.max(...values), MOST_POWER);
    return [Math.max(Math.min(...values), -MOST_POWER) - 0.5, Math.max(most, 1) + 0.5];
  };
  const [xs, ys] = [range(0), range(1)];
  const x = (power: number) =>
    edge.left + ((power - xs[0]) / (xs[1] - xs[0])) * (WIDTH - edge.left - edge.right);
  const y = (power: number) =>
    HEIGHT - edge.bottom - ((power - ys[0]) / (ys[1] - ys[0])) * (HEIGHT - edge.top - edge.bottom);
  const cut = cutOf(lattice);
  const [a, b] = [Math.log(first.size), Math.log(second.size)];
  // a·n₁ + b·n₂ = cut: two points of it far outside the frame, which clips it.
  const far = 60;
  const line =
    cut === null
      ? null
      : Math.abs(b) > 1e-12
        ? ([-far, far].map((n) => [x(n), y((cut - a * n) / b)]) as [[number, number], [number, number]])
        : null;
  const frame = {
    x: edge.left,
    y: edge.top,
    width: WIDTH - edge.left - edge.right,
    height: HEIGHT - edge.top - edge.bottom,
  };
  return (
    <svg
      className="plan-lattice-drawing"
      viewBox={`0 0 ${String(WIDTH)} ${String(HEIGHT)}`}
      role="img"
      aria-label={`Orders in two parameters: ${String(places.filter(({ included }) => included).length)} kept, ${String(places.filter(({ included }) => !included).length)} beyond the cut`}
    >
      <defs>
        <clipPath id={`${hatch}-frame`}>
          <rect {...frame} />
        </clipPath>
        <pattern id={hatch} width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line y2="7" stroke="var(--hatch)" strokeWidth="2" />
        </pattern>
      </defs>
      <g clipPath={`url(#${hatch}-frame)`}>
        {line && (
          <>
            <path
              d={`M${line[0].join(",")} L${line[1].join(",")} L${String(line[1][0])},-9000 L${String(line[0][0])},-9000 Z`}
              fill={`url(#${hatch})`}
            />
            <path
              d={`M${line[0].join(",")} L${line[1].join(",")}`}
              stroke="var(--hairline)"
              strokeWidth="1.2"
            />
          </>
        )}
      </g>
      {ticks(xs).map((power) => (
        <g key={`x${String(power)}`}>
          <line
            x1={x(power)}
            x2={x(power)}
            y1={HEIGHT - edge.bottom}
            y2={HEIGHT - edge.bottom + 5}
            stroke="var(--tick)"
          />
          <text className="plot-tick-label" x={x(power)} y={HEIGHT - edge.bottom + 17} textAnchor="middle">
            {power}
          </text>
        </g>
      ))}
      {ticks(ys).map((power) => (
        <g key={`y${String(power)}`}>
          <line x1={edge.left - 5} x2={edge.left} y1={y(power)} y2={y(power)} stroke="var(--tick)" />
          <text className="plot-tick-label" x={edge.left - 8} y={y(power) + 3.5} textAnchor="end">
            {power}
          </text>
        </g>
      ))}
      <path
        d={`M${String(edge.left)},${String(edge.top)} V${String(HEIGHT - edge.bottom)} H${String(WIDTH - edge.right)}`}
        fill="none"
        stroke="var(--ink)"
      />
      <text className="plot-axis-label" x={WIDTH - edge.right} y={HEIGHT - 4} textAnchor="end">
        power of {first.symbol}
      </text>
      <text className="plot-axis-label" x={4} y={10}>
        power of {second.symbol}
      </text>
      {places
        .filter(({ at }) => at[0] <= xs[1] && at[1] <= ys[1])
        .map(({ key, at, count, included }) => (
          <circle
            key={key}
            cx={x(at[0])}
            cy={y(at[1])}
            r={Math.min(3.2 + Math.log2(count), 7)}
            fill={included ? "var(--ink)" : "var(--paper)"}
            stroke="var(--ink)"
          />
        ))}
      <path
        d={`M${String(x(0) - 5)},${String(y(0))} h10 M${String(x(0))},${String(y(0) - 5)} v10`}
        stroke="var(--ink)"
      />
    </svg>
  );
}

const MOST_POWER = 16;

/** "3/2" */
function numberOf(text = "0"): number {
  const [over = "0", under = "1"] = text.split("/");
  return Number(over) / Number(under);
}

function ticks([from, to]: readonly [number, number]): readonly number[] {
  const step = to - from > 12 ? 4 : to - from > 6 ? 2 : 1;
  const first = Math.ceil(from / step) * step;
  return Array.from({ length: Math.floor((to - first) / step) + 1 }, (_, index) => first + index * step);
}

/** Logarithm of the size between the last order kept and the first left out; null without both. */
function cutOf({ points }: PlanLattice): number | null {
  const kept = points.filter(({ included }) => included).at(-1);
  const out = points.find(({ included }) => !included);
  return kept && out ? (Math.log(kept.size) + Math.log(out.size)) / 2 : null;
}
