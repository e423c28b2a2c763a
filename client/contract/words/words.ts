/** How one code is said. Facts and path are those of the problem. */
import type { InputPath, Problem } from "#engine/evaluation.ts";

export type Facts = Problem["facts"];
export type Words = Readonly<Record<string, (facts: Facts, path: InputPath) => string>>;

/** What somebody typed, in quotation marks and not too long. */
export function quoted(text: string | number | undefined): string {
  const shown = String(text ?? "").trim();
  return shown.length > 60 ? `“${shown.slice(0, 57)}…”` : `“${shown}”`;
}

/** A fact as text; a fact that is missing says so rather than "undefined". */
export function said(fact: string | number | undefined): string {
  return fact === undefined ? "?" : String(fact);
}
