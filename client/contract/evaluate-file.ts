/** The file that `npm run -s evaluate` reads and writes, and the body of POST /api/evaluate. */
import * as z from "zod/mini";
import { kindNames } from "#engine/kind.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import type { KindName } from "#engine/kind.ts";

export const EVALUATE_FORMAT = "subleading-blocks/1";
export const RESULTS_FORMAT = "subleading-results/1";

/** `inputs` is checked again by the schema of its kind. */
export const evaluateFile = z.strictObject({
  format: z.literal(EVALUATE_FORMAT),
  blocks: z
    .array(
      z.strictObject({
        id: z.string().check(z.minLength(1), z.maxLength(100)),
        kind: z.enum(kindNames),
        /** Id of the premises it stands on; may be left out when the file has exactly one Premises block. */
        standsOn: z.optional(z.string()),
        inputs: z._default(z.record(z.string(), z.unknown()), {}),
      }),
    )
    .check(z.minLength(1), z.maxLength(500)),
});
export type EvaluateFile = z.infer<typeof evaluateFile>;

export interface BlockOutcome {
  readonly id: string;
  readonly kind: KindName;
  readonly key: string;
  readonly evaluation: Evaluation;
  /** The problems of the evaluation in plain words with their places, in the same order. */
  readonly messages: readonly string[];
}
export interface ResultsFile {
  readonly format: typeof RESULTS_FORMAT;
  readonly engineVersion: string;
  readonly results: readonly BlockOutcome[];
}
