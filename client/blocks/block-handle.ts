/** What a block's form and result see of their block: its inputs, its evaluation, and the ways to change it. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { KindName, Progress } from "#engine/kind.ts";
import type { BlockInstance, BlockRow } from "#engine/notebook/block-instance.ts";
import { createContext, useContext, useSyncExternalStore } from "react";

/** A single field, or one column of one row. */
export type FieldPlace =
  { readonly field: string } | { readonly table: string; readonly rowId: string; readonly column: string };

/** What becomes of typed notation and of LaTeX when a symbol is renamed; the same text where it is not used. */
export interface UseRewriting {
  readonly term: (text: string) => string;
  readonly latex: (latex: string) => string;
}
export interface UseCounts {
  /** Entries of blocks. */
  readonly entries: number;
  readonly formulas: number;
}

/** Work that takes seconds, computed apart from the other blocks. */
export type LongWorkState =
  | { readonly state: "waiting" }
  /** Null until the engine has said how far it is. */
  | { readonly state: "computing"; readonly progress: Progress | null }
  | { readonly state: "stopped" }
  | { readonly state: "failed"; readonly reason: string };

export interface Colleague {
  readonly name: string;
  readonly color: string;
}

export interface PastedGrid {
  readonly table: string;
  /** The row and column that the upper left value goes to; null for a row of its own after the last. */
  readonly rowId: string | null;
  /** Columns in the order they are shown, from the one that was pasted into. */
  readonly columns: readonly string[];
  readonly lines: readonly (readonly string[])[];
}

export interface BlockHandle {
  readonly blockId: string;
  readonly kind: KindName;
  /** Single fields by name (also those that do not enter the key). */
  readonly fields: Readonly<Record<string, string>>;
  /** Rows by table name, in order. */
  readonly tables: Readonly<Record<string, readonly BlockRow[]>>;
  readonly readOnly: boolean;
  /** The evaluation of the inputs as they are; null until the worker has answered. */
  readonly evaluation: Evaluation | null;
  /** The newest evaluation that had a value, when `evaluation` has none: shown as "last good". */
  readonly lastGood: Evaluation | null;
  /** Whether the worker is at a newer state than shown. Read by `usePending`: the form need not be drawn for it. */
  isPending(): boolean;
  /** How long work on this block stands, read by `useLongWork`; null where there is none. */
  longWork(): LongWorkState | null;
  stopLongWork(): void;
  resumeLongWork(): void;
  /** True when what computes has been stopped: the next change is tried afresh. */
  readonly stopped: boolean;
  /** The Premises blocks one may stand on, and the one chosen (null: none or ambiguous). */
  readonly premisesChoices: readonly { readonly blockId: string; readonly name: string }[];
  readonly standsOn: string | null;
  setStandsOn(blockId: string): void;
  /** The result of the premises it stands on, read by `usePremisesEvaluation`; null without. */
  premisesEvaluation(): Evaluation | null;
  /** All blocks of the notebook in document order, read by `useOtherBlocks`; the same array until one changes. */
  allBlocks(): readonly BlockInstance[];
  /** The result of any block, by its id; null while there is none. */
  evaluationOf(blockId: string): Evaluation | null;
  onResults(listener: () => void): () => void;
  setValue(place: FieldPlace, value: string): void;
  /** Adds a row after another, or at the end; gives its id. */
  addRow(table: string, values?: Readonly<Record<string, string>>, afterRowId?: string): string;
  removeRow(table: string, rowId: string): void;
  /** Moves a row before another, or to the end with null. */
  moveRow(table: string, rowId: string, beforeRowId: string | null): void;
  /** Fills rows from a place on, adding what is missing, as one step of the history. */
  paste(grid: PastedGrid): void;
  /** Puts new rows in the place of all rows of these tables, and values into fields, as one step of the history. */
  replaceRows(
    tables: Readonly<Record<string, readonly Readonly<Record<string, string>>[]>>,
    fields?: Readonly<Record<string, string>>,
  ): void;
  /** The address under which files of this notebook are kept; null in a copy that belongs to no notebook. */
  readonly files: string | null;
  /** Shared per-person history, also from within a field. */
  undo(): void;
  redo(): void;
  /** Tells colleagues that this person is in a field (null: in none). */
  setFocus(place: FieldPlace | null): void;
  /** The same array until it changes, so that it can be subscribed to. */
  colleaguesIn(place: FieldPlace): readonly Colleague[];
  onColleagues(listener: () => void): () => void;
  /** Who wrote the value that is stored now: a name, "someone" when not known, null for oneself. */
  writerOf(place: FieldPlace): string | null;
  /** Adds rows to the premises that the block stands on, as one step of the history. */
  addToPremises(table: string, rows: readonly Readonly<Record<string, string>>[]): void;
  /** For Premises: counts, or with `apply` makes, what a rewriting changes in its blocks and in the prose's formulas. */
  rewriteUses(rewriting: UseRewriting, apply: boolean): UseCounts;
  /** How many pins in the prose show a number of this block, read by `usePinCount`. */
  pinCount(): number;
  onPinCounts(listener: () => void): () => void;
  /** Selects the next of them. */
  goToNextPin(): void;
  /** Puts a pin of this scalar at the caret's last place in the prose; absent where there is no prose to pin into. */
  pin?(scalarId: string): void;
}

export const BlockHandleContext = createContext<BlockHandle | null>(null);

/** The block that the form or result is drawn in. */
export function useBlock(): BlockHandle {
  const handle = useContext(BlockHandleContext);
  if (!handle) throw new Error("a block's form and result are drawn inside a block");
  return handle;
}

export function useColleaguesIn(place: FieldPlace): readonly Colleague[] {
  const { onColleagues, colleaguesIn } = useBlock();
  return useSyncExternalStore(onColleagues, () => colleaguesIn(place));
}

export function usePending(): boolean {
  const { onResults, isPending } = useBlock();
  return useSyncExternalStore(onResults, isPending);
}

export function useLongWork(): LongWorkState | null {
  const { onResults, longWork } = useBlock();
  return useSyncExternalStore(onResults, longWork);
}

export function usePinCount(): number {
  const { onPinCounts, pinCount } = useBlock();
  return useSyncExternalStore(onPinCounts, pinCount);
}

/** For choices such as "which term of the premises". */
export function usePremisesEvaluation(): Evaluation | null {
  const { onResults, premisesEvaluation } = useBlock();
  return useSyncExternalStore(onResults, premisesEvaluation);
}

/** The blocks a reference field may name: all but the block itself. */
export function useOtherBlocks(): readonly BlockInstance[] {
  const { onResults, allBlocks, blockId } = useBlock();
  return useSyncExternalStore(onResults, allBlocks).filter(({ id }) => id !== blockId);
}

/** The result of the block that a reference field names; null for "" and while there is none. */
export function useEvaluationOf(blockId: string): Evaluation | null {
  const { onResults, evaluationOf } = useBlock();
  return useSyncExternalStore(onResults, () => evaluationOf(blockId));
}

/** A place as text: an attribute of its element, a key of maps, and what presence says. */
export function placeKey(place: FieldPlace): string {
  return "field" in place ? place.field : `${place.table}/${place.rowId}/${place.column}`;
}

export function valueAt(block: Pick<BlockHandle, "fields" | "tables">, place: FieldPlace): string {
  if ("field" in place) return block.fields[place.field] ?? "";
  return block.tables[place.table]?.find(({ id }) => id === place.rowId)?.[place.column] ?? "";
}
