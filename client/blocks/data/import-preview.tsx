import { columnRoles, type ColumnRole } from "#engine/data/inputs.ts";
import type { FileColumn, ReadFile } from "./read-file.ts";

/** A column of the file as it will be read in, if it will. */
export type Chosen = Omit<FileColumn, "role"> & { readonly role: ColumnRole | "leave out" };

const SHOWN_LINES = 5;

interface PreviewProps {
  readonly file: ReadFile;
  readonly columns: readonly Chosen[];
  readonly onChange: (columns: readonly Chosen[]) => void;
}

/** The first lines of a file, with what each column is to be. */
export function ImportPreview({ file, columns, onChange }: PreviewProps) {
  const change = (at: number, part: Partial<Chosen>) =>
    onChange(columns.map((column, index) => (index === at ? { ...column, ...part } : column)));
  return (
    // A wide table scrolls, so it must be reachable by keyboard (WCAG 2.1.1).
    // eslint-disable-next-line jsx-a11y-x/no-noninteractive-tabindex
    <div className="mt-2 overflow-x-auto" tabIndex={0} role="group" aria-label="preview">
      <table className="w-full text-small [&_td]:pr-4 [&_th]:pr-4 [&_th]:text-left [&_th]:align-top [&_th]:font-medium">
        <caption className="sr-only">The first lines, with the role of each column</caption>
        <thead>
          <tr>
            {columns.map((column, index) => (
              // Columns have no identity but their place.
              <th key={index} scope="col">
                <span className="block">{column.name || `column ${index + 1}`}</span>
                <select
                  aria-label={`role of ${column.name || `column ${index + 1}`}`}
                  className="block-input block-choice min-h-6"
                  value={column.role}
                  onChange={(event) => change(index, { role: event.target.value as Chosen["role"] })} // of the options below
                >
                  {[...columnRoles, "leave out"].map((role) => (
                    <option key={role}>{role}</option>
                  ))}
                </select>
                {column.role === "order" && (
                  <input
                    aria-label={`order n of ${column.name}`}
                    className="block-input block-notation min-h-6"
                    size={2}
                    value={column.order}
                    onChange={(event) => change(index, { order: event.target.value })}
                  />
                )}
                <input
                  aria-label={`unit of ${column.name || `column ${index + 1}`}`}
                  className="block-input block-notation min-h-6"
                  size={5}
                  placeholder="unit"
                  value={column.unit}
                  onChange={(event) => change(index, { unit: event.target.value })}
                />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {file.lines.slice(0, SHOWN_LINES).map((line, index) => (
            <tr key={index}>
              {line.map((value, column) => (
                <td key={column}>{value === "" ? "–" : value}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
