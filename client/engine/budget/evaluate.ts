/** Evaluates an Error budget: reads sizes into one unit, combines them, and words the result. */
import { roundFloat, type Evaluation, type Problem, type Scalar } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import {
  correlatedAmong,
  isContradictory,
  linearSum,
  MOST_CORRELATED,
  shares,
  variance,
  type Contribution,
  type Correlation,
} from "./combine.ts";
import { readCorrelations } from "./correlations.ts";
import { combinations, conversions, sourceKinds, type BudgetInputs, type SourceKind } from "./inputs.ts";
import { readSize, readValue, type Reading } from "./read-sizes.ts";
import { resultText, sizeText } from "./result-text.ts";
import { readUnit } from "./units.ts";
import type { BudgetRow, BudgetValue } from "./value.ts";
import { budgetWorking } from "./working.ts";

interface Read extends Contribution {
  readonly row: BudgetInputs["sources"][number];
}

/** Problems: those of sizes and correlations; a row that cannot be read is left out. `budget-empty` when none is left. */
export function evaluateBudget(
  inputs: BudgetInputs,
  _theory: Theory | null,
  context: EvaluationContext,
): Evaluation<BudgetValue> {
  const problems: Problem[] = [];
  const reading: Reading = {
    unit: readUnit(inputs.unit),
    natural: inputs.convert === conversions[1],
    context,
    problems,
  };
  const value = readValue(inputs, reading);
  const correlations = readCorrelations(inputs, problems);
  const read = inputs.sources.flatMap((row): Read[] => {
    const size = readSize(row, value, reading);
    return size === null ? [] : [{ row, rowId: row.id, size, group: row.group.trim() }];
  });
  if (read.length === 0)
    return {
      value: null,
      problems: [...problems, { code: "budget-empty", path: ["sources"], facts: {} }],
      notices: [],
      scalars: [],
      working: [],
    };
  const correlationOf = correlations.of;
  const linear = inputs.combine === combinations[1];
  const squared = Math.max(0, variance(read, correlationOf));
  const wrong = linear ? null : wrongWith(read, correlations.hasPairs, correlationOf);
  if (wrong) return { value: null, problems: [...problems, wrong], notices: [], scalars: [], working: [] };
  const combined = (some: readonly Contribution[]) =>
    linear ? linearSum(some) : Math.sqrt(Math.max(0, variance(some, correlationOf)));
  const total = combined(read);
  const parts = shares(read, correlationOf);
  const unit = inputs.unit.trim();
  const rows = read.map(({ row, size, group }, index): BudgetRow => ({
    rowId: row.id,
    name: row.name.trim(),
    kind: kindOf(row.kind),
    group,
    size: roundFloat(size),
    text: sizeText(size, unit),
    share: linear || squared === 0 ? null : roundFloat((parts[index] ?? 0) / squared),
  }));
  const kinds = sourceKinds.flatMap((kind) => {
    const own = read.filter(({ row }) => row.kind === kind);
    if (own.length === 0) return [];
    const size = combined(own);
    return [{ kind, total: roundFloat(size), text: sizeText(size, unit) }];
  });
  const result: BudgetValue = {
    quantity: inputs.quantity.trim(),
    unit,
    combine: inputs.combine,
    value: value === null ? null : roundFloat(value),
    rows,
    total: roundFloat(total),
    totalText: sizeText(total, unit),
    kinds,
    sentence: resultText(
      value,
      kinds.map((one) => one.total),
      unit,
    ),
    brackets: kinds.map(({ kind }) => kind),
  };
  return {
    value: result,
    problems,
    notices: noticesOf(read, linear, correlationOf),
    scalars: scalarsOf(result),
    working: budgetWorking(result, read, correlationOf, linear),
  };
}

/** Coefficients that no random numbers can have, or too many to tell. */
function wrongWith(read: readonly Read[], hasPairs: boolean, correlationOf: Correlation): Problem | null {
  const path = [hasPairs ? "pairs" : "correlations"];
  const count = correlatedAmong(read, correlationOf).length;
  if (count > MOST_CORRELATED)
    return { code: "correlations-too-many", path, facts: { count, most: MOST_CORRELATED } };
  return isContradictory(read, correlationOf) ? { code: "correlations-contradict", path, facts: {} } : null;
}

function kindOf(text: string): SourceKind {
  return sourceKinds.find((kind) => kind === text) ?? "other";
}

function noticesOf(read: readonly Read[], linear: boolean, correlationOf: Correlation): Problem[] {
  if (linear) return [];
  const has = (kind: SourceKind) => read.some(({ row }) => row.kind === kind);
  const notices: Problem[] = [];
  if (has("scale variation") && has("truncation"))
    notices.push({ code: "scale-variation-and-truncation", path: ["sources"], facts: {} });
  const present = read.filter(({ size }) => size !== 0);
  const across = present.flatMap((one, index) =>
    present
      .slice(index + 1)
      .filter((other) => one.row.kind !== other.row.kind && correlationOf(one, other) !== 0)
      .map((other) => (one.group !== "" && one.group === other.group ? one.group : pairName(one, other))),
  );
  if (across.length > 0)
    notices.push({
      code: "budget-kinds-correlated",
      path: ["sources"],
      facts: { groups: [...new Set(across)].slice(0, MOST_NAMED).join(", ") },
    });
  return notices;
}

const MOST_NAMED = 5;

function pairName(one: Read, other: Read): string {
  const name = ({ row }: Read) => row.name.trim() || row.kind;
  return `${name(one)} and ${name(other)}`;
}

function scalarsOf(value: BudgetValue): Scalar[] {
  const unit = value.unit === "" ? {} : { unit: value.unit };
  const what = value.quantity === "" ? "the value" : value.quantity;
  const central: Scalar[] =
    value.value === null
      ? []
      : [
          {
            id: "value",
            label: `${what} with its whole error`,
            value: { type: "number", value: value.value, sigma: value.total, ...unit },
          },
          {
            id: "result",
            label: `${what}, one bracket for each kind of error`,
            value: { type: "word", text: value.sentence },
          },
        ];
  return [
    ...central,
    { id: "total", label: `whole error of ${what}`, value: { type: "number", value: value.total, ...unit } },
    ...value.kinds.map(({ kind, total }): Scalar => ({
      id: `kind/${kind.replace(" ", "-")}`,
      label: `${kind} error of ${what}`,
      value: { type: "number", value: total, ...unit },
    })),
    ...value.rows.map(({ rowId, name, size }): Scalar => ({
      id: `${rowId}/size`,
      label: `error from ${name === "" ? "a source without a name" : name}`,
      value: { type: "number", value: Math.abs(size), ...unit },
    })),
  ];
}
