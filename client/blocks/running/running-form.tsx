import { contentKinds, givenAs, signs, subjects } from "#engine/running/inputs.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";
import { beginnings } from "./beginnings.ts";

/** What runs, between which scales and from which values. */
export function RunningForm() {
  const { fields, tables, readOnly } = useBlock();
  const isRunning = fields["about"] === undefined || fields["about"] === subjects[0];
  const groups = (tables["groups"] ?? []).map((row) => row["group"] ?? "").filter((group) => group !== "");
  return (
    <div className="running-form">
      <div className="block-settings">
        <ChoiceField place={{ field: "about" }} label="what is asked" showLabel options={subjects} />
        {isRunning ? (
          <>
            <TextField
              place={{ field: "from" }}
              label="values at scale"
              showLabel
              size={10}
              placeholder="heavy scale"
            />
            <TextField place={{ field: "to" }} label="run to" showLabel size={10} placeholder="probe scale" />
          </>
        ) : (
          <TextField place={{ field: "epsilon" }} label="ε" showLabel size={5} placeholder="by d" />
        )}
        <ChoiceField
          place={{ field: "sign" }}
          label="terms of the premises stand"
          showLabel
          options={signs}
        />
      </div>
      {isRunning && <Values />}
      <RowTable
        table="components"
        noun="field"
        caption="Fields of several components: scalars as vectors, fermions in copies"
        nameOf={(row) => row["field"] ?? ""}
        invitation="phi"
        columns={[
          { column: "field", heading: "field", size: 6, placeholder: "phi" },
          { column: "count", heading: "components", size: 5, placeholder: "3" },
        ]}
      />
      {isRunning && (
        <>
          {!readOnly && groups.length === 0 && <Beginnings />}
          <RowTable
            table="groups"
            noun="group"
            caption="Gauge groups"
            nameOf={(row) => row["symbol"] || (row["group"] ?? "")}
            invitation="g_3"
            columns={[
              { column: "group", heading: "group", size: 7, placeholder: "SU(3)" },
              { column: "symbol", heading: "coupling", size: 7, placeholder: "g_3" },
              { column: "given", heading: "which is", options: givenAs },
              { column: "value", heading: "value", size: 8, placeholder: "1.22" },
              { column: "unit", heading: "g² of U(1), in g_Y²", size: 5, placeholder: "1" },
            ]}
          />
          <RowTable
            table="content"
            noun="field"
            caption="Fields that carry their charges"
            nameOf={(row) => row["name"] ?? ""}
            invitation="quarks"
            columns={[
              { column: "name", heading: "field", notation: false, size: 12, placeholder: "quarks" },
              { column: "kind", heading: "kind", options: contentKinds },
              {
                column: "charges",
                heading: groups.length === 0 ? "charges" : groups.join(", "),
                size: Math.max(8, groups.length * 5),
                placeholder: groups.length === 0 ? "3" : groups.map(() => "1").join(", "),
              },
              { column: "copies", heading: "copies", size: 4, placeholder: "1" },
              { column: "mass", heading: "leaves below", size: 8, placeholder: "never" },
            ]}
          />
          {groups.length > 0 && (
            <div className="block-settings">
              <ChoiceField
                place={{ field: "gaugeLoops" }}
                label="loops of gauge couplings"
                showLabel
                options={["1", "2"]}
              />
            </div>
          )}
        </>
      )}
    </div>
  );
}

function Values() {
  return (
    <>
      <RowTable
        table="values"
        noun="value"
        caption="Couplings there; scales of the premises bring their own numbers"
        nameOf={(row) => row["coupling"] ?? ""}
        invitation="lambda"
        columns={[
          { column: "coupling", heading: "coupling", size: 8, placeholder: "lambda" },
          { column: "value", heading: "value", size: 10, placeholder: "0.5" },
        ]}
      />
      <RowTable
        table="at"
        noun="scale"
        caption="Shown at these scales between as well"
        nameOf={(row) => row["scale"] ?? ""}
        invitation="1 TeV"
        columns={[{ column: "scale", heading: "scale", size: 10, placeholder: "1 TeV" }]}
      />
    </>
  );
}

function Beginnings() {
  const { replaceRows } = useBlock();
  return (
    <p className="block-line">
      gauge couplings: begin with{" "}
      {beginnings.map(({ name, groups, content }, index) => (
        <span key={name}>
          {index > 0 && " · "}
          <button type="button" className="block-link" onClick={() => replaceRows({ groups, content })}>
            {name}
          </button>
        </span>
      ))}
    </p>
  );
}
