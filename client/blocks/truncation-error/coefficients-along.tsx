import type { CurveValue } from "#engine/truncation/curve-value.ts";
import { Plot } from "../parts/plot.tsx";
import { axisLabel, pointsOf, rangeOf, spanOf } from "./plot-shapes.ts";

/** c_n along x for the coefficients that are used, with one and two standard deviations around 0. */
export function CoefficientsAlong({ curve }: { readonly curve: CurveValue }) {
  const { x, orders, spread } = curve;
  const used = orders.filter((one) => one.used);
  if (used.length === 0) return null;
  const sigma = spread ?? 0;
  const all = used.flatMap(({ coefficients }) => coefficients.flatMap((value) => value ?? []));
  const ends = spanOf(x);
  const band = (width: number) => ends.map((at) => ({ x: at, low: -width, high: width }));
  return (
    <Plot
      name={`Coefficients along ${axisLabel(curve.variable, curve.xUnit)}, with one and two standard deviations around 0`}
      x={{ kind: "linear", label: axisLabel(curve.variable, curve.xUnit), domain: ends }}
      y={{
        kind: "linear",
        label: "coefficients, with ±1σ and ±2σ",
        domain: rangeOf([...all, -2 * sigma, 2 * sigma]),
      }}
      curves={used.map(({ order, coefficients }, index) => ({
        key: String(order),
        label: `c${String(order).replace(/\d/g, (digit) => "₀₁₂₃₄₅₆₇₈₉"[Number(digit)] ?? "")}`,
        points: pointsOf(x, coefficients),
        style: index,
        color: "ink",
      }))}
      bands={[
        { key: "2", label: "±2σ", points: band(2 * sigma), tone: "outer" },
        { key: "1", label: "±1σ", points: band(sigma), tone: "outer" },
      ]}
      table={{ x: axisLabel(curve.variable, curve.xUnit) }}
    />
  );
}
