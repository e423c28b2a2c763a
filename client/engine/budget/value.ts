/** What an Error budget gives. All numbers are in `unit`. */
import type { SourceKind } from "./inputs.ts";

export interface BudgetRow {
  readonly rowId: string;
  readonly name: string;
  readonly kind: SourceKind;
  readonly group: string;
  /** Signed: which way it moves with its group. */
  readonly size: number;
  readonly text: string;
  /** Its part of the variance, with half of each correlation; null when errors are added linearly. */
  readonly share: number | null;
}
export interface BudgetValue {
  readonly quantity: string;
  readonly unit: string;
  readonly combine: string;
  readonly value: number | null;
  readonly rows: readonly BudgetRow[];
  readonly total: number;
  readonly totalText: string;
  /** By kind, where there are several: combined among themselves. */
  readonly kinds: readonly { readonly kind: SourceKind; readonly total: number; readonly text: string }[];
  /** "1.234(12)(5) fm", one bracket for each kind; without a value "± 0.013 fm". */
  readonly sentence: string;
  /** What the brackets are, in order. */
  readonly brackets: readonly SourceKind[];
}
