import type { DrawnDensity } from "#engine/truncation/curve-value.ts";
import { plain } from "../parts/plot-scales.ts";
import { Plot, type Guide } from "../parts/plot.tsx";
import { axisLabel } from "./plot-shapes.ts";

interface Props {
  readonly symbol: string;
  readonly density: DrawnDensity;
  readonly stated?: number;
  readonly alone?: readonly { readonly name: string; readonly density: readonly number[] }[];
}

const VISIBLE = 0.003;

/** A posterior density with its median, shaded over its widest interval, with the value stated in the premises. */
export function PosteriorFigure({ symbol, density, stated, alone = [] }: Props) {
  const { intervals, median, unit } = density;
  // Where next to nothing is left there is nothing to see.
  const kept = density.density.flatMap((height, index) =>
    [height, ...alone.map((one) => one.density[index] ?? 0)].some(
      (one) => one > VISIBLE * Math.max(...density.density),
    )
      ? [index]
      : [],
  );
  const from = Math.max(0, (kept[0] ?? 0) - 1);
  const to = Math.min(density.grid.length, (kept.at(-1) ?? 0) + 2);
  const [grid, heights] = [density.grid.slice(from, to), density.density.slice(from, to)];
  const top = Math.max(...heights, ...alone.flatMap((one) => one.density));
  const widest = intervals.at(-1);
  const label = axisLabel(symbol, unit);
  const [first = 0, last = 1] = [grid[0], grid.at(-1)];
  const guides: Guide[] = [
    { axis: "x", value: median, label: "", color: "ink" },
    ...(stated !== undefined && stated >= first && stated <= last
      ? [{ axis: "x" as const, value: stated, label: "as stated", color: "relevant" as const }]
      : []),
  ];
  return (
    <Plot
      name={`Posterior density of ${label}: median ${plain(median)}${intervals.map(({ degree, low, high }) => `, ${degree} % from ${plain(low)} to ${plain(high)}`).join("")}`}
      x={{ kind: "linear", label, domain: [first, last] }}
      y={{ kind: "linear", label: "probability density, with its median", domain: [0, top * 1.08] }}
      curves={[
        {
          key: "joint",
          label: alone.length > 0 ? "joint" : "",
          points: grid.map((at, index) => [at, heights[index] ?? 0] as const),
          style: 0,
          color: "ink",
        },
        ...alone.map((one, index) => ({
          key: `alone ${index}`,
          label: one.name === "" ? `data ${index + 1}` : one.name,
          points: grid.map((at, place) => [at, one.density[from + place] ?? 0] as const),
          style: index + 1,
          color: "irrelevant" as const,
        })),
      ]}
      guides={guides}
      bands={
        widest
          ? [
              {
                key: "interval",
                label: `within ${widest.degree} %`,
                of: "joint",
                points: grid.map((at, index) =>
                  at >= widest.low && at <= widest.high ? { x: at, low: 0, high: heights[index] ?? 0 } : null,
                ),
                tone: "outer",
              },
            ]
          : []
      }
      table={{ x: label }}
    />
  );
}
