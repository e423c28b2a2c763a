/** Evaluates the file inside a golden file; the same code in this process and in a worker thread. */
import { evaluateFile } from "../../../server/compute/evaluate-file.ts";
import type { ResultsFile } from "#contract/evaluate-file.ts";

export function evaluateGolden(file: unknown): ResultsFile {
  const outcome = evaluateFile(file, (error) => {
    throw error;
  });
  if (!outcome.ok)
    throw new Error(outcome.complaints.map(({ place, message }) => `${place} ${message}`).join("; "));
  return outcome.results;
}
