import { columnRoles, type ColumnRole } from "#engine/data/inputs.ts";
import { useId, useMemo, useState } from "react";
import { Button } from "../../ui/button.tsx";
import { Dialog } from "../../ui/dialog.tsx";
import { say } from "../../ui/notices.ts";
import { useBlock } from "../block-handle.ts";
import {
  LARGEST_BYTES,
  packLines,
  readFile,
  whyTooLarge,
  type FileColumn,
  type ReadFile,
} from "./read-file.ts";

type Chosen = Omit<FileColumn, "role"> & { readonly role: ColumnRole | "leave out" };

const SHOWN_LINES = 5;
const SHOWN_FAULTS = 8;

/** A file or pasted text is shown as it would be read, roles are given, and then it takes the place of the table: whole, or not at all. */
export function ImportDialog({ onClose }: { readonly onClose: () => void }) {
  const block = useBlock();
  const id = useId();
  const [name, setName] = useState("");
  const [file, setFile] = useState<ReadFile | null>(null);
  const [columns, setColumns] = useState<readonly Chosen[]>([]);
  const [sentence, setSentence] = useState("");

  function take(text: string, from: string) {
    setName(from);
    const reading = readFile(text);
    setFile(reading.ok ? reading.file : null);
    setColumns(reading.ok ? reading.file.columns : []);
    setSentence(reading.ok ? "" : reading.sentence);
  }
  async function choose(picked: File | undefined) {
    if (!picked) return;
    if (picked.size > LARGEST_BYTES) {
      setFile(null);
      setSentence("The file is larger than 10 MB.");
      return;
    }
    take(await picked.text(), picked.name);
  }
  const kept = useMemo(
    () => columns.flatMap((column, index) => (column.role === "leave out" ? [] : [index])),
    [columns],
  );
  const faults = (file?.faults ?? []).filter(({ isOfLine, column }) => isOfLine || kept.includes(column - 1));
  const rows = useMemo(
    () => packLines((file?.lines ?? []).map((line) => kept.map((index) => line[index] ?? ""))),
    [file, kept],
  );
  const tooLarge = whyTooLarge(rows);

  function importAll() {
    if (!file) return;
    const before = (block.tables["lines"] ?? []).flatMap(({ values = "" }) => values.split("\n")).length;
    block.replaceRows({
      columns: columns.flatMap(({ name: called, role, order, unit }) =>
        role === "leave out" ? [] : [{ name: called, role, order: role === "order" ? order : "", unit }],
      ),
      lines: rows.map((values) => ({ values })),
    });
    say(
      `${name === "" ? "The table" : `“${name}”`} was read in: ${kept.length} columns, ${file.lines.length} lines.${before === 0 ? "" : " It took the place of ${before} lines; undo brings those back."}`,
    );
    onClose();
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title="Read in a table"
      description="CSV in UTF-8 with a line of names first; comma, semicolon or tab between values; decimal point or comma."
    >
      <label htmlFor={`${id}-file`} className="mt-4 block text-small text-ink-2">
        File
      </label>
      <input
        id={`${id}-file`}
        type="file"
        accept=".csv,.tsv,.txt,text/csv,text/tab-separated-values,text/plain"
        className="mt-1 block w-full text-small"
        onChange={(event) => void choose(event.target.files?.[0])}
      />
      <label htmlFor={`${id}-text`} className="mt-4 block text-small text-ink-2">
        or paste it here
      </label>
      <textarea
        id={`${id}-text`}
        rows={3}
        className="mt-1 block w-full border border-tick bg-field p-2 font-notation text-small"
        onChange={(event) => take(event.target.value, "")}
      />
      <div role="status" className="mt-3 text-small">
        {sentence !== "" && <p className="text-hairline">{sentence}</p>}
        {file && (
          <p>
            {file.lines.length} lines of {file.columns.length} columns, separated by{" "}
            {{ ",": "commas", ";": "semicolons", "\t": "tabs" }[file.delimiter] ?? file.delimiter}
            {file.hasDecimalComma && ", with decimal commas"}.
          </p>
        )}
      </div>
      {tooLarge !== null && (
        <p role="alert" className="mt-3 text-small text-hairline">
          {tooLarge}
        </p>
      )}
      {file && <Preview file={file} columns={columns} onChange={setColumns} />}
      {faults.length > 0 && (
        <div className="mt-3 text-small text-hairline" role="alert">
          <p>Nothing is read in by halves. Correct these, or leave their columns out:</p>
          <ul className="mt-1 list-disc pl-5">
            {faults.slice(0, SHOWN_FAULTS).map((fault) => (
              <li key={`${fault.line} ${fault.column}`}>{fault.sentence}</li>
            ))}
          </ul>
          {faults.length > SHOWN_FAULTS && <p>And {faults.length - SHOWN_FAULTS} more.</p>}
        </div>
      )}
      <div className="mt-6 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Leave it</Button>
        <Button
          look="main"
          disabled={!file || kept.length === 0 || faults.length > 0 || tooLarge !== null}
          onClick={importAll}
        >
          Read it in
        </Button>
      </div>
    </Dialog>
  );
}

interface PreviewProps {
  readonly file: ReadFile;
  readonly columns: readonly Chosen[];
  readonly onChange: (columns: readonly Chosen[]) => void;
}

function Preview({ file, columns, onChange }: PreviewProps) {
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
                  className="block-input block-choice"
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
                    className="block-input block-notation"
                    size={2}
                    value={column.order}
                    onChange={(event) => change(index, { order: event.target.value })}
                  />
                )}
                <input
                  aria-label={`unit of ${column.name || `column ${index + 1}`}`}
                  className="block-input block-notation"
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
