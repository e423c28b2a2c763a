import type { FieldKind } from "#engine/premises/theory.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import { Formula } from "../../ui/math.tsx";
import { useBlock } from "../block-handle.ts";
import { Figure } from "../parts/figure.tsx";
import { RowTable } from "../parts/row-table.tsx";

interface Props {
  readonly value: PremisesValue | null;
  readonly kinds: readonly FieldKind[];
}

/** Fields and what they are. A dimension left empty follows from the kind and is drawn as such. */
export function FieldsTable({ value, kinds }: Props) {
  const block = useBlock();
  const fields = new Map(value?.fields.map((field) => [field.rowId, field]));
  // The ultraviolet weight is worth a column only where it is another number than the dimension.
  const weightsDiffer =
    value?.fields.some(({ weight, dimension }) => weight.text !== dimension.text) ?? false;
  const names = (block.tables["symmetries"] ?? [])
    .map((row) => row["name"] ?? "")
    .filter((name) => name !== "");
  return (
    <RowTable
      table="fields"
      noun="field"
      caption="Fields"
      nameOf={(row) => row["symbol"] ?? ""}
      invitation="phi"
      columns={[
        {
          column: "symbol",
          heading: "symbol",
          size: 6,
          placeholder: "phi",
          reading: (row) => {
            const field = fields.get(row.id);
            return field ? <Formula latex={field.latex} /> : null;
          },
        },
        { column: "kind", heading: "kind", options: kinds },
        {
          column: "dimension",
          heading: "dimension",
          size: 8,
          placeholder: "by kind",
          reading: (row) => {
            const field = fields.get(row.id);
            if (!field) return null;
            return (
              <>
                <Formula latex={field.dimension.latex} />
                {field.overridden && <span className="premises-override"> by hand</span>}
              </>
            );
          },
        },
        {
          column: "charges",
          heading: names.length === 0 ? "charges" : names.join(", "),
          size: Math.max(6, names.length * 5),
          placeholder: names.length === 0 ? "" : names.map(() => "even").join(", "),
        },
        { column: "meaning", heading: "meaning", notation: false, size: 10 },
      ]}
      results={
        !weightsDiffer
          ? []
          : [
              {
                heading: "in the ultraviolet",
                show: (row) => {
                  const field = fields.get(row.id);
                  if (!field) return null;
                  return (
                    <Figure scalar={`${row.id}/weight`}>
                      <Formula latex={field.weight.latex} />
                    </Figure>
                  );
                },
              },
            ]
      }
    />
  );
}
