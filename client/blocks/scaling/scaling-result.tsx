import type { PremisesValue } from "#engine/premises/value.ts";
import type { ScalingRow, ScalingValue } from "#engine/scaling/value.ts";
import { Formula, TextWithMath } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { usePremisesEvaluation } from "../block-handle.ts";
import { ClassMark } from "../parts/class-mark.tsx";
import { Decimal, decimalWidths } from "../parts/decimal.tsx";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";
import { ClassRanges } from "./class-ranges.tsx";

/** Dimension, coefficient, growth, class and size of every term. */
export function ScalingResult({ value }: ResultProps<ScalingValue>) {
  const widths = decimalWidths(value.rows.flatMap(({ size }) => (size ? [size.text] : [])));
  const probe = value.probe;
  return (
    <>
      <ResultTable<ScalingRow>
        caption="Scaling of every term"
        rows={value.rows}
        keyOf={({ rowId }) => rowId}
        toneOf={({ allowed }) => (allowed ? null : "left-out")}
        columns={[
          { heading: "term", show: ({ latex }) => <Formula latex={latex} /> },
          {
            heading: "Δ",
            show: ({ rowId, dimension }) => (
              <Figure scalar={`${rowId}/dimension`}>
                <Formula latex={dimension.latex} />
              </Figure>
            ),
          },
          {
            heading: "coefficient",
            show: ({ rowId, coefficient }) => (
              <Figure scalar={`${rowId}/coefficient`}>
                <Formula latex={coefficient.latex} />
              </Figure>
            ),
          },
          { heading: "grows as", show: ({ coefficient }) => <Formula latex={`s^{${coefficient.latex}}`} /> },
          {
            heading: <ClassHeading value={value} />,
            show: (row) => <ClassOf row={row} symbol={value.freeDimension} />,
          },
          {
            heading: probe ? (
              <>
                size at <Formula latex={probe.latex} />
              </>
            ) : (
              "size"
            ),
            numeric: true,
            show: (row) => <Size row={row} widths={widths} />,
          },
        ]}
      />
      <p className="block-line">
        {value.expansion && value.probe && value.heavy && (
          <>
            Expansion parameter <Formula latex={`Q = ${value.probe.latex}/${value.heavy.latex}`} /> ={" "}
            <Figure scalar="Q">{value.expansion.text}</Figure>.{" "}
          </>
        )}
        {value.meaningOfHeavy !== "" && <TextWithMath text={value.meaningOfHeavy} />}
      </p>
    </>
  );
}

function ClassHeading({ value }: { readonly value: ScalingValue }) {
  // Premises' value is what the engine's premises folder gives.
  const premises = usePremisesEvaluation()?.value as PremisesValue | null | undefined;
  if (value.freeDimension || !premises) return "class";
  return (
    <>
      class in <Formula latex={premises.spacetimeLatex} />
    </>
  );
}

function ClassOf({ row, symbol }: { readonly row: ScalingRow; readonly symbol: string | null }) {
  if (row.kinetic) return <span className="premises-kinetic">kinetic</span>;
  if (row.scalingClass) {
    return (
      <Figure scalar={`${row.rowId}/class`}>
        <ClassMark scalingClass={row.scalingClass} says={row.marginally ?? row.scalingClass} />
      </Figure>
    );
  }
  return (
    <ClassRanges ranges={row.ranges} marginalAt={row.marginalAt} symbol={symbol ?? "d"} rowId={row.rowId} />
  );
}

function Size({ row, widths }: { readonly row: ScalingRow; readonly widths: readonly [number, number] }) {
  if (!row.size) return <span className="block-absent">–</span>;
  const figure = (
    <Figure scalar={`${row.rowId}/size`}>
      <Decimal text={row.size.text} widths={widths} />
    </Figure>
  );
  return row.sizeFrom === "assigned" ? (
    <span className="scaling-assigned" title="size given by hand in the premises">
      <span className="scaling-assigned-word">assigned </span>
      {figure}
    </span>
  ) : (
    figure
  );
}
