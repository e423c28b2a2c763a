/** A Truncation error block that takes its predictions from a table, for tests. */
import type { Evaluation } from "#engine/evaluation.ts";
import { aloneContext, type EvaluationContext, type Progress } from "#engine/kind.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { truncationError } from "#engine/truncation/kind.ts";
import { ternTrap } from "#engine/truncation/tern-trap.ts";
import type { TruncationInputs } from "#engine/truncation/shape.ts";
import type { TruncationValue } from "#engine/truncation/value.ts";
import { blockInputs } from "./truncation-block.ts";

export interface Table {
  readonly name?: string;
  readonly xUnit?: string;
  readonly x: readonly number[];
  /** X by order, one value for each x. */
  readonly orders: Readonly<Record<number, readonly (number | null)[]>>;
  readonly reference?: readonly (number | null)[];
  readonly measured?: readonly (number | null)[];
  /** Of the columns other than x and the predictions. */
  readonly otherUnit?: string;
}

const text = (value: number | null | undefined) =>
  value === null || value === undefined ? null : String(value);

/** What a Data block gives for it. */
function valueOf({ name = "p", xUnit = "MeV", x, orders, reference, measured, otherUnit = "mb" }: Table) {
  const column = (role: string, values: readonly (number | null)[], order: number | null = null) => ({
    name: role === "x" ? name : `${role}${order ?? ""}`,
    role,
    unit: role === "x" ? xUnit : order === null ? otherUnit : "mb",
    order,
    values,
  });
  const columns = [
    column("x", x),
    ...Object.entries(orders).map(([order, values]) => column("order", values, Number(order))),
    ...(reference ? [column("reference", reference)] : []),
    ...(measured ? [column("measured", measured)] : []),
  ];
  return {
    columns: columns.map(({ values: _, ...rest }) => rest),
    rows: x.map((_, row) => columns.map(({ values }) => text(values[row]))),
  };
}

export function evaluateCurve(
  tables: Readonly<Record<string, Table>>,
  inputs: Partial<TruncationInputs> = {},
  theory: Theory | null = null,
  heard: Progress[] = [],
): Evaluation<TruncationValue> {
  const [first = ""] = Object.keys(tables);
  const context: EvaluationContext = {
    source: (id) => {
      const table = tables[id];
      return table ? { kind: "data", value: valueOf(table), scalars: [], title: `table ${id}` } : null;
    },
    tell: (progress) => heard.push(progress),
  };
  return truncationError.evaluate({ ...blockInputs({}), data: first, ...inputs }, theory, {
    ...aloneContext,
    ...context,
  });
}

/** The invented observable of the demonstration as a table. */
export function ternTable(count: number, highest: number): Table {
  const { p, orders, exact } = ternTrap(count, highest);
  return { x: p, orders: Object.fromEntries(orders.map((values, n) => [n, values])), measured: exact };
}
