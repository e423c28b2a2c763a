/** Turns the table of a Data block into predictions along x. */
import type { Source } from "../kind.ts";
import type { CurveData } from "./curve-data.ts";
import { readNumber } from "./read-orders.ts";

/** What is used of the value of a Data block. */
interface DataTable {
  readonly columns: readonly {
    readonly name: string;
    readonly role: string;
    readonly unit: string;
    /** Of a column of predictions. */
    readonly order: number | null;
  }[];
  /** Exact decimals, or null. */
  readonly rows: readonly (readonly (string | null)[])[];
}

/** Null when the table has no x; points without x are left out. */
export function curveDataOf({ value }: Source): CurveData | null {
  const table = value as DataTable; // the evaluator allows no other kind here
  const find = (role: string) => table.columns.findIndex((column) => column.role === role);
  const xColumn = find("x");
  if (xColumn < 0) return null;
  const numbers = table.rows.map((row) => row.map((text) => (text === null ? null : numberOf(text))));
  const rows = numbers
    .filter((row) => (row[xColumn] ?? null) !== null)
    .sort((a, b) => (a[xColumn] ?? 0) - (b[xColumn] ?? 0));
  const column = (index: number) => rows.map((row) => row[index] ?? null);
  const optional = (role: string) => (find(role) < 0 ? null : column(find(role)));
  const predictions = table.columns
    .flatMap(({ role, order, unit }, index) =>
      role === "order" && order !== null ? [{ order, unit, index }] : [],
    )
    .sort((a, b) => a.order - b.order);
  const given = predictions.map((one) => ({ ...one, values: column(one.index) }));
  const isEmpty = ({ values }: { values: readonly (number | null)[] }) => values.every((one) => one === null);
  const orders = given.filter((one) => !isEmpty(one));
  return {
    xName: table.columns[xColumn]?.name ?? "",
    xUnit: table.columns[xColumn]?.unit ?? "",
    unit: orders[0]?.unit ?? "",
    x: rows.map((row) => row[xColumn] ?? NaN),
    orders: orders.map(({ order, values }) => ({ order, values })),
    absent: given.filter(isEmpty).map(({ order }) => order),
    reference: optional("reference"),
    measured: optional("measured"),
    measuredError: optional("error"),
    resolution: resolutionOf(
      table,
      orders.map(({ index }) => index),
    ),
  };
}

const plainDecimal = /^-?\d+(?:\.\d+)?(?:[eE][+-]?\d+)?$/;

function numberOf(text: string): number | null {
  // Reading a plain decimal is what the language does best; fractions are for the exact reader.
  if (plainDecimal.test(text)) return Number.isFinite(Number(text)) ? Number(text) : null;
  const value = readNumber(text)?.toFloat();
  return value !== undefined && Number.isFinite(value) ? value : null;
}

/** The finest step in which the predictions are written: a table in two decimals has 0.01. */
function resolutionOf({ rows }: DataTable, columns: readonly number[]): number {
  let finest = Infinity;
  for (const row of rows) {
    for (const column of columns) {
      const text = row[column] ?? null;
      if (text === null) continue;
      const [, decimals = "", exponent = "0"] = /^[^.eE]*(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/.exec(text) ?? [];
      finest = Math.min(finest, 10 ** (Number(exponent) - decimals.length));
    }
  }
  return Number.isFinite(finest) ? finest : 0;
}
