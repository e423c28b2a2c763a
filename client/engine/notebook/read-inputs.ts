/** Fits raw text to the shape of a kind: every field present, rows in order, nothing beyond the shape. */
import type { Problem } from "../evaluation.ts";
import type { FieldSpec, Shape } from "../shape.ts";
import type { BlockInputs, BlockRow } from "./block-instance.ts";
import { freeId } from "./free-id.ts";

/** The same bounds as `schemaOf` sets for files. */
const LONGEST_TEXT = 4000;
const MOST_ROWS = 2000;

export interface RawRow {
  readonly table: string;
  readonly id: string;
  /** Compared as text; equal keys go by row id. */
  readonly order: string;
  readonly cells: ReadonlyMap<string, string>;
}

/** What does not fit is reported into `problems` and replaced by the initial value. Rows of unknown tables are left aside. */
export function readInputs(
  shape: Shape,
  fields: ReadonlyMap<string, string>,
  rows: readonly RawRow[],
  problems: Problem[],
): BlockInputs {
  const inputs: Record<string, string | readonly BlockRow[]> = {};
  // One set for all tables: scalars are named by row id and quantity, whichever table the row is in.
  const taken = new Set<string>();
  for (const [name, spec] of Object.entries(shape.fields))
    inputs[name] = fit(spec, fields.get(name), [name], problems);
  for (const [table, columns] of Object.entries(shape.tables)) {
    const own = rows.filter((row) => row.table === table);
    if (own.length > MOST_ROWS)
      problems.push({ code: "rows-too-many", path: [table], facts: { count: own.length, most: MOST_ROWS } });
    inputs[table] = own
      .slice(0, MOST_ROWS)
      .map((row) => ({ ...row, id: freeId(row.id, "row", taken) }))
      .sort((a, b) => compareText(a.order, b.order) || compareText(a.id, b.id))
      .map(({ id, cells }) => {
        const row: Record<string, string> & { id: string } = { id };
        for (const [column, spec] of Object.entries(columns))
          row[column] = fit(spec, cells.get(column), [table, id, column], problems);
        return row;
      });
  }
  return inputs;
}

/** By code units, the same on every machine. */
function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

function fit(
  spec: FieldSpec,
  text: string | undefined,
  path: readonly string[],
  problems: Problem[],
): string {
  if (text === undefined) return spec.initial;
  if (spec.choices && !spec.choices.includes(text)) {
    problems.push({ code: "choice-unknown", path, facts: { text, choices: spec.choices.join(", ") } });
    return spec.initial;
  }
  if (spec.keyed && text.length > LONGEST_TEXT) {
    problems.push({ code: "text-too-long", path, facts: { length: text.length, longest: LONGEST_TEXT } });
    return spec.initial;
  }
  return text;
}
