/** Fields: symbol, kind, dimension, charges. */
import type { Problem } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import type { Rational } from "../exact/rational.ts";
import { readLinearForm } from "../notation/read-linear-form.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import { canonicalDimensions, fieldRules } from "./field-rules.ts";
import type { FieldRow } from "./inputs.ts";
import { placed } from "./problem.ts";
import { isNeutral, readCharges } from "./read-symmetries.ts";
import type { Field, FieldKind, Spacetime, Symmetry } from "./theory.ts";

export interface FieldsReading {
  readonly fields: readonly Field[];
  /** Symbols of rows that cannot be counted with, so that terms can say so instead of calling them unknown. */
  readonly inError: readonly string[];
  readonly problems: readonly Problem[];
}

/** Symbols alone, as scales need them: no field may share its symbol with a scale. */
export function fieldSymbols(
  rows: readonly FieldRow[],
  reserved: ReadonlyMap<string, unknown>,
): ReadonlySet<string> {
  return new Set(
    rows.flatMap((row) => {
      const symbol = readSymbol(row.symbol, reserved);
      return symbol.ok ? [symbol.value.symbol] : [];
    }),
  );
}

/**
 * Problems: those of the notation, `symbol-duplicate`, `kind-needs-isotropic`, `kind-needs-anisotropic`,
 * `real-field-charged`, and those of charges. `constants` are what typed dimensions may name.
 */
export function readFields(
  rows: readonly FieldRow[],
  spacetime: Spacetime,
  symmetries: readonly Symmetry[],
  constants: ReadonlyMap<string, LinearForm>,
  reserved: ReadonlyMap<string, unknown>,
): FieldsReading {
  const problems: Problem[] = [];
  const fields: Field[] = [];
  const inError: string[] = [];
  const seen = new Set<string>();
  for (const row of rows) {
    if (row.symbol.trim() === "" && row.dimension.trim() === "" && row.charges.trim() === "") continue;
    const reading = readSymbol(row.symbol, reserved);
    if (!reading.ok) {
      problems.push(placed(reading.failure, "fields", row.id, "symbol"));
      continue;
    }
    const { symbol, latex } = reading.value;
    if (seen.has(symbol)) {
      problems.push({ code: "symbol-duplicate", path: ["fields", row.id, "symbol"], facts: { symbol } });
      continue;
    }
    seen.add(symbol);
    const kind = row.kind as FieldKind; // one of the choices of the shape
    const dimensions = readDimensions(row, kind, spacetime, constants);
    if ("code" in dimensions) {
      problems.push(dimensions);
      inError.push(symbol);
      continue;
    }
    const charged = readCharges(row, symmetries);
    problems.push(...charged.problems);
    const rule = fieldRules[kind];
    const neutral = isNeutral(charged.charges, symmetries);
    if (rule.conjugation === "self-conjugate" && !neutral)
      problems.push({
        code: "real-field-charged",
        path: ["fields", row.id, "charges"],
        facts: { symbol, kind },
      });
    fields.push({
      rowId: row.id,
      symbol,
      latex,
      kind,
      statistics: rule.statistics,
      selfConjugate:
        rule.conjugation === "own conjugate unless charged" ? neutral : rule.conjugation === "self-conjugate",
      ...dimensions,
      charges: charged.charges,
    });
  }
  return { fields, inError, problems };
}

function readDimensions(
  row: FieldRow,
  kind: FieldKind,
  spacetime: Spacetime,
  constants: ReadonlyMap<string, LinearForm>,
): Pick<Field, "dimension" | "weight" | "overridden"> | Problem {
  const canonical = canonicalDimensions(kind, spacetime);
  if (row.dimension.trim() === "") {
    if (canonical) return { ...canonical, overridden: false };
    const code = spacetime.geometry === "isotropic" ? "kind-needs-anisotropic" : "kind-needs-isotropic";
    return { code, path: ["fields", row.id, "kind"], facts: { symbol: row.symbol.trim(), kind } };
  }
  const typed = readLinearForm(row.dimension, constants);
  if (!typed.ok) return placed(typed.failure, "fields", row.id, "dimension");
  // The propagator follows the dimension; what a massive vector's longitudinal part adds to it stays added.
  const surplus = canonical ? canonical.weight.minus(canonical.dimension) : LinearForm.zero;
  const overridden = !canonical || !typed.value.equals(canonical.dimension);
  return { dimension: typed.value, weight: typed.value.plus(surplus), overridden };
}

/** Dimensions may name scales that are exact pure numbers, such as an anomalous dimension. */
export function exactConstants(
  scales: readonly { readonly symbol: string; readonly exact: Rational | null }[],
  symbols: ReadonlyMap<string, LinearForm>,
): ReadonlyMap<string, LinearForm> {
  const constants = scales.flatMap(({ symbol, exact }) =>
    exact ? [[symbol, LinearForm.constant(exact)] as const] : [],
  );
  return new Map([...constants, ...symbols]);
}
