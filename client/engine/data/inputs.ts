/** What a Data block holds: columns with their roles, and lines of values. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

export const columnRoles = ["other", "x", "order", "reference", "measured", "error"] as const;
export type ColumnRole = (typeof columnRoles)[number];

export const dataShape = defineShape({
  fields: {
    title: note(),
    note: note(),
    /** The file it was read in from: the id under which the notebook keeps it, a space, and its name. */
    original: note(),
    /** What the last reading in changed, in a sentence. */
    lastImport: note(),
  },
  tables: {
    columns: {
      name: text(),
      role: choice(columnRoles[0], ...columnRoles.slice(1)),
      /** Of a column of predictions: n of the expansion in Q. */
      order: text(),
      unit: text(),
    },
    /**
     * Values in the order of the columns, separated by semicolons or tabs. A typed row is one line; a large import has
     * many lines in one row, so that 20,000 of them fit into the document.
     */
    lines: { values: text() },
  },
});
export type DataInputs = InputsOf<typeof dataShape>;
