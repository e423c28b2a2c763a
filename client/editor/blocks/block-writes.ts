/**
 * Changes to a block's inputs, written straight to its Y elements. A ProseMirror diff would have to guess which row is
 * which; these say it.
 */
import * as Y from "yjs";
import type { BlockDescription } from "#engine/kind.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";
import { FIELD_ORIGIN } from "../history.ts";
import { cellElement, orderedRows, type RowElement } from "./block-elements.ts";
import { evenOrderKeys, orderKeyBetween } from "./order-key.ts";

export interface NewRow {
  readonly id: string;
  readonly values: Readonly<Record<string, string>>;
}

/** One step of the person's history: the transaction of a field, a row, or a paste of many rows. */
export function changeInputs(block: Y.XmlElement, change: () => void): void {
  if (!block.doc) throw new Error("the block is no longer in the document");
  block.doc.transact(change, FIELD_ORIGIN);
}

/** Writes nothing when the field has that value already: a write would win over a colleague's for no reason. */
export function writeField(block: Y.XmlElement, field: string, value: string): void {
  if (block.getAttribute(field) !== value) block.setAttribute(field, value);
}

export function writeCell(
  block: Y.XmlElement,
  table: string,
  rowId: string,
  column: string,
  value: string,
): void {
  const row = orderedRows(block, table).find(({ id }) => id === rowId)?.element;
  if (!row) return;
  const cell = cellElement(row, column);
  if (!cell) row.push([newCell(column, value)]);
  else if (cell.getAttribute("value") !== value) cell.setAttribute("value", value);
}

/** Adds rows in a run after a row of the table, or at its end. */
export function insertRows(
  block: Y.XmlElement,
  description: BlockDescription,
  table: string,
  rows: readonly NewRow[],
  afterRowId: string | null,
): void {
  const present = orderedRows(block, table);
  const found = afterRowId === null ? -1 : present.findIndex(({ id }) => id === afterRowId);
  const at = found === -1 ? present.length : found + 1;
  const keys = keysFor(present, at, rows.length);
  block.push(rows.map((row, index) => newRow(description, table, row, keys[index] ?? "")));
}

export function removeRow(block: Y.XmlElement, table: string, rowId: string): void {
  const row = orderedRows(block, table).find(({ id }) => id === rowId);
  if (row) block.delete(block.toArray().indexOf(row.element), 1);
}

/** Puts a row before another of its table, or last with null. */
export function moveRow(block: Y.XmlElement, table: string, rowId: string, beforeRowId: string | null): void {
  const rows = orderedRows(block, table);
  const row = rows.find(({ id }) => id === rowId);
  if (!row || rowId === beforeRowId) return;
  const others = rows.filter((other) => other !== row);
  const found = beforeRowId === null ? -1 : others.findIndex(({ id }) => id === beforeRowId);
  const [key] = keysFor(others, found === -1 ? others.length : found, 1);
  if (key !== undefined) row.element.setAttribute("order", key);
}

/** Keys for new rows at a place among others; gives the others new keys when there is no room between them. */
function keysFor(rows: readonly RowElement[], at: number, count: number): string[] {
  const keys: string[] = [];
  const after = rows[at]?.order ?? null;
  let before = rows[at - 1]?.order ?? null;
  for (let made = 0; made < count; made++) {
    const key = orderKeyBetween(before, after);
    if (key === null) return rewriteKeys(rows, at, count);
    keys.push(key);
    before = key;
  }
  return keys;
}

function rewriteKeys(rows: readonly RowElement[], at: number, count: number): string[] {
  const all = evenOrderKeys(rows.length + count);
  for (const [index, row] of rows.entries()) {
    row.element.setAttribute("order", all[index < at ? index : index + count] ?? "");
  }
  return all.slice(at, at + count);
}

/** A row has a cell for every column from the start, so that two people never make the same cell at once. */
function newRow(description: BlockDescription, table: string, row: NewRow, order: string): Y.XmlElement {
  const columns = description.shape.tables[table];
  if (!columns) throw new Error(`${description.kind} has no table ${table}`);
  const element = new Y.XmlElement(rowNode);
  element.setAttribute("table", table);
  element.setAttribute("rowId", row.id);
  element.setAttribute("order", order);
  element.insert(
    0,
    Object.entries(columns).map(([column, spec]) => newCell(column, row.values[column] ?? spec.initial)),
  );
  return element;
}

function newCell(column: string, value: string): Y.XmlElement {
  const element = new Y.XmlElement(cellNode);
  element.setAttribute("field", column);
  element.setAttribute("value", value);
  return element;
}
