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

/** LaTeX of a fact, as prose may hold it: "$\\lambda\\phi^4$". */
export function formula(latex: string | number | undefined): string {
  return `$${said(latex)}$`;
}

/** " at character 5", counted from 1 in what was typed; "" when the problem is not about one place in it. */
export function atCharacter({ offset }: Facts): string {
  return typeof offset === "number" ? ` at character ${offset + 1}` : "";
}

/** " Did you mean “chi”?", or "" when nothing typed is near. */
export function didYouMean({ suggestion }: Facts): string {
  return suggestion === undefined ? "" : ` Did you mean ${quoted(suggestion)}?`;
}
