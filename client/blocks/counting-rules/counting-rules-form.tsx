import type { CountingValue } from "#engine/counting/value.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import { ruleSubjects } from "#engine/counting/inputs.ts";
import { presetNames } from "#engine/counting/preset-names.ts";
import { Formula } from "../../ui/math.tsx";
import { useBlock, usePremisesEvaluation } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { GraphTables } from "../parts/graph-tables.tsx";
import { plainLatex } from "../parts/plain-latex.ts";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";

/** A published counting, or rules of one's own that began as one; exceptions; a graph. */
export function CountingRulesForm() {
  const block = useBlock();
  const hasRules = (block.tables["rules"] ?? []).length > 0;
  return (
    <>
      <div className="block-settings">
        <ChoiceField place={{ field: "preset" }} label="counting" showLabel options={presetNames} />
        <TextField
          place={{ field: "offset" }}
          label="added to every graph"
          showLabel
          size={6}
          placeholder="nothing"
        />
      </div>
      <div className="counting-form">
        <RowTable
          table="parameters"
          noun="parameter"
          caption="Small parameters"
          nameOf={(row) => row["symbol"] ?? ""}
          invitation="as published"
          columns={[
            { column: "symbol", heading: "symbol", size: 6 },
            { column: "value", heading: "value", size: 12, placeholder: "p/Lambda" },
            { column: "meaning", heading: "meaning", notation: false, size: 18 },
          ]}
        />
        {hasRules ? <OwnRules /> : <PublishedRules />}
        <Exceptions />
        <GraphTables />
      </div>
    </>
  );
}

function useCounting(): CountingValue | null {
  // A Counting rules block's value is what the engine's counting folder gives.
  return (useBlock().evaluation?.value ?? null) as CountingValue | null;
}

/** The rules of the chosen counting, for the fields of these premises. */
function PublishedRules() {
  const { readOnly, replaceRows, tables } = useBlock();
  const value = useCounting();
  if (!value) return null;
  const { parameters, rules } = value.proposal;
  return (
    <div>
      <p className="block-caption">What everything counts, as published</p>
      <dl className="counting-published">
        {rules.map(({ of, symbol, weight }) => (
          <div key={`${of} ${symbol}`}>
            <dt>{symbol === "" ? of : symbol}</dt>
            <dd>{weight}</dd>
          </div>
        ))}
      </dl>
      {!readOnly && (
        <button
          type="button"
          className="block-link"
          onClick={() =>
            replaceRows({
              ...((tables["parameters"] ?? []).length === 0 ? { parameters } : {}),
              rules: rules.map((rule) => ({ ...rule })),
            })
          }
        >
          edit these rules
        </button>
      )}
    </div>
  );
}

function OwnRules() {
  const { readOnly, replaceRows } = useBlock();
  const value = useCounting();
  return (
    <div>
      <RowTable
        table="rules"
        noun="rule"
        caption="What everything counts"
        nameOf={(row) => (row["symbol"] === "" ? (row["of"] ?? "") : (row["symbol"] ?? ""))}
        columns={[
          { column: "symbol", heading: "symbol", size: 8 },
          { column: "of", heading: "of the", options: ruleSubjects },
          { column: "weight", heading: "exponent", size: 8 },
        ]}
      />
      {!readOnly && (
        <button type="button" className="block-link" onClick={() => replaceRows({ rules: [] })}>
          {value?.isEdited === true ? "back to the published rules" : "follow the published rules"}
        </button>
      )}
    </div>
  );
}

function Exceptions() {
  // Premises' value is what the engine's premises folder gives.
  const premises = usePremisesEvaluation()?.value as PremisesValue | null | undefined;
  const terms = premises?.terms ?? [];
  const names = new Map(terms.map(({ rowId, latex }) => [rowId, latex]));
  return (
    <RowTable
      table="exceptions"
      noun="exception"
      caption="Exceptions among the terms"
      nameOf={(row) => plainLatex(names.get(row["term"] ?? "") ?? "")}
      invitation="1"
      columns={[
        { column: "weight", heading: "added exponent", size: 8 },
        {
          column: "term",
          heading: "to the term",
          options: terms.map(({ rowId, latex }) => ({ value: rowId, label: plainLatex(latex) })),
        },
        { column: "why", heading: "why", notation: false, size: 24 },
      ]}
      results={[
        { heading: "reads as", show: (row) => <Formula latex={names.get(row["term"] ?? "") ?? ""} /> },
      ]}
    />
  );
}
