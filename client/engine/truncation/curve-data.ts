/** Predictions order by order along a variable x, as the estimates along x take them. */

export interface CurveOrder {
  readonly order: number;
  /** X through this order at each x; null where it is not given. */
  readonly values: readonly (number | null)[];
}

export interface CurveData {
  /** What x is called in its table: "p". */
  readonly xName: string;
  readonly xUnit: string;
  readonly unit: string;
  /** Whether the columns of X have different units. */
  readonly unitsDiffer: boolean;
  /** Shape of all lists below: one entry for each x, rising. */
  readonly x: readonly number[];
  /** Rising; at least one. */
  readonly orders: readonly CurveOrder[];
  /** Orders whose column is empty: absent by symmetry. */
  readonly absent: readonly number[];
  /** X_ref at each x, when the table gives it. */
  readonly reference: readonly (number | null)[] | null;
  readonly measured: readonly (number | null)[] | null;
  /** Standard uncertainty of the measured values. */
  readonly measuredError: readonly (number | null)[] | null;
  /** The step of the last digit in which the predictions are given: 0.01 for "10.63". 0 when they are exact enough. */
  readonly resolution: number;
}

/** Another block's data, as a reference field gives it. */
export interface CurveSource {
  /** Title of the block. */
  readonly name: string;
  readonly data: CurveData;
}

/** At most `most` places of a list of `count`, evenly spread with both ends. */
export function evenly(count: number, most: number): number[] {
  if (count <= most) return Array.from({ length: count }, (_, index) => index);
  return Array.from({ length: most }, (_, index) => Math.round((index * (count - 1)) / (most - 1)));
}
