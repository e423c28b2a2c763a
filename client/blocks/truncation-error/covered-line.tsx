import type { CurveValue } from "#engine/truncation/curve-value.ts";
import { totals } from "#engine/truncation/scalars-curve.ts";
import { Figure } from "../parts/figure.tsx";

/** How many measured values lie in the intervals stated, all orders together. */
export function CoveredLine({ covered }: Pick<CurveValue, "covered">) {
  const all = totals(covered);
  if (all.length === 0) return null;
  return (
    <p className="block-line">
      Of the measured values,{" "}
      {all.map(({ degree, inside, count }, index) => (
        <span key={degree}>
          {index > 0 && ", "}
          <Figure scalar={`covered/${degree}`}>{`${Math.round((100 * inside) / count)} %`}</Figure> lie in the{" "}
          {degree} % intervals
        </span>
      ))}
      , all orders together.
    </p>
  );
}
