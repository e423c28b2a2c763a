/**
 * What evaluating a block gives. Everything here is plain JSON: it is stored, sent and compared.
 * Exact numbers travel as canonical text; floats are rounded to 12 significant digits at the engine's edge.
 */

/** Bumped whenever any result, scalar or working could change for the same inputs. */
export const ENGINE_VERSION = "3";

/** Where in a block's inputs: a field name, or table, row id and column. */
export type InputPath = readonly string[];

/** Something wrong with the inputs, worded for people in contract/problem-words.ts. */
export interface Problem {
  readonly code: string;
  readonly path: InputPath;
  /** Facts the wording needs: the offending text, its character offset, the symbol, … */
  readonly facts: Readonly<Record<string, string | number>>;
}

/** A caution that goes with a result: it computes, but a reader should know. Same wording table. */
export type Notice = Problem;

/** One step of the derivation. Prose may hold $…$; a formula is displayed LaTeX. */
export type WorkingStep =
  | { readonly step: "heading"; readonly text: string }
  | { readonly step: "prose"; readonly text: string }
  | { readonly step: "formula"; readonly latex: string };

export type ScalarValue =
  /** A rational or linear form in canonical text. */
  | { readonly type: "exact"; readonly text: string }
  /** A float rounded to 12 digits, with its standard uncertainty and unit where it has them. */
  | { readonly type: "number"; readonly value: number; readonly sigma?: number; readonly unit?: string }
  /** A class or verdict: "irrelevant", "logarithmic". */
  | { readonly type: "word"; readonly text: string };

/** A number or word of a result that can be pinned into prose. */
export interface Scalar {
  /** Made of row id and quantity, never a row number: "r4/size", "plan/order". */
  readonly id: string;
  /** What it is, as a phrase that may hold $…$: "size of $\\lambda\\phi^4$ at $p$". */
  readonly label: string;
  readonly value: ScalarValue;
}

/** `value` is null when the block cannot be computed at all; problems beside a value concern parts of it. */
export interface Evaluation<Value = unknown> {
  readonly value: Value | null;
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
  readonly scalars: readonly Scalar[];
  readonly working: readonly WorkingStep[];
}

/** Rounds to 12 significant digits; leaves non-finite values alone. The engine's only way out for floats. */
export function roundFloat(value: number): number {
  // Whole numbers of at most 12 digits are what they are; writing and reading them costs the most here.
  if (Number.isInteger(value) && Math.abs(value) < 1e12) return value;
  return Number.isFinite(value) ? Number(value.toPrecision(12)) : value;
}
