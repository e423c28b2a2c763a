/** Reads a CSV text for the preview of an import: delimiter, header, decimal mark, and what stands in the way. */
import Papa from "papaparse";
import { LARGEST_ATTACHMENT_BYTES } from "#contract/attachment-type.ts";
import type { ColumnRole } from "#engine/data/inputs.ts";

export const MOST_LINES = 20_000;
const MOST_COLUMNS = 40;
export const delimiters = [",", ";", "\t"];
const decimal = /^[-+−]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][-+]?\d+)?$/;
const withComma = /^[-+−]?\d*,\d+(?:[eE][-+]?\d+)?$/;
const withThousands = /^[-+−]?\d{1,3}(?:\.\d{3})+,\d+$/;
const nothing = /^(?:|-|–|—|\.|n\/a|nan)$/i;

export interface FileColumn {
  readonly name: string;
  readonly role: ColumnRole;
  readonly order: string;
  readonly unit: string;
}
export interface ReadFile {
  readonly columns: readonly FileColumn[];
  /** Decimals with a point; "" where there is nothing. */
  readonly lines: readonly (readonly string[])[];
  readonly delimiter: string;
  readonly hasDecimalComma: boolean;
  /** What cannot be read, by line and column of the file, counted from 1. */
  readonly faults: readonly FileFault[];
}
export interface FileFault {
  readonly line: number;
  readonly column: number;
  /** The line has another number of values than the header: which value is whose is then unknown. */
  readonly isOfLine: boolean;
  readonly sentence: string;
}
export type FileReading =
  { readonly ok: true; readonly file: ReadFile } | { readonly ok: false; readonly sentence: string };

/** What a person has corrected; what is left out is found in the file. */
export interface Corrections {
  readonly delimiter?: string;
  readonly hasDecimalComma?: boolean;
}

/** @param text the file as UTF-8; a byte-order mark is no part of it */
export function readFile(text: string, corrections: Corrections = {}): FileReading {
  if (text.length > LARGEST_ATTACHMENT_BYTES) return { ok: false, sentence: "At most 10 MB are read." };
  if (text.includes("\uFFFD") || text.includes("\u0000"))
    return { ok: false, sentence: "This is no text in UTF-8. Save the table as CSV in UTF-8 first." };
  const csv = text.replace(/^\uFEFF/, "");
  const delimiter = corrections.delimiter ?? guessedDelimiter(csv);
  // Empty lines are kept so far, since they count when a line of the file is named.
  const parsed = Papa.parse<string[]>(csv, { delimiter });
  const numbered = withLineNumbers(parsed.data);
  const broken = parsed.errors.find(({ type }) => type === "Quotes");
  if (broken) {
    const line = numbered[broken.row ?? 0]?.line ?? 1;
    return { ok: false, sentence: `Line ${line}: a quotation mark is not closed.` };
  }
  const [first, ...body] = numbered.filter(({ values }) => values.some((value) => value !== ""));
  const header = first?.values;
  if (!header || body.length === 0)
    return { ok: false, sentence: "The file has a header line and lines of values below it." };
  if (header.every((value) => decimal.test(value)))
    return { ok: false, sentence: "The first line holds numbers only. It must name the columns." };
  if (header.length > MOST_COLUMNS)
    return { ok: false, sentence: `At most ${MOST_COLUMNS} columns are read.` };
  if (body.length > MOST_LINES)
    return { ok: false, sentence: `At most ${MOST_LINES} lines are read; the file has ${body.length}.` };
  const hasDecimalComma =
    corrections.hasDecimalComma ?? (delimiter !== "," && isMostlyWithComma(body.map(({ values }) => values)));
  const faults: FileFault[] = [];
  const lines = body.map(({ line, values }) => {
    if (values.length !== header.length)
      faults.push({
        line,
        column: Math.min(values.length, header.length) + 1,
        isOfLine: true,
        sentence: `Line ${line} has ${values.length} values; the header has ${header.length}.`,
      });
    return header.map((name, column) => {
      const value = values[column] ?? "";
      if (nothing.test(value)) return "";
      // Where the mark is a comma, a point may separate thousands: 1.234 is then nobody knows what.
      const pointed = (hasDecimalComma ? value.replace(".", "?").replace(",", ".") : value).replace("−", "-");
      if (decimal.test(pointed)) return pointed;
      faults.push({
        line,
        column: column + 1,
        isOfLine: false,
        sentence: `Line ${line}, column ${column + 1} (${name}): “${value.slice(0, 40)}” is no number${otherMark(value, hasDecimalComma)}.`,
      });
      return "";
    });
  });
  return { ok: true, file: { columns: guessRoles(header), lines, delimiter, hasDecimalComma, faults } };
}

