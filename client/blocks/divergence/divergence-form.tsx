import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { GraphTables } from "../parts/graph-tables.tsx";
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
      {oneGraph && <Listing />}
    </>
  );
}

/** Which graphs are drawn, and whether their legs are told apart. */
function Listing() {
  return (
    <div className="block-settings">
      <ChoiceField
        place={{ field: "leftOut" }}
        label="leave out graphs with"
        showLabel
        options={["nothing", "closed lines", "tadpole parts"]}
      />
      <ChoiceField
        place={{ field: "toldLegs" }}
        label="legs of one field are"
        showLabel
        options={["interchangeable", "labelled"]}
      />
      <ChoiceField
        place={{ field: "furry" }}
        label="what charge conjugation cancels"
        showLabel
        options={[
          { value: "no", label: "stays listed" },
          { value: "yes", label: "is left out" },
        ]}
      />
    </div>
  );
}
