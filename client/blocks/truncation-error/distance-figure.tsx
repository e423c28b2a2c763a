import type { CorrelatedValue } from "#engine/truncation/curve-value.ts";
import { Plot } from "../parts/plot.tsx";

/** The squared Mahalanobis distance of each order, over the range in which 95 % of them lie. */
export function DistanceFigure({ checks }: { readonly checks: CorrelatedValue["checks"] }) {
  const { orders } = checks;
  if (orders.length === 0) return null;
  const all = orders.flatMap(({ distance, expected }) => [distance, ...expected]).filter((one) => one > 0);
  const numbers = orders.map(({ order }) => order);
  return (
    <Plot
      name="Squared Mahalanobis distance of the coefficients of each order, with the range of 95 %"
      x={{
        kind: "linear",
        label: "order n",
        domain: [Math.min(...numbers) - 0.5, Math.max(...numbers) + 0.5],
        ticks: numbers.map((order) => ({ value: order, label: String(order) })),
      }}
      y={{
        kind: "log",
        label: "squared distance, and where 95 % lie",
        domain: [Math.min(...all) / 1.3, Math.max(...all) * 1.3],
      }}
      curves={[
        {
          key: "distance",
          label: "",
          points: orders.map(({ order, distance }) => [order, distance] as const),
          style: 0,
          color: "ink",
          draw: "marks",
        },
      ]}
      bands={[
        {
          key: "expected",
          label: "95 %",
          points: orders.map(({ order, expected: [low, high] }) => ({ x: order, low, high })),
          tone: "outer",
          box: 0.25,
        },
      ]}
      table={{ x: "order n" }}
    />
  );
}
