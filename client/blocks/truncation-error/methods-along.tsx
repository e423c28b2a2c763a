import type { CurveValue } from "#engine/truncation/curve-value.ts";
import { Plot } from "../parts/plot.tsx";
import { axisLabel, pointsOf, spanOf } from "./plot-shapes.ts";

interface Props {
  readonly curve: CurveValue;
  readonly unit: string;
  /** The degree of belief that is drawn; methods that state none stand beside it. */
  readonly degree: string;
}

const shortNames = {
  "conjugate prior": "conjugate",
  "uniform prior": "uniform",
  "prior set A": "set A",
  "prior set B": "set B",
  "prior set C": "set C",
  "first omitted term": "first term",
  "differences of orders": "differences",
  "correlated along x": "correlated",
} as const;

/** The half-widths of all methods after the last order, along x: one line for each method, of what it usually estimates. */
export function MethodsAlong({ curve, unit, degree }: Props) {
  const { x, bands, orders } = curve;
  const last = orders.at(-1)?.order;
  const seen = new Set<string>();
  const drawn = bands.filter(({ order, method, degree: of, halfWidths }) => {
    const isShown =
      order === last && (of === null || of === degree) && halfWidths.some((one) => (one ?? 0) > 0);
    if (!isShown || seen.has(method)) return false;
    seen.add(method);
    return true;
  });
  const all = drawn.flatMap(({ halfWidths }) =>
    halfWidths.flatMap((one) => (one !== null && one > 0 ? one : [])),
  );
  if (all.length === 0) return null;
  const label = axisLabel(curve.variable, curve.xUnit);
  return (
    <Plot
      name={`Half-widths of all methods along ${label} after order ${last ?? ""}, at ${degree} %`}
      x={{ kind: "linear", label, domain: spanOf(x) }}
      y={{
        kind: "log",
        label: `truncation error${unit === "" ? "" : ` (${unit})`} at ${degree} %`,
        domain: [Math.min(...all) / 1.2, Math.max(...all) * 1.2],
      }}
      curves={drawn.map(({ method, halfWidths }, index) => ({
        key: method,
        label: shortNames[method],
        points: pointsOf(x, halfWidths).filter(([, value]) => value > 0),
        style: index,
        color: method === "conjugate prior" || method === "correlated along x" ? "ink" : "irrelevant",
      }))}
      table={{ x: label }}
    />
  );
}
