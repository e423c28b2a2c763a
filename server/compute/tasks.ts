/** What the compute threads can do: messages in, messages out, all plain data. */
import type { Evaluation, KindName, PinCounts } from "#engine/index.ts";
import type { StoredUpdate } from "../collab/build-document.ts";
import type { Compacted } from "../collab/compaction.ts";
import type { FileOutcome } from "./evaluate-file.ts";

/** Evaluates the blocks of a document given as one Yjs update. */
export interface SettleTask {
  readonly task: "settle";
  readonly document: Uint8Array;
}
export interface SettledBlock {
  readonly blockId: string;
  readonly kind: KindName;
  readonly key: string;
  /** Id of the Premises block computed from. */
  readonly standsOn: string | null;
  /** All that the key was made of, so that anyone can recompute it. */
  readonly inputs: unknown;
  readonly evaluation: Evaluation;
}
export interface SettledDocument {
  readonly blocks: readonly SettledBlock[];
  readonly premisesLine: string;
  readonly pins: PinCounts;
  /** Mistakes of ours inside a kind, for the log. */
  readonly mistakes: readonly string[];
}

/** Evaluates a file of blocks; `body` is not trusted. */
export interface FileTask {
  readonly task: "file";
  readonly body: unknown;
}
export interface FileAnswer {
  readonly outcome: FileOutcome;
  readonly mistakes: readonly string[];
}

/** Makes one state of a state and the rows after it. */
export interface CompactTask {
  readonly task: "compact";
  readonly state: Uint8Array | null;
  readonly rows: readonly StoredUpdate[];
}
export type ComputeTask = SettleTask | FileTask | CompactTask;
export interface ComputeAnswers {
  readonly settle: SettledDocument;
  readonly file: FileAnswer;
  readonly compact: Compacted;
}
