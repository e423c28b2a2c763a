import { setChoices, unlessTyped } from "#engine/truncation/shape.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { TextField } from "../parts/text-field.tsx";

/** What the prior sets are integrated with. */
export function SetsForm() {
  const { fields } = useBlock();
  const isUsed = fields["sets"] === setChoices[1] || (fields["method"] ?? "").startsWith("prior set");
  return (
    <details className="truncation-more" open={isUsed || undefined}>
      <summary>prior sets A, B, C</summary>
      <div className="block-settings">
        <ChoiceField place={{ field: "sets" }} label="table" showLabel options={setChoices} />
        <TextField
          place={{ field: "cbarLow" }}
          label="c̄ of A and C from"
          showLabel
          size={5}
          placeholder={unlessTyped.cbarLow}
        />
        <TextField
          place={{ field: "cbarHigh" }}
          label="c̄ of A and C to"
          showLabel
          size={5}
          placeholder={unlessTyped.cbarHigh}
        />
        <TextField
          place={{ field: "cbarWidth" }}
          label="width of ln c̄ in B"
          showLabel
          size={4}
          placeholder={unlessTyped.cbarWidth}
        />
        <TextField
          place={{ field: "terms" }}
          label="omitted terms"
          showLabel
          size={5}
          notation={false}
          placeholder="as estimated"
        />
      </div>
    </details>
  );
}
