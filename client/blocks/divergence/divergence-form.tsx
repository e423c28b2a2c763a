import type { PremisesValue } from "#engine/premises/value.ts";
import { useBlock, usePremisesEvaluation } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { plainLatex } from "../parts/plain-latex.ts";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";

/** One graph by its vertices and legs, or the whole theory within caps. */
export function DivergenceForm() {
  const block = useBlock();
  const oneGraph = block.fields["mode"] !== "whole theory";
  return (
    <>
      <div className="block-settings">
        <ChoiceField place={{ field: "mode" }} label="of" showLabel options={["one graph", "whole theory"]} />
        <ChoiceField
          place={{ field: "symmetries" }}
          label="symmetries select"
          showLabel
          options={[
            { value: "yes", label: "what they allow" },
            { value: "no", label: "nothing: all operators" },
          ]}
        />
        {!oneGraph && (
          <>
            <TextField place={{ field: "maxLoops" }} label="most loops" showLabel size={4} />
            <TextField place={{ field: "maxLegs" }} label="most legs" showLabel size={4} />
            <TextField place={{ field: "maxOrder" }} label="largest order in 1/Λ" showLabel size={4} />
          </>
        )}
      </div>
      {oneGraph && <GraphTables />}
    </>
  );
}

function GraphTables() {
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
