import { columnRoles } from "#engine/data/inputs.ts";
import { useId, useMemo, useState } from "react";
import { Button } from "../../ui/button.tsx";
import { Dialog } from "../../ui/dialog.tsx";
import { say } from "../../ui/notices.ts";
import { useBlock } from "../block-handle.ts";
import { LARGEST_ATTACHMENT_BYTES } from "#contract/attachment-type.ts";
import { keepFile } from "../../api/attachments.ts";
import { packLines, readFile, whyTooLarge, type Corrections, type ReadFile } from "./read-file.ts";
import { ReadingMarks } from "./reading-marks.tsx";
import { ImportPreview, type Chosen } from "./import-preview.tsx";
import { linesOf, whatChanged } from "./what-changed.ts";

interface Source {
  readonly text: string;
  /** Null for what was pasted. */
  readonly file: File | null;
}

const SHOWN_FAULTS = 8;

/** A file or pasted text is shown as it would be read, roles are given, and then it takes the place of the table: whole, or not at all. */
export function ImportDialog({ onClose }: { readonly onClose: () => void }) {
  const block = useBlock();
  const id = useId();
  const [source, setSource] = useState<Source>({ text: "", file: null });
  const [file, setFile] = useState<ReadFile | null>(null);
  const [columns, setColumns] = useState<readonly Chosen[]>([]);
  const [sentence, setSentence] = useState("");
  const [isKeeping, setKeeping] = useState(false);

  function take(from: Source, corrections: Corrections = {}) {
    setSource(from);
    const reading = readFile(from.text, corrections);
    setFile(reading.ok ? reading.file : null);
    setColumns(reading.ok ? reading.file.columns : []);
    setSentence(reading.ok ? "" : reading.sentence);
  }
  async function choose(picked: File | undefined) {
    if (!picked) return;
    if (picked.size > LARGEST_ATTACHMENT_BYTES) {
      setFile(null);
      setSentence("The file is larger than 10 MB.");
      return;
    }
    take({ text: await picked.text(), file: picked });
  }
  const kept = useMemo(
    () => columns.flatMap((column, index) => (column.role === "leave out" ? [] : [index])),
    [columns],
  );
  const faults = (file?.faults ?? []).filter(({ isOfLine, column }) => isOfLine || kept.includes(column - 1));
  const lines = useMemo(
    () => (file?.lines ?? []).map((line) => kept.map((index) => line[index] ?? "")),
    [file, kept],
  );
  const rows = useMemo(() => packLines(lines), [lines]);
  const tooLarge = whyTooLarge(rows);
  const chosen = columns.flatMap(({ name: called, role, order, unit }) =>
    role === "leave out" ? [] : [{ name: called, role, order: role === "order" ? order : "", unit }],
  );
  const changes = file
    ? whatChanged(
        {
          columns: (block.tables["columns"] ?? []).map(({ name = "", role = "" }) => ({
            name,
            role: columnRoles.find((one) => one === role) ?? "other",
          })),
          lines: linesOf(block.tables["lines"] ?? []),
        },
        { columns: chosen, lines },
      )
    : "";

  /** The file is kept first: once the table stands, its original is there. Where it cannot be, the table still counts. */
  async function importAll() {
    if (!file) return;
    setKeeping(true);
    const answer = source.file && block.files !== null ? await keepFile(block.files, source.file) : null;
    setKeeping(false);
    block.replaceRows(
      { columns: chosen, lines: rows.map((values) => ({ values })) },
      { original: answer?.ok ? `${answer.value.id} ${answer.value.name}` : "", lastImport: changes },
    );
    const named = source.file ? `“${source.file.name}”` : "The table";
    const unkept =
      answer && !answer.ok ? ` The file itself could not be kept: ${answer.problem.sentence}` : "";
    say(
      `${named} was read in: ${kept.length} columns, ${file.lines.length} lines.${changes === "" ? "" : ` ${changes} Undo brings the old one back.`}${unkept}`,
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
        onChange={(event) => take({ text: event.target.value, file: null })}
      />
      <div role="status" className="mt-3 text-small">
        {sentence !== "" && <p className="text-hairline">{sentence}</p>}
        {file && (
          <p>
            {file.lines.length} lines of {file.columns.length} columns. {changes}
          </p>
        )}
      </div>
      {tooLarge !== null && (
        <p role="alert" className="mt-3 text-small text-hairline">
          {tooLarge}
        </p>
      )}
      {source.text !== "" && (
        <ReadingMarks
          delimiter={file?.delimiter ?? null}
          hasDecimalComma={file?.hasDecimalComma ?? false}
          onChange={(corrections) => take(source, corrections)}
        />
      )}
      {file && <ImportPreview file={file} columns={columns} onChange={setColumns} />}
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
          disabled={!file || kept.length === 0 || faults.length > 0 || tooLarge !== null || isKeeping}
          onClick={() => void importAll()}
        >
          Read it in
        </Button>
      </div>
    </Dialog>
  );
}