function guessedDelimiter(csv: string): string {
  return Papa.parse<string[]>(csv, {
    delimitersToGuess: delimiters,
    skipEmptyLines: "greedy",
    preview: 10,
  }).meta.delimiter;
}

/** A hint where the other decimal mark would make it one. */
function otherMark(value: string, hasDecimalComma: boolean): string {
  if (hasDecimalComma) return decimal.test(value.replace("−", "-")) ? " with a decimal comma" : "";
  return withComma.test(value) ? " with a decimal point" : "";
}

interface NumberedLine {
  readonly line: number;
  readonly values: readonly string[];
}

/** Numbers of lines in the file, from 1: a quoted value may itself go over several. */
function withLineNumbers(data: readonly (readonly string[])[]): readonly NumberedLine[] {
  let next = 1;
  return data.map((values) => {
    const line = next;
    next += 1 + values.reduce((sum, value) => sum + (value.match(/\r\n|\r|\n/g)?.length ?? 0), 0);
    return { line, values: values.map((value) => value.trim()) };
  });
}

function isMostlyWithComma(lines: readonly (readonly string[])[]): boolean {
  const values = lines.slice(0, 200).flat();
  return (
    values.filter((value) => withComma.test(value) || withThousands.test(value)).length >
    values.filter((value) => value.includes(".") && !value.includes(",")).length
  );
}

const leading: Readonly<Record<string, number>> = {
  LO: 0,
  NLO: 1,
  NNLO: 2,
  N2LO: 2,
  NNNLO: 3,
  N3LO: 3,
  N4LO: 4,
};

/** "p [MeV]" is p in MeV; "LO", "X2" or "order 2" are predictions; the first other column is x. */
export function guessRoles(header: readonly string[]): FileColumn[] {
  let hasX = false;
  return header.map((text): FileColumn => {
    const unit = /[[(]\s*([^\])]*?)\s*[\])]\s*$/.exec(text)?.[1] ?? "";
    const name = text.replace(/\s*[[(][^\])]*[\])]\s*$/, "").trim();
    const numbered = /^(?:order[ _]?|X_?|n=)(\d{1,2})$/i.exec(name)?.[1];
    const order = leading[name.toUpperCase()] ?? (numbered === undefined ? null : Number(numbered));
    if (order !== null) return { name, role: "order", order: String(order), unit };
    if (/^ref(?:erence)?$/i.test(name)) return { name, role: "reference", order: "", unit };
    if (/^(?:measured|data|exp(?:eriment)?)$/i.test(name)) return { name, role: "measured", order: "", unit };
    if (/^(?:err(?:or)?|sigma|uncertainty)$/i.test(name)) return { name, role: "error", order: "", unit };
    if (hasX) return { name, role: "other", order: "", unit };
    hasX = true;
    return { name, role: "x", order: "", unit };
  });
}

/** A row of the document holds one line while there are few, and as many as fit when there are many. */
const LINES_ONE_BY_ONE = 400;
const LONGEST_ROW = 3_800;
/** The bounds of a block's inputs (`schemaOf`): what is beyond them would be cut off when read. */
export const LONGEST_VALUE = 4_000;
const MOST_ROWS = 2_000;
/** One change to a notebook may have 4 MB; a page that made a larger one could send nothing from then on. */
const MOST_CHARACTERS = 3_000_000;

/** Why these rows do not fit into a notebook, or null. */
export function whyTooLarge(rows: readonly string[]): string | null {
  const characters = rows.reduce((sum, row) => sum + row.length, 0);
  if (rows.some((row) => row.length > LONGEST_VALUE))
    return `A line has more than ${LONGEST_VALUE} characters. Leave columns out.`;
  if (characters <= MOST_CHARACTERS && rows.length <= MOST_ROWS) return null;
  return `These numbers take ${(characters / 1e6).toFixed(1)} MB; a table of a notebook holds 3. Leave columns out.`;
}

/** Lines as the values of document rows. */
export function packLines(lines: readonly (readonly string[])[]): readonly string[] {
  const texts = lines.map((line) => line.join("; "));
  if (texts.length <= LINES_ONE_BY_ONE) return texts;
  const rows: string[] = [];
  let row = "";
  for (const text of texts) {
    if (row !== "" && row.length + text.length + 1 > LONGEST_ROW) {
      rows.push(row);
      row = "";
    }
    row = row === "" ? text : `${row}\n${text}`;
  }
  return row === "" ? rows : [...rows, row];
}
