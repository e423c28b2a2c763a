/** Reads columns and lines. A value that cannot be read is a problem and is left out; the rest stays. */
import type { Problem } from "../evaluation.ts";
import type { ColumnRole, DataInputs } from "./inputs.ts";
import type { DataColumn, DataValue } from "./value.ts";

/** Nobody reads more. */
const MOST_COMPLAINTS = 20;
export const MOST_LINES = 20_000;
const decimal = /^[-+−]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][-+]?\d+)?$/;
/** What people write where there is nothing. */
const nothing = /^(?:|-|–|—|\.|n\/a|nan)$/i;

/** `isCut` when there are more lines than are read. */
export function readTable(
  inputs: DataInputs,
  problems: Problem[],
): { readonly value: DataValue; readonly isCut: boolean } {
  const columns = inputs.columns.map((row) => readColumn(row, problems));
  complainOfRoles(columns, problems);
  const rows: (readonly (string | null)[])[] = [];
  const complaints: Problem[] = [];
  let isCut = false;
  for (const { id, values } of inputs.lines) {
    for (const line of values.split("\n")) {
      if (line.trim() === "") continue;
      isCut ||= rows.length >= MOST_LINES;
      if (isCut) break;
      rows.push(readLine(line, columns, rows.length + 1, id, complaints));
    }
  }
  problems.push(...complaints.slice(0, MOST_COMPLAINTS));
  if (complaints.length > MOST_COMPLAINTS)
    problems.push({
      code: "data-more-unreadable",
      path: ["lines"],
      facts: { count: complaints.length - MOST_COMPLAINTS },
    });
  return { value: { columns, rows }, isCut };
}

function readColumn(row: DataInputs["columns"][number], problems: Problem[]): DataColumn {
  const role = row.role as ColumnRole; // one of the choices
  const order = /^\d{1,3}$/.test(row.order.trim()) ? Number(row.order.trim()) : null;
  if (role === "order" && order === null)
    problems.push({
      code: "data-order-unreadable",
      path: ["columns", row.id, "order"],
      facts: { text: row.order },
    });
  return {
    rowId: row.id,
    name: row.name.trim(),
    role,
    unit: row.unit.trim(),
    order: role === "order" ? order : null,
  };
}

function complainOfRoles(columns: readonly DataColumn[], problems: Problem[]): void {
  const seen = new Set<string>();
  for (const { rowId, role, order } of columns) {
    if (role === "other" || (role === "order" && order === null)) continue;
    const what = role === "order" ? `order ${order}` : role;
    if (seen.has(what))
      problems.push({ code: "data-role-twice", path: ["columns", rowId, "role"], facts: { what } });
    seen.add(what);
  }
}

function readLine(
  line: string,
  columns: readonly DataColumn[],
  number: number,
  rowId: string,
  problems: Problem[],
): readonly (string | null)[] {
  const parts = line.split(/[;\t]/).map((part) => part.trim());
  const path = ["lines", rowId, "values"];
  if (parts.length > columns.length)
    problems.push({
      code: "data-line-too-long",
      path,
      facts: { line: number, count: parts.length, columns: columns.length },
    });
  return columns.map((column, index) => {
    const text = parts[index] ?? "";
    if (nothing.test(text)) return null;
    if (decimal.test(text)) return text.replace("−", "-").replace(/^\+/, "");
    problems.push({
      code: "data-value-unreadable",
      path,
      facts: { text, line: number, column: column.name === "" ? String(index + 1) : column.name },
    });
    return null;
  });
}
