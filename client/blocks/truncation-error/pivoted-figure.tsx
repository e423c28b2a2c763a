import type { CorrelatedValue } from "#engine/truncation/curve-value.ts";
import { Plot } from "../parts/plot.tsx";
import { rangeOf } from "./plot-shapes.ts";

/** Pivoted-Cholesky errors in the order of the pivots, with the lines within which 95 % should lie. */
export function PivotedFigure({ checks }: { readonly checks: CorrelatedValue["checks"] }) {
  const { orders } = checks;
  const [first] = orders;
  if (!first) return null;
  const limit = first.pivotedLimit;
  return (
    <Plot
      name="Pivoted-Cholesky errors of the coefficients, by pivot"
      x={{ kind: "linear", label: "pivot", domain: [0.5, first.pivoted.length + 0.5] }}
      y={{
        kind: "linear",
        label: "pivoted-Cholesky errors, with 95 % lines",
        domain: rangeOf([...orders.flatMap(({ pivoted }) => pivoted), -1.2 * limit, 1.2 * limit]),
      }}
      curves={orders.map(({ order, pivoted }, index) => ({
        key: String(order),
        label: `n = ${order}`,
        points: pivoted.map((error, at) => [at + 1, error] as const),
        style: index,
        color: "ink",
        draw: "marks" as const,
      }))}
      guides={[
        { axis: "y", value: limit, label: "95 %", color: "relevant" },
        { axis: "y", value: -limit, label: "", color: "relevant" },
      ]}
      table={{ x: "pivot" }}
    />
  );
}
