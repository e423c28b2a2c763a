import { columnRoles } from "#engine/data/inputs.ts";
import { lazy, Suspense, useState } from "react";
import { useBlock } from "../block-handle.ts";
import { RowTable } from "../parts/row-table.tsx";
import { LineEditor } from "./line-editor.tsx";
import { OriginalFile } from "./original-file.tsx";

const ImportDialog = lazy(async () => ({ default: (await import("./import-dialog.tsx")).ImportDialog }));

/** More rows than this are read from a file and looked at as a result; nobody types that many. */
const MOST_ROWS_TYPED = 400;

/** Columns with their roles, and the lines: typed, pasted, or read in from a file. */
export function DataForm() {
  const block = useBlock();
  const [importing, setImporting] = useState(false);
  const columns = block.tables["columns"] ?? [];
  const lines = block.tables["lines"] ?? [];
  const names = columns.map((row, index) => row["name"] || `column ${index + 1}`);
  // A row of a large import holds many lines, which a field of one line could not show.
  const isPacked = lines.length > MOST_ROWS_TYPED || lines.some(({ values = "" }) => values.includes("\n"));
  return (
    <div className="data-form">
      {!block.readOnly && (
        <p className="block-line">
          <button type="button" className="block-link" onClick={() => setImporting(true)}>
            read in a table
          </button>{" "}
          from a file or by pasting
        </p>
      )}
      <OriginalFile />
      {importing && (
        <Suspense fallback={null}>
          <ImportDialog onClose={() => setImporting(false)} />
        </Suspense>
      )}
      <RowTable
        table="columns"
        noun="column"
        caption="Columns"
        nameOf={(row) => row["name"] ?? ""}
        invitation="p"
        columns={[
          { column: "name", heading: "called", notation: false, size: 8, placeholder: "p" },
          { column: "role", heading: "is", options: columnRoles },
          { column: "order", heading: "order n", size: 4, placeholder: "none" },
          { column: "unit", heading: "unit", size: 6, placeholder: "none" },
        ]}
      />
      {isPacked ? (
        <>
          <p className="block-line">
            The lines are kept together, as they were read in; they stand below as they were understood.
          </p>
          <LineEditor />
        </>
      ) : (
        <RowTable
          table="lines"
          noun="line"
          caption="Lines, values separated by semicolons"
          nameOf={(row) => row["values"] ?? ""}
          invitation={names.length === 0 ? "1.0; 2.0" : names.join("; ")}
          columns={[
            {
              column: "values",
              heading: names.length === 0 ? "values" : names.join(" ; "),
              size: 40,
              placeholder: names.map(() => "–").join("; "),
              // A spreadsheet's tabs become the separators of a line.
              linesOf: (text) =>
                /[\n\t]/.test(text)
                  ? text
                      .split(/\r?\n/)
                      .filter((line) => line.trim() !== "")
                      .map((line) => line.split("\t").join("; "))
                  : null,
            },
          ]}
        />
      )}
    </div>
  );
}
