/** Reads the value and the sizes of a budget, typed or taken from blocks, into its unit. */
import type { InputPath, Problem, ScalarValue } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { sigmaOf } from "../notation/quantity.ts";
import { scalarParts, type BudgetInputs } from "./inputs.ts";
import { plainNumber } from "./plain-number.ts";
import { convert, readUnit, type BudgetUnit } from "./units.ts";

export interface Reading {
  readonly unit: BudgetUnit;
  readonly natural: boolean;
  readonly context: EvaluationContext;
  readonly problems: Problem[];
}
const nothing = { symbols: [], lookUp: () => null };

/** Null when there is none, or it cannot be read. */
export function readValue({ value, from, scalar }: BudgetInputs, reading: Reading): number | null {
  if (from !== "") return fromBlock(from, scalar, ["scalar"], reading, "value");
  return value.trim() === "" ? null : typed(value, ["value"], reading);
}

/** A percentage is one of the value. */
export function readSize(
  row: BudgetInputs["sources"][number],
  value: number | null,
  reading: Reading,
): number | null {
  const path = ["sources", row.id, "size"];
  if (row.from !== "")
    return fromBlock(
      row.from,
      row.scalar,
      ["sources", row.id, "scalar"],
      reading,
      row.part === scalarParts[1] ? "uncertainty" : "error",
    );
  if (row.size.trim() === "") {
    if (row.name.trim() !== "")
      reading.problems.push({ code: "size-missing", path, facts: { name: row.name } });
    return null;
  }
  const percent = /^(.*?)\s*\\?%$/.exec(row.size.trim());
  if (!percent) return typed(row.size, path, reading);
  const part = plainNumber(percent[1] ?? "");
  if (part === null) return refuse(reading, path, "size-unreadable", { text: row.size });
  if (value === null) return refuse(reading, path, "percent-of-nothing", {});
  return (part / 100) * value;
}

function refuse(reading: Reading, path: InputPath, code: string, facts: Problem["facts"]): null {
  reading.problems.push({ code, path, facts });
  return null;
}

function typed(text: string, path: InputPath, reading: Reading): number | null {
  const plain = plainNumber(text);
  if (plain !== null) return plain;
  const read = readQuantity(text, nothing, path.join("/"));
  if (!read.ok) return namedUnit(text, path, reading);
  const { quantity } = read.value;
  if (sigmaOf(quantity) > 0)
    return refuse(reading, path, path[0] === "value" ? "budget-value-uncertain" : "size-uncertain-itself", {
      text,
    });
  const written = readUnit(unitWritten(text));
  // A ratio of energies is a number; one of an energy to an inverse length is so by ħ = c = 1 only.
  if (quantity.energy.sign() === 0 && !(written.known && written.family === "mixed" && !reading.natural))
    return inUnit(quantity.value, { known: false, text: "" }, path, reading, text);
  return inUnit(written.known ? quantity.value / written.size : quantity.value, written, path, reading, text);
}

/** A unit that is no energy or length is known by its name only: "0.2 pb". */
function namedUnit(text: string, path: InputPath, reading: Reading): number | null {
  const [, number = "", unit = ""] = /^\s*([-+−]?[\d.]+(?:[eE][-+]?\d+)?)\s*(\p{L}.*)$/u.exec(text) ?? [];
  const value = plainNumber(number);
  if (value === null) return refuse(reading, path, "size-unreadable", { text });
  return inUnit(value, readUnit(unit), path, reading, text);
}

/** What stands after the number: "MeV" of "3.2e2 MeV". */
function unitWritten(text: string): string {
  return text.replace(/^\s*[-+−]?[\d.]+(?:[eE][-+]?\d+)?\s*\*?\s*/, "").trim();
}

function inUnit(
  value: number,
  from: BudgetUnit,
  path: InputPath,
  reading: Reading,
  text: string,
): number | null {
  if (!Number.isFinite(value)) return refuse(reading, path, "size-unreadable", { text });
  const converted = convert(value, from, reading.unit, reading.natural);
  if (converted.ok) return converted.value;
  return refuse(reading, path, converted.code, {
    from: from.text === "" ? "no unit" : from.text,
    to: reading.unit.text === "" ? "no unit" : reading.unit.text,
  });
}

/** The value's row takes the value of a number; an error is the number itself, or the uncertainty it comes with. */
function fromBlock(
  blockId: string,
  scalarId: string,
  path: InputPath,
  reading: Reading,
  what: "value" | "error" | "uncertainty",
): number | null {
  const source = reading.context.source(blockId);
  // Why there is none is said already.
  if (!source) return null;
  const scalar = source.scalars.find(({ id }) => id === scalarId);
  if (!scalar) return refuse(reading, path, "budget-scalar-missing", { what });
  const number = what === "uncertainty" ? sigmaIn(scalar.value) : numberOf(scalar.value);
  if (what === "uncertainty" && number === null) return refuse(reading, path, "budget-scalar-certain", {});
  if (number === null) return refuse(reading, path, "budget-scalar-no-number", { what });
  const unit = scalar.value.type === "number" ? (scalar.value.unit ?? "") : "";
  return inUnit(number, readUnit(unit), path, reading, scalar.id);
}

function numberOf(value: ScalarValue): number | null {
  if (value.type === "number") return value.value;
  return value.type === "exact" ? plainNumber(value.text) : null;
}

function sigmaIn(value: ScalarValue): number | null {
  return value.type === "number" ? (value.sigma ?? null) : null;
}
