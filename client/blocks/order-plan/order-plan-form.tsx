import { ChoiceField } from "../parts/choice-field.tsx";
import { ReferenceField } from "../parts/reference-field.tsx";
import { TextField } from "../parts/text-field.tsx";

export function OrderPlanForm() {
  return (
    <div className="block-settings">
      <TextField place={{ field: "target" }} label="target accuracy" showLabel size={8} placeholder="1e-3" />
      <ChoiceField
        place={{ field: "observable" }}
        label="of"
        showLabel
        options={[
          { value: "amplitude", label: "an amplitude" },
          { value: "rate with interference", label: "a rate, with interference" },
          { value: "rate without interference", label: "a rate, without interference" },
        ]}
      />
      <TextField
        place={{ field: "probe" }}
        label="probe scale"
        showLabel
        size={10}
        placeholder="as in premises"
      />
      <TextField
        place={{ field: "heavy" }}
        label="heavy scale"
        showLabel
        size={10}
        placeholder="as in premises"
      />
      <TextField place={{ field: "insertions" }} label="most insertions" showLabel size={4} />
      <TextField place={{ field: "cap" }} label="orders up to" showLabel size={4} />
      <ChoiceField
        place={{ field: "unlisted" }}
        label="terms nobody listed"
        showLabel
        options={[
          { value: "natural tail", label: "estimated at natural size" },
          { value: "listed terms only", label: "left aside" },
        ]}
      />
      <ReferenceField
        place={{ field: "basis" }}
        label="numbers of operators from"
        showLabel
        none="no count"
      />
      <ReferenceField
        place={{ field: "counting" }}
        label="lattice of orders from"
        showLabel
        none="p over Λ alone"
      />
    </div>
  );
}
