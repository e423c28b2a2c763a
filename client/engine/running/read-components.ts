import type { Problem } from "../evaluation.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import type { Theory } from "../premises/theory.ts";
import type { RunningInputs } from "./inputs.ts";
import { isSpinor } from "./read-yukawa.ts";

const MOST = 1000;

/**
 * Components of scalars and copies of fermions, by field symbol. Problems: `running-field-unknown`,
 * `running-components-unreadable`, `components-of-complex`, those of the notation.
 */
export function readComponents(
  inputs: RunningInputs,
  theory: Theory | null,
  problems: Problem[],
): ReadonlyMap<string, number> {
  const found = new Map<string, number>();
  for (const row of inputs.components) {
    if (row.field.trim() === "" && row.count.trim() === "") continue;
    const refuse = (column: string, code: string, facts: Problem["facts"]) => {
      problems.push({ code, path: ["components", row.id, column], facts });
    };
    const symbol = readSymbol(row.field);
    if (!symbol.ok) {
      refuse("field", symbol.failure.code, symbol.failure.facts);
      continue;
    }
    const field = theory?.fields.find((one) => one.symbol === symbol.value.symbol);
    const isCounted =
      field && (isSpinor(field) || field.kind === "real scalar" || field.kind === "complex scalar");
    if (!isCounted) {
      refuse("field", "running-field-unknown", { text: row.field });
      continue;
    }
    const count = Number(row.count.trim());
    if (row.count.trim() === "" || !Number.isInteger(count) || count < 1 || count > MOST) {
      refuse("count", "running-components-unreadable", { text: row.count, most: MOST });
      continue;
    }
    if (field.kind === "complex scalar" && count !== 1) {
      refuse("field", "components-of-complex", { symbol: field.latex });
      continue;
    }
    found.set(field.symbol, count);
  }
  return found;
}
