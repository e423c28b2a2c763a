/** A table as other blocks read it. */
import type { ColumnRole } from "./inputs.ts";

export interface DataColumn {
  readonly rowId: string;
  readonly name: string;
  readonly role: ColumnRole;
  readonly unit: string;
  /** Of a column of predictions. */
  readonly order: number | null;
}

export interface DataValue {
  readonly columns: readonly DataColumn[];
  /** One for each line, one entry for each column: a decimal as it was written, or null where there is none. */
  readonly rows: readonly (readonly (string | null)[])[];
}
