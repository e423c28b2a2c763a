import type { PremisesValue } from "#engine/premises/value.ts";
import { usePremisesEvaluation } from "../block-handle.ts";
import { plainLatex } from "./plain-latex.ts";
import { RowTable } from "./row-table.tsx";

/** Vertices and external legs of one graph, for blocks whose shape has these two tables. */
export function GraphTables() {
  // Premises' value is what the engine's premises folder gives.
  const premises = usePremisesEvaluation()?.value as PremisesValue | null | undefined;
  const terms = (premises?.terms ?? []).filter(({ kinetic }) => !kinetic);
  const typed = new Map(terms.map(({ rowId, latex }) => [rowId, plainLatex(latex)]));
  return (
    <div className="divergence-graph">
      <RowTable
        table="vertices"
        noun="vertex"
        caption="Vertices"
        nameOf={(row) => typed.get(row["term"] ?? "") ?? ""}
        invitation="1"
        columns={[
          { column: "count", heading: "how many", size: 4, placeholder: "1" },
          {
            column: "term",
            heading: "of the term",
            options: terms.map(({ rowId, latex }) => ({ value: rowId, label: plainLatex(latex) })),
          },
        ]}
      />
      <RowTable
        table="legs"
        noun="leg"
        caption="External legs"
        nameOf={(row) => row["field"] ?? ""}
        invitation="2"
        columns={[
          { column: "count", heading: "how many", size: 4, placeholder: "2" },
          {
            column: "field",
            heading: "of the field",
            options: (premises?.fields ?? []).map(({ symbol, latex }) => ({
              value: symbol,
              label: plainLatex(latex),
            })),
          },
          { column: "leg", heading: "as", options: ["field", "conjugate", "pair"] },
        ]}
      />
    </div>
  );
}
