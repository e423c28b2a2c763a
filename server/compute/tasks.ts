/** What the compute threads can do: messages in, messages out, all plain data. */
import type { Evaluation, KindName, PinCounts, Postponed } from "#engine/index.ts";
import type { StoredUpdate } from "../collab/build-document.ts";
import type { Compacted } from "../collab/compaction.ts";
import type { FileOutcome } from "./evaluate-file.ts";

/** A result that need not be computed again. */
export type KnownResult = readonly [key: string, evaluation: Evaluation];

/** Evaluates the blocks of a document given as one Yjs update; long work is left out and named. */
export interface SettleTask {
  readonly task: "settle";
  readonly document: Uint8Array;
  readonly known?: readonly KnownResult[];
}
/** Evaluates one block of a document, however long it takes. */
export interface LongTask {
  readonly task: "long";
  readonly document: Uint8Array;
  readonly blockId: string;
  readonly known: readonly KnownResult[];
}
export interface LongAnswer {
  /** Null when the document has no such block. */
  readonly block: SettledBlock | null;
  readonly mistakes: readonly string[];
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
  /** For the search of the shelf; null where there was no shared document to read it from. */
  readonly words: string | null;
  readonly pins: PinCounts;
  readonly postponed: readonly Postponed[];
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
export type ComputeTask = SettleTask | LongTask | FileTask | CompactTask;
export interface ComputeAnswers {
  readonly settle: SettledDocument;
  readonly long: LongAnswer;
  readonly file: FileAnswer;
  readonly compact: Compacted;
}
