import { kindDescriptions } from "#engine/descriptions.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { TextField } from "../parts/text-field.tsx";

const { fields } = kindDescriptions.scaling.shape;
const choicesOf = (name: string) => fields[name]?.choices ?? [];

export function ScalingForm() {
  return (
    <div className="block-settings">
      <ChoiceField place={{ field: "at" }} label="sizes from" showLabel options={choicesOf("at")} />
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
      <ChoiceField
        place={{ field: "couplings" }}
        label="couplings at the heavy scale"
        showLabel
        options={choicesOf("couplings")}
      />
    </div>
  );
}
