import { countedKinds, patienceChoices } from "#engine/basis/inputs.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";
import {
  belowTheWeakScale,
  orthogonalScalars,
  scalarAlone,
  standardModel,
  standardModelWithNeutrinos,
} from "#engine/basis/contents.ts";
import { useBlock } from "../block-handle.ts";
import { RepresentationChooser } from "./representation-chooser.tsx";

/** Which fields, under which groups, up to which dimension. */
export function BasisCountForm() {
  const { tables, readOnly } = useBlock();
  const groups = (tables["groups"] ?? []).map((row) => row["name"] || (row["group"] ?? ""));
  return (
    <div className="basis-form">
      {!readOnly && (tables["fields"] ?? []).length === 0 && <Beginnings />}
      <div className="block-settings">
        <TextField place={{ field: "d" }} label="spacetime dimension d" showLabel size={4} />
        <TextField place={{ field: "from" }} label="mass dimensions from" showLabel size={4} />
        <TextField place={{ field: "to" }} label="to" showLabel size={4} />
        <TextField
          place={{ field: "flavours" }}
          label="number of flavours shown"
          showLabel
          size={4}
          hint="for fields in n_f copies"
        />
        <ChoiceField
          place={{ field: "parity" }}
          label="symmetry of space"
          showLabel
          options={["without parity", "with parity"]}
        />
        <ChoiceField place={{ field: "patience" }} label="may take" showLabel options={patienceChoices} />
      </div>
      <RowTable
        table="groups"
        noun="group"
        caption="Groups"
        nameOf={(row) => row["name"] || (row["group"] ?? "")}
        invitation="colour"
        columns={[
          { column: "name", heading: "called", notation: false, size: 10, placeholder: "colour" },
          { column: "group", heading: "group", size: 7, placeholder: "SU(3)" },
          { column: "keep", heading: "charges kept", size: 8, placeholder: "neutral" },
        ]}
      />
      <RowTable
        table="fields"
        noun="field"
        caption="Fields; conjugates are added by themselves"
        nameOf={(row) => row["symbol"] ?? ""}
        invitation="phi"
        columns={[
          { column: "symbol", heading: "symbol", size: 6, placeholder: "phi" },
          { column: "kind", heading: "kind", options: countedKinds },
          {
            column: "charges",
            heading: groups.length === 0 ? "charges" : groups.join(", "),
            size: Math.max(10, groups.length * 6),
            placeholder: groups.length === 0 ? "none" : groups.map(() => "1").join(", "),
          },
          { column: "flavours", heading: "copies", size: 5, placeholder: "1" },
          { column: "meaning", heading: "meaning", notation: false, size: 12 },
        ]}
      />
      <RepresentationChooser />
    </div>
  );
}

const beginnings = [
  ["the Standard Model", standardModel],
  ["with right-handed neutrinos", standardModelWithNeutrinos],
  ["quarks, leptons, gluons and photons below the weak scale", belowTheWeakScale("2", "3", "3", "3")],
  ["scalars of O(4)", orthogonalScalars(4)],
  ["a scalar alone", scalarAlone],
] as const;

/** Field contents that many start from, each in one press. */
function Beginnings() {
  const { replaceRows } = useBlock();
  return (
    <p className="block-line">
      begin with{" "}
      {beginnings.map(([name, content], index) => (
        <span key={name}>
          {index > 0 && " · "}
          <button
            type="button"
            className="block-link"
            onClick={() =>
              replaceRows({ groups: content.groups.map(bare), fields: content.fields.map(bare) })
            }
          >
            {name}
          </button>
        </span>
      ))}
    </p>
  );
}

/** Rows get ids of their own in each block. */
function bare({ id: _, ...columns }: { readonly id: string } & Readonly<Record<string, string>>) {
  return columns;
}
