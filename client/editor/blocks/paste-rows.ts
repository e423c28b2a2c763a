/** Lines from a spreadsheet or a text become rows. */
import type * as Y from "yjs";
import type { BlockDescription } from "#engine/kind.ts";
import type { PastedGrid } from "../../blocks/block-handle.ts";
import { orderedRows } from "./block-elements.ts";
import { insertRows, writeCell, type NewRow } from "./block-writes.ts";

/** Fills the rows from the one that was pasted into, then adds rows for what is left. */
export function pasteInto(
  block: Y.XmlElement,
  description: BlockDescription,
  grid: PastedGrid,
  makeId: () => string,
): void {
  const { table, rowId, columns, lines } = grid;
  const specs = description.shape.tables[table];
  if (!specs) throw new Error(`${description.kind} has no table ${table}`);
  const present = orderedRows(block, table);
  const start = rowId === null ? -1 : present.findIndex(({ id }) => id === rowId);
  const filled = start === -1 ? [] : present.slice(start);
  const added: NewRow[] = [];
  for (const [index, line] of lines.entries()) {
    const values = Object.fromEntries(
      line.flatMap((text, at) => {
        const column = columns[at];
        const allowed = column === undefined ? undefined : specs[column]?.choices;
        // A word that is no choice of that column would only be refused later, far from the paste.
        return column === undefined || (allowed && !allowed.includes(text)) ? [] : [[column, text]];
      }),
    );
    const row = filled[index];
    if (!row) added.push({ id: makeId(), values });
    else for (const [column, value] of Object.entries(values)) writeCell(block, table, row.id, column, value);
  }
  if (added.length > 0) insertRows(block, description, table, added, null);
}
