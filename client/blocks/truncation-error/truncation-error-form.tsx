import { methods, omittedChoices } from "#engine/truncation/shape.ts";
import { AlongForm } from "./along-form.tsx";
import { SetsForm } from "./sets-form.tsx";
import { ChoiceField } from "../parts/choice-field.tsx";
import { ReferenceField } from "../parts/reference-field.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";

export function TruncationErrorForm() {
  return (
    <div className="truncation-form">
      <RowTable
        table="orders"
        noun="order"
        caption="Predictions order by order"
        nameOf={(row) => row["name"] || (row["order"] ?? "")}
        invitation="0"
        columns={[
          { column: "order", heading: "order n", size: 5, placeholder: "0" },
          { column: "value", heading: "X through it", size: 10, placeholder: "absent" },
          { column: "name", heading: "called", size: 6, notation: false, placeholder: "LO" },
        ]}
      />
      <div className="block-settings">
        <ReferenceField
          place={{ field: "data" }}
          label="predictions along x from"
          showLabel
          none="the orders typed here"
        />
        <TextField
          place={{ field: "quantity" }}
          label="X is"
          showLabel
          size={22}
          notation={false}
          placeholder="the rate at 350 GeV"
        />
        <TextField place={{ field: "unit" }} label="in units of" showLabel size={5} placeholder="none" />
        <TextField
          place={{ field: "q" }}
          label="expansion parameter Q"
          showLabel
          size={14}
          placeholder="probe over heavy"
        />
        <TextField place={{ field: "reference" }} label="reference X" showLabel size={6} placeholder="LO" />
        <ChoiceField
          place={{ field: "first" }}
          label="coefficients used"
          showLabel
          options={[
            { value: "from c_1", label: "from c₁ on" },
            { value: "from c_0", label: "from c₀ on" },
          ]}
        />
        <TextField place={{ field: "belief" }} label="degrees of belief, %" showLabel size={8} />
        <ChoiceField place={{ field: "method" }} label="method pointed out" showLabel options={methods} />
        <ChoiceField place={{ field: "omitted" }} label="estimates" showLabel options={omittedChoices} />
        <TextField place={{ field: "nu0" }} label="prior ν₀" showLabel size={4} />
        <TextField place={{ field: "tau0" }} label="prior τ₀" showLabel size={4} />
        <SetsForm />
        <AlongForm />
      </div>
    </div>
  );
}
