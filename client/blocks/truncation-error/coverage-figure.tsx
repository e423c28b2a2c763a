import type { CorrelatedValue } from "#engine/truncation/curve-value.ts";
import { Plot } from "../parts/plot.tsx";

/** How many of the next shifts lie in the intervals stated, by degree of belief, with the band of the last order. */
export function CoverageFigure({ checks }: { readonly checks: CorrelatedValue["checks"] }) {
  const { beliefs, coverage } = checks;
  const last = coverage.at(-1);
  if (!last) return null;
  return (
    <Plot
      name="Share of points whose next shift lies in the interval stated, by degree of belief"
      x={{ kind: "linear", label: "degree of belief", domain: [0, 1] }}
      y={{ kind: "linear", label: "share of points inside, and the 95 % band expected", domain: [0, 1] }}
      curves={coverage.map(({ next, inside }, index) => ({
        key: String(next),
        label: `to n = ${next}`,
        points: beliefs.map((belief, at) => [belief, inside[at] ?? 0] as const),
        style: index,
        color: "ink",
      }))}
      bands={[
        {
          key: "expected",
          label: `expected of n = ${last.next} at 95 %`,
          of: String(last.next),
          points: beliefs.map((belief, at) => {
            const [low = 0, high = 1] = last.expected[at] ?? [];
            return { x: belief, low, high };
          }),
          tone: "outer",
        },
      ]}
      below={(x, y) => (
        <line
          className="plot-axis"
          x1={x.position(0)}
          y1={y.position(0)}
          x2={x.position(1)}
          y2={y.position(1)}
        />
      )}
      table={{ x: "degree of belief" }}
    />
  );
}
