/** What a block's form and result see of their block: its inputs, its evaluation, and the ways to change it. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { KindName } from "#engine/kind.ts";
import { createContext, useContext } from "react";

export interface RowInputs {
  readonly id: string;
  readonly [column: string]: string;
}
/** A single field, or one column of one row. */
export type FieldPlace =
  | { readonly field: string }
  | { readonly table: string; readonly rowId: string; readonly column: string };

export interface Colleague {
  readonly name: string;
  readonly color: string;
}

export interface BlockHandle {
  readonly blockId: string;
  readonly kind: KindName;
  /** Single fields by name (also those that do not enter the key). */
  readonly fields: Readonly<Record<string, string>>;
  /** Rows by table name, in order. */
  readonly tables: Readonly<Record<string, readonly RowInputs[]>>;
  readonly readOnly: boolean;
  /** The evaluation of the inputs as they are; null until the worker has answered. */
  readonly evaluation: Evaluation | null;
  /** The newest evaluation that had a value, when `evaluation` has none: shown as "last good". */
  readonly lastGood: Evaluation | null;
  /** True while the worker is at a newer state than shown. */
  readonly pending: boolean;
  /** The Premises blocks one may stand on, and the one chosen (null: none or ambiguous). */
  readonly premisesChoices: readonly { readonly blockId: string; readonly name: string }[];
  readonly standsOn: string | null;
  setStandsOn(blockId: string): void;
  setValue(place: FieldPlace, value: string): void;
  addRow(table: string, values?: Readonly<Record<string, string>>, afterRowId?: string): string;
  removeRow(rowId: string): void;
  /** Moves a row before another, or to the end with null. */
  moveRow(table: string, rowId: string, beforeRowId: string | null): void;
  /** Shared per-person history, also from within a field. */
  undo(): void;
  redo(): void;
  /** Tells colleagues that this person is in a field (null: in none). */
  setFocus(place: FieldPlace | null): void;
  colleaguesIn(place: FieldPlace): readonly Colleague[];
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
