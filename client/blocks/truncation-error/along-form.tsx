import { breakdownPriors, unlessTyped } from "#engine/truncation/shape.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";

/** What only data along x need: the point of comparison, and the correlated model. */
export function AlongForm() {
  const { fields } = useBlock();
  return (
    <details className="truncation-more" open={(fields["data"] ?? "") !== "" || undefined}>
      <summary>along x</summary>
      <div className="block-settings">
        <TextField
          place={{ field: "variable" }}
          label="x is called"
          showLabel
          size={6}
          placeholder="as its column"
        />
        <TextField
          place={{ field: "at" }}
          label="compare at x ="
          showLabel
          size={7}
          notation={false}
          placeholder="the middle"
        />
        <TextField
          place={{ field: "length" }}
          label="length scale ℓ"
          showLabel
          size={7}
          notation={false}
          placeholder="estimated"
        />
        <TextField
          place={{ field: "nugget" }}
          label="nugget"
          showLabel
          size={7}
          notation={false}
          placeholder="from the digits"
        />
        <TextField
          place={{ field: "breakdown" }}
          label="breakdown scale in Q"
          showLabel
          size={8}
          placeholder="heavy scale"
        />
        <ChoiceField
          place={{ field: "breakdownPrior" }}
          label="its prior"
          showLabel
          options={breakdownPriors}
        />
        <TextField
          place={{ field: "breakdownFrom" }}
          label="breakdown scale from"
          showLabel
          size={8}
          placeholder="a quarter"
        />
        <TextField
          place={{ field: "breakdownTo" }}
          label="breakdown scale to"
          showLabel
          size={8}
          placeholder="four times"
        />
        <TextField
          place={{ field: "breakdownWidth" }}
          label="width, if normal"
          showLabel
          size={4}
          placeholder={unlessTyped.breakdownWidth}
        />
      </div>
      <RowTable
        table="observables"
        noun="observable"
        caption="Observables with the same breakdown scale"
        nameOf={(row) => row["q"] ?? ""}
        columns={[
          { column: "data", heading: "data", refers: true },
          { column: "q", heading: "its Q", size: 14, placeholder: "the same" },
        ]}
      />
    </details>
  );
}
