import type { DataValue } from "#engine/data/value.ts";
import { useState } from "react";
import type { ResultProps } from "../block-parts.ts";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";

const PAGE = 12;

/** The table as it was understood, the first lines of it unless more are asked for. */
export function DataResult({ value }: ResultProps<DataValue>) {
  const [shown, setShown] = useState(PAGE);
  const { columns, rows } = value;
  return (
    <>
      <ResultTable<{ readonly line: number; readonly row: DataValue["rows"][number] }>
        caption="The table as it was read"
        rows={rows.slice(0, shown).map((row, line) => ({ line, row }))}
        keyOf={({ line }) => String(line)}
        columns={columns.map(({ name, unit, role, order }, index) => ({
          heading: (
            <>
              {name || `column ${index + 1}`}
              {unit !== "" && ` in ${unit}`}
              <span className="data-role">{role === "order" ? `order ${order ?? "?"}` : role}</span>
            </>
          ),
          numeric: true,
          show: ({ row }) => row[index]?.replace("-", "−") ?? "–",
        }))}
      />
      <p className="block-line">
        <Figure scalar="points">{rows.length}</Figure> lines.{" "}
        {shown < rows.length && (
          <button type="button" className="block-link" onClick={() => setShown(shown + 10 * PAGE)}>
            show more
          </button>
        )}
      </p>
    </>
  );
}
