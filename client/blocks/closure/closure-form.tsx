import { regulators } from "#engine/closure/inputs.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { TextField } from "../parts/text-field.tsx";

/** How far to look, with which regulator, and what selects. */
export function ClosureForm() {
  const { fields } = useBlock();
  return (
    <div className="block-settings">
      <TextField place={{ field: "maxOrder" }} label="up to order in 1/Λ" showLabel size={4} />
      <TextField place={{ field: "maxLoops" }} label="most loops" showLabel size={4} />
      <TextField place={{ field: "maxLegs" }} label="most legs" showLabel size={8} placeholder="as needed" />
      <ChoiceField place={{ field: "regulator" }} label="regulator" showLabel options={regulators} />
      {fields["regulator"] !== "cutoff" && (
        <ChoiceField
          place={{ field: "masses" }}
          label="masses"
          showLabel
          options={["kept as light parameters", "none: a massless theory"]}
        />
      )}
      <ChoiceField
        place={{ field: "symmetries" }}
        label="symmetries select"
        showLabel
        options={[
          { value: "yes", label: "what they allow" },
          { value: "no", label: "nothing: all operators" },
        ]}
      />
      <TextField
        place={{ field: "shift" }}
        label="symmetric under shifts of"
        showLabel
        size={8}
        placeholder="no field"
      />
    </div>
  );
}
