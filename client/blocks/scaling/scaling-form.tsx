import { kindDescriptions } from "#engine/descriptions.ts";
import type { RunningValue } from "#engine/running/value.ts";
import { useBlock, useEvaluationOf } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { ReferenceField } from "../parts/reference-field.tsx";
import { TextField } from "../parts/text-field.tsx";

const { fields } = kindDescriptions.scaling.shape;
const choicesOf = (name: string) => fields[name]?.choices ?? [];

/** One of the fixed points of the Running block, where it has any. */
function FixedPointField() {
  const { fields } = useBlock();
  const chosen = fields["fixedPoint"] ?? "";
  // The reference takes Running blocks only.
  const value = useEvaluationOf(fields["running"] ?? "")?.value as RunningValue | null | undefined;
  const points = value?.fixedPoints ?? [];
  if (points.length === 0 && chosen === "") return null;
  return (
    <ChoiceField
      place={{ field: "fixedPoint" }}
      label="at its fixed point"
      showLabel
      options={[
        { value: "", label: "the one that attracts" },
        ...points.map(({ id }) => ({ value: id, label: id === "gaussian" ? "Gaussian" : id })),
      ]}
    />
  );
}

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
      <ReferenceField place={{ field: "running" }} label="running from" showLabel none="none: by dimension" />
      <FixedPointField />
    </div>
  );
}
