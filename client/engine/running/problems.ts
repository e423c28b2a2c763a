import type { Evaluation, Problem } from "../evaluation.ts";

/** A block that cannot be computed at all. */
export function refused(problems: readonly Problem[]): Evaluation<never> {
  return { value: null, problems, notices: [], scalars: [], working: [] };
}
