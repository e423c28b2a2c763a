/** Searching and sorting the field contents of a count. */
import type { ClassCount } from "#engine/basis/value.ts";

export const orders = ["dimension", "number of operators", "number of fields"] as const;
export type ClassOrder = (typeof orders)[number];

/** Every word must occur: a field, "D^2" or "D2" for derivatives, or a dimension such as "6". */
export function searchClasses(classes: readonly ClassCount[], search: string): readonly ClassCount[] {
  const words = search.trim().split(/\s+/).filter(Boolean);
  if (words.length === 0) return classes;
  return classes.filter((row) => words.every((word) => matches(row, word)));
}

function matches({ dimension, derivatives, fieldsLatex }: ClassCount, word: string): boolean {
  const derivative = /^D\^?(\d*)$/.exec(word);
  if (derivative) return derivatives === (derivative[1] === "" ? 1 : Number(derivative[1]));
  if (/^\d+(?:\/\d+)?$/.test(word)) return dimension === word;
  return plain(fieldsLatex).includes(plain(word));
}

function plain(latex: string): string {
  return latex.replace(/\\dagger|†/g, "*").replace(/\\[,;]|[\\{}()\s^]/g, "");
}

export function sortClasses(classes: readonly ClassCount[], order: ClassOrder): readonly ClassCount[] {
  if (order === "dimension") return classes;
  const by = {
    "number of operators": (a: ClassCount, b: ClassCount) => compareDigits(b.number.at, a.number.at),
    "number of fields": (a: ClassCount, b: ClassCount) => a.fields - b.fields,
  }[order];
  // Stable: within equals the order of dimensions stays.
  return [...classes].sort(by);
}

function compareDigits(a: string, b: string): number {
  return a.length - b.length || (a < b ? -1 : a > b ? 1 : 0);
}
