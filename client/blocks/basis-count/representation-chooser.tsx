import { splitCharges, withCharge } from "#engine/basis/charge-text.ts";
import type { BasisInputs } from "#engine/basis/inputs.ts";
import { readGroups, type Group } from "#engine/basis/read-groups.ts";
import { labelsOf, readRepresentation, representationTable } from "#engine/basis/representations.ts";
import { useBlock } from "../block-handle.ts";

/** Charges under a larger Z_n are typed. */
const MOST_RESIDUES = 24;

/** How every field transforms under every group, each from a list; what is typed in the table above is the same. */
export function RepresentationChooser() {
  const { tables, readOnly, setValue } = useBlock();
  const rows = (tables["groups"] ?? []) as unknown as BasisInputs["groups"]; // rows of the same shape
  // What is wrong with a group is said beside it.
  const groups = readGroups(rows, []);
  const fields = (tables["fields"] ?? []).filter((row) => (row["symbol"] ?? "").trim() !== "");
  if (readOnly || groups.length === 0 || fields.length === 0) return null;
  const neutral = groups.map((group) => (group?.type === "charge" ? "0" : "1"));
  return (
    <div className="block-scroll">
      <table className="block-table">
        <caption className="block-caption">
          Representations by dimension and Dynkin labels, and charges; the same as typed above
        </caption>
        <thead>
          <tr>
            <th scope="col">field</th>
            {groups.map((group, index) => (
              <th key={rows[index]?.id} scope="col">
                {group?.name ?? rows[index]?.group}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {fields.map((row) => (
            <tr key={row.id}>
              <th scope="row">{row["symbol"]}</th>
              {groups.map((group, index) => (
                <td key={rows[index]?.id}>
                  {group && (
                    <Choice
                      group={group}
                      label={`${group.name} of ${row["symbol"] ?? ""}`}
                      typed={splitCharges(row["charges"] ?? "")[index] ?? ""}
                      onChoose={(charge) =>
                        setValue(
                          { table: "fields", rowId: row.id, column: "charges" },
                          withCharge(row["charges"] ?? "", index, charge, neutral),
                        )
                      }
                    />
                  )}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface ChoiceProps {
  readonly group: Group;
  readonly label: string;
  readonly typed: string;
  readonly onChoose: (charge: string) => void;
}

function Choice({ group, label, typed, onChoose }: ChoiceProps) {
  if (group.type === "charge" && (group.modulo === null || group.modulo > MOST_RESIDUES))
    return <Charge label={label} typed={typed} onChoose={onChoose} />;
  const { options, chosen } = optionsOf(group, typed);
  const isKnown = options.some(({ value }) => value === chosen);
  return (
    <select
      aria-label={label}
      className="block-input block-choice"
      value={chosen}
      aria-invalid={!isKnown || undefined}
      onChange={(event) => onChoose(event.target.value)}
    >
      {!isKnown && <option value={chosen}>{typed} (not in this table)</option>}
      {options.map(({ value, text }) => (
        <option key={value} value={value}>
          {text}
        </option>
      ))}
    </select>
  );
}

/** Any rational; it counts once the field is left, or with Enter. */
function Charge({ label, typed, onChoose }: Omit<ChoiceProps, "group">) {
  const settle = (text: string) => {
    if (text.trim() !== typed) onChoose(text.trim() === "" ? "0" : text.trim());
  };
  return (
    <input
      key={typed}
      aria-label={label}
      className="block-input"
      size={5}
      defaultValue={typed}
      placeholder="0"
      onBlur={(event) => settle(event.target.value)}
      onKeyDown={(event) => {
        if (event.key === "Enter") settle(event.currentTarget.value);
      }}
    />
  );
}

interface Options {
  readonly options: readonly { readonly value: string; readonly text: string }[];
  readonly chosen: string;
}

function optionsOf(group: Group, typed: string): Options {
  if (group.type === "SU") {
    const table = representationTable(group.n);
    const own = readRepresentation(typed, group.n)?.diagram.join();
    return {
      options: table.map(({ name, dimension, diagram }) => ({
        value: name,
        text: `${name.endsWith("bar") ? `${dimension}\u0305` : dimension} · (${labelsOf(diagram).join(",")})`,
      })),
      chosen: table.find(({ diagram }) => diagram.join() === own)?.name ?? typed,
    };
  }
  if (group.type === "O")
    return {
      options: [
        { value: "1", text: "1" },
        { value: "vector", text: `vector · ${group.n}` },
      ],
      chosen:
        typed === "" ? "1" : /^(vector|v|N)$/i.test(typed) || typed === String(group.n) ? "vector" : typed,
    };
  const residues = Array.from({ length: group.modulo ?? 0 }, (_, charge) => String(charge));
  return {
    options: residues.map((value) => ({ value, text: value })),
    chosen: typed === "" || typed === "even" ? "0" : typed === "odd" && group.modulo === 2 ? "1" : typed,
  };
}
