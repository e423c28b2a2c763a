import { subjects } from "#engine/running/inputs.ts";
import type { BetaRow, CouplingRow, RunningValue } from "#engine/running/value.ts";
import { Formula } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";
import { FixedPoints } from "./fixed-points.tsx";

/** β functions, then values at the scales or fixed points. */
export function RunningResult({ value }: ResultProps<RunningValue>) {
  return (
    <>
      <ResultTable<BetaRow>
        caption="β functions"
        rows={value.betas}
        keyOf={({ id }) => id}
        columns={[
          { heading: "coupling", show: ({ latex }) => <Formula latex={latex} /> },
          {
            heading: <Formula latex="\beta" />,
            show: ({ leftLatex, rightLatex }) => <Formula latex={`${leftLatex} = ${rightLatex}`} />,
          },
        ]}
      />
      <Generated value={value} />
      {value.about === subjects[0] ? <Values value={value} /> : <FixedPoints value={value} />}
    </>
  );
}

function Generated({ value }: { readonly value: RunningValue }) {
  const operators = value.generated.filter(({ operatorLatex }) => operatorLatex !== "1");
  if (operators.length === 0) return null;
  return (
    <p className="block-line">
      Running also makes what no term has:{" "}
      {operators.map(({ operatorLatex }, index) => (
        <span key={operatorLatex}>
          {index > 0 && ", "}
          <Formula latex={operatorLatex} />
        </span>
      ))}
      .
    </p>
  );
}

function Values({ value }: { readonly value: RunningValue }) {
  if (value.couplings.length === 0) return null;
  return (
    <>
      <ResultTable<CouplingRow>
        caption="Couplings at the scales"
        rows={value.couplings}
        keyOf={({ id }) => id}
        columns={[
          { heading: "coupling", show: ({ latex }) => <Formula latex={latex} /> },
          ...value.scales.map(({ id, text }, index) => ({
            heading: text,
            numeric: true,
            show: ({ id: row, values }: CouplingRow) => {
              const found = values[index];
              if (!found) return <span className="block-absent">past the pole</span>;
              return <Figure scalar={`${row}/${id}`}>{found.text}</Figure>;
            },
          })),
        ]}
      />
      {value.pole && (
        <p className="block-line">
          <Formula latex={value.pole.latex} /> has a pole at <Figure scalar="pole">{value.pole.text}</Figure>;
          nothing is computed beyond it.
        </p>
      )}
    </>
  );
}
