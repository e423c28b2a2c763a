/** Symmetry groups and the charges of fields under them. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { readLinearForm } from "../notation/read-linear-form.ts";
import type { FieldRow, SymmetryRow } from "./inputs.ts";
import type { Symmetry } from "./theory.ts";

const cyclic = /^(?:Z|ℤ|\\mathbb\{?\s*Z\}?|C)\s*_?\s*\{?\s*(\d{1,6})\s*\}?$/;
const phase = /^U\s*\(\s*1\s*\)$/;

/** Problem: `group-unknown`. Untouched rows are passed over. */
export function readSymmetries(rows: readonly SymmetryRow[]): {
  readonly symmetries: readonly Symmetry[];
  readonly problems: readonly Problem[];
} {
  const problems: Problem[] = [];
  const symmetries: Symmetry[] = [];
  for (const row of rows) {
    const group = row.group.trim();
    if (row.name.trim() === "" && group === "") continue;
    const order = cyclic.exec(group)?.[1];
    const name = row.name.trim() || group;
    if (order !== undefined && BigInt(order) >= 2n)
      symmetries.push({ rowId: row.id, name, modulus: BigInt(order) });
    else if (phase.test(group)) symmetries.push({ rowId: row.id, name, modulus: null });
    else
      problems.push({ code: "group-unknown", path: ["symmetries", row.id, "group"], facts: { text: group } });
  }
  return { symmetries, problems };
}

/** How a group is shown: "Z2", "U(1)". */
export function groupText(symmetry: Symmetry): string {
  return symmetry.modulus === null ? "U(1)" : `Z${symmetry.modulus}`;
}

/** A charge in the range 0 … n − 1 for Z_n; as it is for U(1). */
export function reduceCharge(charge: Rational, modulus: bigint | null): Rational {
  if (modulus === null) return charge;
  const turns = charge.over(Rational.of(modulus)).floor();
  return charge.minus(Rational.of(turns * modulus));
}

/**
 * One charge per symmetry; missing ones are 0.
 * Problems: `charges-too-many`, `charge-unreadable`, `charge-not-whole` (Z_n), `parity-without-z2` (odd, even).
 */
export function readCharges(
  row: FieldRow,
  symmetries: readonly Symmetry[],
): { readonly charges: readonly Rational[]; readonly problems: readonly Problem[] } {
  const problems: Problem[] = [];
  const typed = row.charges.trim() === "" ? [] : row.charges.split(/[,;]/).map((text) => text.trim());
  const note = (code: string, facts: Problem["facts"]) =>
    problems.push({ code, path: ["fields", row.id, "charges"], facts });
  if (typed.length > symmetries.length)
    note("charges-too-many", { given: typed.length, wanted: symmetries.length });
  const charges = symmetries.map(({ modulus, name }, index): Rational => {
    const text = typed[index] ?? "";
    if (text === "") return Rational.zero;
    if (text === "odd" || text === "even") {
      if (modulus !== 2n) note("parity-without-z2", { text, name });
      return Rational.of(text === "odd" ? 1 : 0);
    }
    const form = readLinearForm(text, new Map());
    const charge = form.ok ? form.value.asRational() : null;
    if (!charge) note("charge-unreadable", { text, name });
    else if (modulus !== null && !charge.isInteger()) note("charge-not-whole", { text, name });
    else return reduceCharge(charge, modulus);
    return Rational.zero;
  });
  return { charges, problems };
}

/** Whether a field with these charges can be its own conjugate: every charge equals its opposite. */
export function isNeutral(charges: readonly Rational[], symmetries: readonly Symmetry[]): boolean {
  return symmetries.every(({ modulus }, index) => {
    const charge = charges[index] ?? Rational.zero;
    return reduceCharge(charge.plus(charge), modulus).sign() === 0;
  });
}
