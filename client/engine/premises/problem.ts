/** Failures of the notation, placed in the inputs. */
import type { InputPath, Problem } from "../evaluation.ts";
import type { NotationFailure } from "../notation/failure.ts";

export function placed(failure: NotationFailure, ...path: InputPath): Problem {
  return { code: failure.code, path, facts: failure.facts };
}
