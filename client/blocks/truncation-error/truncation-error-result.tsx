import type { CurveValue } from "#engine/truncation/curve-value.ts";
import type { TruncationValue } from "#engine/truncation/value.ts";
import { Formula, TextWithMath } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { useBlock } from "../block-handle.ts";
import { Figure } from "../parts/figure.tsx";
import { sizeText, textTo, withUnit } from "../parts/number-text.ts";
import { ResultTable, type ResultColumnSpec } from "../parts/result-table.tsx";
import { Coefficients } from "./coefficients.tsx";
import { CoveredLine } from "./covered-line.tsx";
import { CorrelatedLines } from "./correlated-lines.tsx";
import { assumptionOf, bandScalar, methodRows, resolutionOf, type MethodRow } from "./method-rows.ts";

/** The methods side by side on the same data; the chosen one stands out. */
export function TruncationErrorResult({ value }: ResultProps<TruncationValue>) {
  const { fields } = useBlock();
  const last = value.orders.at(-1);
  if (!last) return null;
  const resolution = resolutionOf(value);
  const rows = methodRows(last.bands, value.highlighted);
  const name = ({ method, omitted }: MethodRow) =>
    rows.filter((row) => row.method === method).length > 1
      ? `${method}, ${omitted === "all omitted orders" ? "all" : "first only"}`
      : method;
  return (
    <>
      <p className="block-line block-verdict">
        {sentenceStart(fields["quantity"] ?? "")}
        {value.curve && <At curve={value.curve} />} through order{" "}
        <Figure scalar="order">{String(last.order)}</Figure> is{" "}
        {value.highlighted ? (
          <strong>
            <Figure scalar="value">
              {textTo(last.value, value.highlighted.halfWidth)} ±{" "}
              {withUnit(textTo(value.highlighted.halfWidth, value.highlighted.halfWidth), value.unit)}
            </Figure>
          </strong>
        ) : (
          withUnit(sizeText(last.value, 4), value.unit)
        )}
        ; with <Formula latex={value.q.latex === "Q" ? "Q" : `Q = ${value.q.latex}`} /> ={" "}
        <Figure scalar="Q">{sizeText(value.q.value, 3)}</Figure>, the first order left out is{" "}
        <Figure scalar="next-order">{String(last.nextOrder)}</Figure>.
        {value.highlighted !== null && value.highlighted.fromQ > 0 && (
          <>
            {" "}
            Q is known to ± {sizeText(value.q.sigma, 2)}, which moves the half-width by up to{" "}
            {withUnit(sizeText(value.highlighted.fromQ, 2), value.unit)}.
          </>
        )}
      </p>
      <ResultTable<MethodRow>
        caption={`Truncation error after order ${last.order}, by method${value.unit === "" ? "" : `, in ${value.unit}`}`}
        rows={rows}
        keyOf={({ method, omitted }) => `${method} ${omitted}`}
        toneOf={({ chosen }) => (chosen ? "chosen" : null)}
        columns={[
          { heading: "method", show: name },
          ...columnsOf(value, resolution),
          {
            heading: "assumes",
            show: ({ method, omitted }) => <TextWithMath text={assumptionOf(method, omitted, fields)} />,
          },
        ]}
      />
      <Coefficients value={value} />
      {value.curve && <CoveredLine covered={value.curve.covered} />}
      {value.curve?.correlated && (
        <CorrelatedLines
          model={value.curve.correlated}
          variable={value.curve.variable}
          unit={value.curve.xUnit}
        />
      )}
      <p className="block-line block-caution">
        A model of what was left out, not a bound: it takes the coefficients to be of natural size.
      </p>
    </>
  );
}

/** " at p = 210 MeV": the point of the table. */
function At({ curve }: { readonly curve: CurveValue }) {
  return (
    <>
      {" "}
      at <Formula latex={curve.variable} /> ={" "}
      <Figure scalar="at">
        {withUnit(String(Number(curve.at.toPrecision(5))).replace("-", "−"), curve.xUnit)}
      </Figure>
    </>
  );
}

/** "the rate" begins a sentence as "The rate"; a symbol stays as it is. */
function sentenceStart(quantity: string): string {
  if (quantity.trim() === "") return "X";
  return /^[a-z]{2}/.test(quantity) ? quantity.charAt(0).toUpperCase() + quantity.slice(1) : quantity;
}

/** One column per degree of belief; a method that states none puts its one number under the first. */
function columnsOf(value: TruncationValue, resolution: number): ResultColumnSpec<MethodRow>[] {
  return value.degrees.map(({ text }, index) => ({
    heading: `${text} %`,
    numeric: true,
    show: ({ bands }) => {
      const band = bands.get(text) ?? (index === 0 ? bands.get("") : undefined);
      if (!band) return <span className="block-absent">–</span>;
      return <Figure scalar={bandScalar(band)}>{textTo(band.halfWidth, resolution)}</Figure>;
    },
  }));
}
