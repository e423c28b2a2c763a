/** Evaluates a file of blocks: what the command `evaluate` and POST /api/evaluate have in common. */
import { RESULTS_FORMAT, type ResultsFile } from "#contract/evaluate-file.ts";
import { wordPlace, wordProblem } from "#contract/problem-words.ts";
import { readEvaluateFile, type Complaint } from "#contract/read-evaluate-file.ts";
import { ENGINE_VERSION, evaluateNotebook, type EvaluateOptions } from "#engine/index.ts";

export type FileOutcome =
  | { readonly ok: true; readonly results: ResultsFile }
  | { readonly ok: false; readonly complaints: readonly Complaint[] };

/**
 * @param body the parsed JSON, not trusted
 * @param onInternalError told of mistakes of ours inside a kind; the block then has the problem "internal"
 */
export function evaluateFile(
  body: unknown,
  onInternalError: EvaluateOptions["onInternalError"],
): FileOutcome {
  const reading = readEvaluateFile(body);
  if (!reading.ok) return reading;
  const { blocks } = reading;
  const outcomes = evaluateNotebook(blocks, { memo: new Map(), onInternalError });
  return {
    ok: true,
    results: {
      format: RESULTS_FORMAT,
      engineVersion: ENGINE_VERSION,
      results: outcomes.map(({ blockId, kind, key, evaluation }) => ({
        id: blockId,
        kind,
        key,
        evaluation,
        messages: evaluation.problems.map((problem) =>
          [wordPlace(problem.path), wordProblem(problem)].filter(Boolean).join(": "),
        ),
      })),
    },
  };
}
