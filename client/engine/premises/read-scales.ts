/** Scales: values with units and uncertainty, and scales made of other scales. */
import type { Problem } from "../evaluation.ts";
import type { NotationFailure } from "../notation/failure.ts";
import { shown, sigmaOf, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { readSymbol, type Symbol } from "../notation/read-symbol.ts";
import type { ScaleRow } from "./inputs.ts";
import { placed } from "./problem.ts";
import type { Scale, ScaleRole } from "./theory.ts";

export interface ScalesReading {
  readonly scales: readonly Scale[];
  readonly problems: readonly Problem[];
  /** Looks scales up for expressions; knows why one has no number. */
  readonly declared: Declared;
  /** Values as typeset expressions, by symbol, where they are more than a literal. */
  readonly expressions: ReadonlyMap<string, string>;
}

interface Entry extends Symbol {
  readonly row: ScaleRow;
}

/**
 * Order of rows does not matter: a scale may use one declared below it.
 * Problems: those of the notation, `symbol-duplicate`, `scale-in-error`, `scale-has-no-number`, `scale-circular`.
 * `taken` are the symbols of fields. A scale whose value is in error stays, without a number.
 */
export function readScales(
  rows: readonly ScaleRow[],
  taken: ReadonlySet<string>,
  reserved: ReadonlyMap<string, unknown>,
): ScalesReading {
  const problems: Problem[] = [];
  const entries = new Map<string, Entry>();
  for (const row of rows) {
    if (row.symbol.trim() === "" && row.value.trim() === "") continue;
    const symbol = readSymbol(row.symbol, reserved);
    if (!symbol.ok) problems.push(placed(symbol.failure, "scales", row.id, "symbol"));
    else if (taken.has(symbol.value.symbol) || entries.has(symbol.value.symbol))
      problems.push({
        code: "symbol-duplicate",
        path: ["scales", row.id, "symbol"],
        facts: { symbol: symbol.value.symbol },
      });
    else entries.set(symbol.value.symbol, { row, ...symbol.value });
  }

  const found = new Map<string, Quantity | NotationFailure>();
  const expressions = new Map<string, string>();
  const underWay = new Set<string>();
  const lookUp = (symbol: string): Quantity | NotationFailure | null => {
    const entry = entries.get(symbol);
    if (!entry) return null;
    const known = found.get(symbol);
    if (known) return "code" in known ? { code: "scale-in-error", facts: { symbol } } : known;
    if (entry.row.value.trim() === "") return { code: "scale-has-no-number", facts: { symbol } };
    if (underWay.has(symbol)) return { code: "scale-circular", facts: { symbol } };
    underWay.add(symbol);
    const reading = readQuantity(entry.row.value, declared, entry.row.id);
    underWay.delete(symbol);
    const result = reading.ok ? reading.value.quantity : reading.failure;
    found.set(symbol, result);
    if (reading.ok) {
      expressions.set(symbol, reading.value.latex);
      return reading.value.quantity;
    }
    // A loop is one mistake of several scales: whoever closes it is told so, the others that they build on it.
    return reading.failure.code === "scale-circular"
      ? reading.failure
      : { code: "scale-in-error", facts: { symbol } };
  };
  const declared: Declared = { lookUp, symbols: [...entries.keys()] };

  const scales = [...entries.values()].map(({ row, symbol, latex }): Scale => {
    lookUp(symbol);
    const result = found.get(symbol);
    if (result && "code" in result) problems.push(placed(result, "scales", row.id, "value"));
    const quantity = result && !("code" in result) ? result : null;
    const role = row.role as ScaleRole; // one of the choices of the shape
    if (!quantity) return { rowId: row.id, symbol, latex, role, value: null, sigma: 0, unit: "", gev: null };
    const isEnergy = quantity.energy.toString() === "1";
    const gev = isEnergy ? { value: quantity.value, sigma: sigmaOf(quantity) } : null;
    return { rowId: row.id, symbol, latex, role, ...shown(quantity), gev };
  });
  return { scales, problems, declared, expressions };
}
