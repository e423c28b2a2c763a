/** Turns the table of a Data block into predictions along x. */
import type { ColumnRole } from "../data/inputs.ts";
import type { DataValue } from "../data/value.ts";
import type { Source } from "../kind.ts";
import type { CurveData } from "./curve-data.ts";

/** Lines without x are left out; a table without an x column has no points. Of two columns for one order the first counts. */
export function curveDataOf({ value }: Source): CurveData {
  const table = value as DataValue; // the evaluator allows no other kind here
  const find = (role: ColumnRole) => table.columns.findIndex((column) => column.role === role);
  const x = find("x");
  const rows = table.rows
    .map((row) => row.map(numberOf))
    .filter((row) => (row[x] ?? null) !== null)
    .sort((a, b) => (a[x] ?? 0) - (b[x] ?? 0));
  const column = (index: number) => rows.map((row) => row[index] ?? null);
  const optional = (role: ColumnRole) => (find(role) < 0 ? null : column(find(role)));
  const given = table.columns
    .flatMap(({ role, order }, index) => (role === "order" && order !== null ? [{ order, index }] : []))
    .filter(({ order }, at, all) => all.findIndex((other) => other.order === order) === at)
    .sort((a, b) => a.order - b.order)
    .map((one) => ({ ...one, values: column(one.index) }));
  const orders = given.filter(({ values }) => values.some((value) => value !== null));
  const units = new Set(
    table.columns.flatMap(({ role, unit }) => (role === "x" || role === "other" ? [] : [unit])),
  );
  return {
    xName: table.columns[x]?.name ?? "",
    xUnit: table.columns[x]?.unit ?? "",
    unit: [...units][0] ?? "",
    unitsDiffer: units.size > 1,
    x: rows.map((row) => row[x] ?? NaN),
    orders: orders.map(({ order, values }) => ({ order, values })),
    absent: given.filter((one) => !orders.includes(one)).map(({ order }) => order),
    reference: optional("reference"),
    measured: optional("measured"),
    measuredError: optional("error"),
    resolution: resolutionOf(
      table,
      orders.map(({ index }) => index),
    ),
  };
}

/** The table holds decimals only; one that no double holds is none. */
function numberOf(text: string | null): number | null {
  const value = text === null ? NaN : Number(text);
  return Number.isFinite(value) ? value : null;
}

/** The finest step in which the predictions are written: a table in two decimals has 0.01. */
function resolutionOf({ rows }: DataValue, columns: readonly number[]): number {
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
