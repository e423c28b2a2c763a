/** What a Truncation error block gives; all numbers are floats of 12 digits. */
import type { CurveValue } from "./curve-value.ts";
import type { Method, Omitted } from "./shape.ts";

export interface Degree {
  /** As typed, "68" or "68.27": the key of a pin. */
  readonly text: string;
  /** Two-sided, between 0 and 1: 0.68. */
  readonly probability: number;
}

/** One estimate: X ± halfWidth. */
export interface Band {
  readonly method: Method;
  readonly omitted: Omitted;
  /** `Degree.text`; null for the two methods that state no probability. */
  readonly degree: string | null;
  readonly halfWidth: number;
  /** How far the half-width moves when Q moves by its standard uncertainty; 0 when Q has none. */
  readonly fromQ: number;
}

/** X through one order, and what the methods say was left out, knowing only the orders up to it. */
export interface OrderEstimate {
  readonly rowId: string;
  readonly order: number;
  readonly value: number;
  /** The next order that exists: the first omitted one. */
  readonly nextOrder: number;
  /** n_c, the number of coefficients used. */
  readonly coefficientCount: number;
  /** c̄, the largest of them in size; null when there are none. */
  readonly largest: number | null;
  /** ν and τ² of the conjugate method; null when it has neither prior nor data. */
  readonly posterior: { readonly nu: number; readonly tau2: number } | null;
  /** Those that exist here, in the order of the methods, then degrees; a method missing here is refused. */
  readonly bands: readonly Band[];
}

export interface Coefficient {
  readonly rowId: string;
  readonly order: number;
  /** c_n; null for an order absent by symmetry. */
  readonly value: number | null;
  readonly used: boolean;
}

export interface TruncationValue {
  readonly unit: string;
  /** X_ref. */
  readonly reference: number;
  readonly q: { readonly value: number; readonly sigma: number; readonly latex: string };
  readonly degrees: readonly Degree[];
  readonly coefficients: readonly Coefficient[];
  /** By rising order; the last is the block's answer. */
  readonly orders: readonly OrderEstimate[];
  /** The band to draw attention to, at the first degree of belief; null when that method is refused. */
  readonly highlighted: Band | null;
  /** The last order's estimates if Q² were the expansion parameter of the same numbers; null when it underflows. */
  readonly rescaled: { readonly q: number; readonly bands: readonly Band[] } | null;
  /** What the prior sets were integrated with, when they are shown; `terms` null sums what `Band.omitted` says. */
  readonly sets: PriorSettings | null;
  /** Along x; null when the orders are typed for one point. Everything above is then at `curve.at`. */
  readonly curve: CurveValue | null;
}

export interface PriorSettings {
  readonly low: number;
  readonly high: number;
  readonly sigma: number;
  readonly terms: number | null;
}
