import type { OrderPlanValue, ProbeRow, Shift } from "#engine/plan/value.ts";
import { Formula } from "../../ui/math.tsx";
import { sizeText, withUnit } from "../parts/number-text.ts";
import { ResultTable } from "../parts/result-table.tsx";

/** How the order to stop at moves when a scale moves. */
export function Shifts({ value }: { readonly value: OrderPlanValue }) {
  const { shifts, probeTable, probe, heavy } = value;
  const names: Readonly<Record<Shift["what"], string>> = {
    "probe up": `${probe.latex} + \\sigma`,
    "probe down": `${probe.latex} - \\sigma`,
    "heavy up": `${heavy.latex} + \\sigma`,
    "heavy down": `${heavy.latex} - \\sigma`,
  };
  if (shifts.length === 0 && probeTable.length === 0) return null;
  return (
    <details className="block-working">
      <summary>if the scales move</summary>
      <div className="plan-shifts">
        {shifts.length > 0 && (
          <ResultTable<Shift>
            caption="When a scale moves by its uncertainty"
            showCaption
            rows={shifts}
            keyOf={({ what }) => what}
            columns={[
              { heading: "at", show: ({ what }) => <Formula latex={names[what]} /> },
              { heading: "Q", numeric: true, show: ({ Q }) => sizeText(Q, 3) },
              { heading: "stop at", show: ({ order }) => order?.text ?? "not reached" },
              {
                heading: "left out",
                numeric: true,
                show: ({ leftOut }) => (leftOut === null ? "–" : sizeText(leftOut)),
              },
            ]}
          />
        )}
        {probeTable.length > 0 && (
          <ResultTable<ProbeRow>
            caption="At other probe scales"
            showCaption
            rows={probeTable}
            keyOf={({ probe: at }) => String(at)}
            columns={[
              {
                heading: (
                  <>
                    <span className="sr-only">probe scale </span>
                    <Formula latex={probe.latex} />
                  </>
                ),
                numeric: true,
                show: ({ probe: at }) => withUnit(sizeText(at, 3), probe.unit),
              },
              { heading: "Q", numeric: true, show: ({ Q }) => sizeText(Q, 3) },
              { heading: "stop at", show: ({ order }) => order?.text ?? "not reached" },
              {
                heading: "left out",
                numeric: true,
                show: ({ leftOut }) => (leftOut === null ? "–" : sizeText(leftOut)),
              },
            ]}
          />
        )}
      </div>
    </details>
  );
}
