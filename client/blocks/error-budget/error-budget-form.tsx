import { combinations, conversions, scalarParts, sourceKinds } from "#engine/budget/inputs.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { ReferenceField, ScalarField } from "../parts/reference-field.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";

/** The value, typed or from a block, and the sources of its error. */
export function ErrorBudgetForm() {
  const { fields, tables } = useBlock();
  const sources = [
    { value: "", label: "choose a source" },
    ...(tables["sources"] ?? []).map((row, index) => ({
      value: row.id,
      label: row["name"]?.trim() || `source ${index + 1}`,
    })),
  ];
  return (
    <div className="budget-form">
      <div className="block-settings">
        <TextField
          place={{ field: "quantity" }}
          label="the value is"
          showLabel
          size={20}
          notation={false}
          placeholder="the scattering length"
        />
        <TextField place={{ field: "value" }} label="typed" showLabel size={9} placeholder="none" />
        <ReferenceField place={{ field: "from" }} label="or from" showLabel none="no block" />
        <ScalarField
          place={{ field: "scalar" }}
          label="its number"
          showLabel
          blockId={fields["from"] ?? ""}
        />
        <TextField place={{ field: "unit" }} label="in units of" showLabel size={5} placeholder="none" />
        <ChoiceField place={{ field: "combine" }} label="errors add" showLabel options={combinations} />
        <ChoiceField place={{ field: "convert" }} label="units" showLabel options={conversions} />
      </div>
      <RowTable
        table="sources"
        noun="source"
        caption="Sources of error"
        nameOf={(row) => row["name"] ?? ""}
        invitation="omitted orders"
        columns={[
          { column: "name", heading: "source", notation: false, size: 16 },
          { column: "kind", heading: "kind", options: sourceKinds },
          { column: "size", heading: "size", size: 9, placeholder: "1.2 %" },
          { column: "from", heading: "or from", refers: true },
          { column: "scalar", heading: "its number", scalarOf: "from" },
          { column: "part", heading: "taken is", options: scalarParts },
          { column: "group", heading: "moves with group", notation: false, size: 6, placeholder: "nothing" },
        ]}
      />
      <RowTable
        table="correlations"
        noun="correlation"
        caption="Correlation within a group; 1 where nothing is said"
        nameOf={(row) => row["group"] ?? ""}
        invitation="group"
        columns={[
          { column: "group", heading: "group", notation: false, size: 8 },
          { column: "coefficient", heading: "coefficient", size: 6, placeholder: "1" },
        ]}
      />
      <RowTable
        table="pairs"
        noun="pair"
        caption="Two sources with a coefficient of their own"
        nameOf={(row) => sources.find(({ value }) => value !== "" && value === row["first"])?.label ?? ""}
        columns={[
          { column: "first", heading: "source", options: sources },
          { column: "second", heading: "and source", options: sources },
          { column: "coefficient", heading: "coefficient", size: 6, placeholder: "0" },
        ]}
      />
    </div>
  );
}
