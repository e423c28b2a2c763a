/** Cautions about a theory that computes all the same. */
import type { Notice } from "../evaluation.ts";
import type { Monomial } from "../notation/monomial.ts";
import { uncontractedIndices } from "./lorentz.ts";
import { forbidding } from "./read-terms.ts";
import type { Theory } from "./theory.ts";

/**
 * Notices: `term-forbidden` (with the symmetries' names), `odd-fermions`, `odd-indices`, `term-duplicate`, `roles-shared`,
 * `dimension-overridden`.
 */
export function premisesNotices(theory: Theory): Notice[] {
  return [...termNotices(theory), ...overrideNotices(theory), ...roleNotices(theory)];
}

function termNotices(theory: Theory): Notice[] {
  const notices: Notice[] = [];
  const seen = new Map<string, string>();
  for (const term of theory.terms) {
    const path = ["terms", term.rowId, "term"];
    const forbiddenBy = forbidding(term.monomial, theory.fields, theory.symmetries).map(({ name }) => name);
    if (forbiddenBy.length > 0)
      notices.push({
        code: "term-forbidden",
        path,
        facts: { term: term.latex, symmetries: forbiddenBy.join(", ") },
      });
    if (fermionLegs(term.monomial, theory) % 2 === 1)
      notices.push({
        code: "odd-fermions",
        path,
        facts: { term: term.latex, count: fermionLegs(term.monomial, theory) },
      });
    const indices = uncontractedIndices(term, theory);
    if (indices !== null)
      notices.push({ code: "odd-indices", path, facts: { term: term.latex, count: indices } });
    const key = JSON.stringify(signature(term.monomial));
    const earlier = seen.get(key);
    if (earlier !== undefined)
      notices.push({ code: "term-duplicate", path, facts: { term: term.latex, earlier } });
    else seen.set(key, term.latex);
  }
  return notices;
}

function fermionLegs(monomial: Monomial, theory: Theory): number {
  return monomial.fields
    .filter(({ symbol }) => theory.fields.find((field) => field.symbol === symbol)?.statistics === "fermion")
    .reduce((sum, { count }) => sum + count, 0);
}

/** The same for terms of the same couplings, legs and derivatives; contractions may still differ. */
function signature(monomial: Monomial) {
  const sorted = (entries: readonly string[]) => [...entries].sort();
  return [
    sorted(monomial.coefficients.map(({ symbol, power }) => `${symbol}^${power.toString()}`)),
    sorted(
      monomial.fields.map(({ symbol, conjugated, count }) => `${symbol}${conjugated ? "*" : ""}^${count}`),
    ),
    monomial.derivatives,
    monomial.timeDerivatives,
  ];
}

/** A dimension that was typed is shown as such wherever it counts. */
function overrideNotices(theory: Theory): Notice[] {
  return theory.fields
    .filter(({ overridden }) => overridden)
    .map(({ rowId, latex, dimension }) => ({
      code: "dimension-overridden",
      path: ["fields", rowId, "dimension"],
      facts: { field: latex, dimension: dimension.toLatex() },
    }));
}

function roleNotices(theory: Theory): Notice[] {
  return (["heavy", "probe"] as const).flatMap((role) => {
    const [first, second] = theory.scales.filter((scale) => scale.role === role);
    if (!first || !second) return [];
    return [
      {
        code: "roles-shared",
        path: ["scales", second.rowId, "role"],
        facts: { role, first: first.latex, second: second.latex },
      },
    ];
  });
}
