/** Reads how sources move together: by groups, and by pairs where two of them do so in a way of their own. */
import type { Problem } from "../evaluation.ts";
import type { Contribution, Correlation } from "./combine.ts";
import type { BudgetInputs } from "./inputs.ts";
import { plainNumber } from "./plain-number.ts";

export interface Correlations {
  readonly of: Correlation;
  /** Whether any two sources have a coefficient of their own. */
  readonly hasPairs: boolean;
}

/**
 * A pair's own coefficient counts before that of a group; without either, members of one group have 1 and others 0.
 * Problems: `coefficient-unreadable`, `coefficient-twice`, `pair-incomplete`, `pair-with-itself`, `pair-twice`.
 */
export function readCorrelations(
  { correlations, pairs, sources }: Pick<BudgetInputs, "correlations" | "pairs" | "sources">,
  problems: Problem[],
): Correlations {
  const groups = readGroups(correlations, problems);
  const own = readPairs(pairs, new Set(sources.map(({ id }) => id)), problems);
  return {
    hasPairs: own.size > 0,
    of: (one: Contribution, other: Contribution) => {
      const pair = own.get(pairKey(one.rowId, other.rowId));
      if (pair !== undefined) return pair;
      return one.group !== "" && one.group === other.group ? (groups.get(one.group) ?? 1) : 0;
    },
  };
}

/** Coefficients by group. */
function readGroups(rows: BudgetInputs["correlations"], problems: Problem[]): ReadonlyMap<string, number> {
  const found = new Map<string, number>();
  for (const { id, group, coefficient } of rows) {
    if (group.trim() === "") continue;
    const value = readCoefficient(coefficient, ["correlations", id, "coefficient"], problems);
    if (value === null) continue;
    if (found.has(group.trim()))
      problems.push({ code: "coefficient-twice", path: ["correlations", id, "group"], facts: { group } });
    else found.set(group.trim(), value);
  }
  return found;
}

function readPairs(
  rows: BudgetInputs["pairs"],
  known: ReadonlySet<string>,
  problems: Problem[],
): ReadonlyMap<string, number> {
  const found = new Map<string, number>();
  for (const { id, first, second, coefficient } of rows) {
    if (first === "" && second === "" && coefficient.trim() === "") continue;
    const missing = [
      ["first", first],
      ["second", second],
    ].find(([, name = ""]) => !known.has(name));
    if (missing) {
      problems.push({ code: "pair-incomplete", path: ["pairs", id, missing[0] ?? "first"], facts: {} });
      continue;
    }
    if (first === second) {
      problems.push({ code: "pair-with-itself", path: ["pairs", id, "second"], facts: {} });
      continue;
    }
    const value = readCoefficient(coefficient, ["pairs", id, "coefficient"], problems);
    if (value === null) continue;
    const key = pairKey(first, second);
    if (found.has(key)) problems.push({ code: "pair-twice", path: ["pairs", id, "second"], facts: {} });
    else found.set(key, value);
  }
  return found;
}

function readCoefficient(text: string, path: Problem["path"], problems: Problem[]): number | null {
  const value = plainNumber(text);
  if (value !== null && value >= -1 && value <= 1) return value;
  problems.push({ code: "coefficient-unreadable", path, facts: { text } });
  return null;
}

/** The same whichever stands first. Ids hold no line break. */
function pairKey(first: string, second: string): string {
  return first < second ? `${first}\n${second}` : `${second}\n${first}`;
}
