/** Every problem and notice of the engine in plain words. The only place that knows how to say them. */
import type { InputPath, Problem } from "#engine/evaluation.ts";
import { basisWords } from "./words/basis-words.ts";
import { budgetWords } from "./words/budget-words.ts";
import { closureWords } from "./words/closure-words.ts";
import { countingWords } from "./words/counting-words.ts";
import { dataWords } from "./words/data-words.ts";
import { divergenceWords } from "./words/divergence-words.ts";
import { notationWords } from "./words/notation-words.ts";
import { notebookWords } from "./words/notebook-words.ts";
import { planWords } from "./words/plan-words.ts";
import { premisesWords } from "./words/premises-words.ts";
import { runningWords } from "./words/running-words.ts";
import { scalingWords } from "./words/scaling-words.ts";
import { truncationWords } from "./words/truncation-words.ts";
import type { Words } from "./words/words.ts";

/** By code; a test fails when the engine uses a code that is not here. */
export const problemWords: Words = {
  ...notebookWords,
  ...notationWords,
  ...premisesWords,
  ...scalingWords,
  ...countingWords,
  ...divergenceWords,
  ...closureWords,
  ...planWords,
  ...truncationWords,
  ...basisWords,
  ...dataWords,
  ...budgetWords,
  ...runningWords,
};

/**
 * One sentence that says what is wrong, where, and what would be right.
 * @example wordProblem({ code: "order-twice", path: ["orders", "r2", "order"], facts: { row: 2, order: 1 } })
 * // "Order 1 is in the table twice, again in row 2. Keep one of them."
 */
export function wordProblem({ code, path, facts }: Problem): string {
  const words = problemWords[code];
  if (words) return words(facts, path);
  // Unreachable while the test of all codes is green; still, what is unknown must be said rather than hidden.
  return `Something is wrong here (${code}${path.length > 0 ? `, at ${path.join(" › ")}` : ""}).`;
}

/**
 * The place of a problem for where no form shows it: the field, or table, row id and column.
 * @example wordPlace(["terms", "t3", "term"]) // "terms, row “t3”, term"
 */
export function wordPlace([first, row, column]: InputPath): string {
  if (first === undefined) return "";
  if (row === undefined) return first;
  return `${first}, row “${row}”${column === undefined ? "" : `, ${column}`}`;
}
