/** Evaluates Data: a table that other blocks compute from. */
import { roundFloat, type Evaluation, type Problem, type Scalar, type WorkingStep } from "../evaluation.ts";
import type { DataInputs } from "./inputs.ts";
import { MOST_LINES, readTable } from "./read-table.ts";
import type { DataValue } from "./value.ts";

/** Problems: `data-empty`, and those of columns and values, which are then left out. */
export function evaluateData(inputs: DataInputs): Evaluation<DataValue> {
  const problems: Problem[] = [];
  const { value, isCut } = readTable(inputs, problems);
  if (value.columns.length === 0 || value.rows.length === 0)
    return {
      value: null,
      problems: [...problems, { code: "data-empty", path: ["lines"], facts: {} }],
      notices: [],
      scalars: [],
      working: [],
    };
  const x = value.columns.findIndex(({ role }) => role === "x");
  return {
    value,
    problems,
    notices: [
      ...(x < 0 ? [{ code: "data-without-x", path: ["columns"], facts: {} }] : []),
      ...(isCut ? [{ code: "data-cut", path: ["lines"], facts: { most: MOST_LINES } }] : []),
    ],
    scalars: scalarsOf(value, x),
    working: workingOf(value, x),
  };
}

function scalarsOf({ columns, rows }: DataValue, x: number): Scalar[] {
  const count: Scalar = {
    id: "points",
    label: "number of lines",
    value: { type: "exact", text: String(rows.length) },
  };
  const column = columns[x];
  const [least, most] = rangeOf(rows, x);
  if (!column || least === null || most === null) return [count];
  const unit = column.unit === "" ? {} : { unit: column.unit };
  return [
    count,
    { id: "x/least", label: `least ${column.name || "x"}`, value: { type: "number", value: least, ...unit } },
    { id: "x/most", label: `largest ${column.name || "x"}`, value: { type: "number", value: most, ...unit } },
  ];
}

function rangeOf(rows: DataValue["rows"], column: number): readonly [number | null, number | null] {
  let [least, most]: [number | null, number | null] = [null, null];
  for (const row of rows) {
    const text = row[column] ?? null;
    if (text === null || !Number.isFinite(Number(text))) continue;
    least = Math.min(least ?? Infinity, Number(text));
    most = Math.max(most ?? -Infinity, Number(text));
  }
  return [least === null ? null : roundFloat(least), most === null ? null : roundFloat(most)];
}

function workingOf({ columns, rows }: DataValue, x: number): WorkingStep[] {
  const orders = columns.filter(({ role }) => role === "order").map(({ order }) => String(order));
  const given = rows.reduce((sum, row) => sum + row.filter((text) => text !== null).length, 0);
  return [
    { step: "heading", text: "What was read" },
    {
      step: "prose",
      text: `${rows.length} lines of ${columns.length} columns, ${given} values; each is kept as the decimal it was written as. ${x < 0 ? "No column is x." : `Lines stand at $x$ = ${columns[x]?.name || "x"}.`}${orders.length === 0 ? "" : ` Predictions are given through orders ${orders.join(", ")}.`}`,
    },
  ];
}
