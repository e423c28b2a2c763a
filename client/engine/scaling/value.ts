/** The plain JSON that evaluating Scaling gives. */
import type { Exact, Measured } from "../premises/value.ts";

export type ScalingClass = "relevant" | "marginal" | "irrelevant";

export type Marginally = "marginally relevant" | "marginally irrelevant" | "exactly marginal at one loop";

/** Where a term has one class, as the free dimension runs over (from, to), ends excluded; null: unbounded. */
export interface ClassRange {
  readonly from: string | null;
  readonly to: string | null;
  readonly scalingClass: ScalingClass;
}

export interface ScalingRow {
  readonly rowId: string;
  readonly latex: string;
  readonly kinetic: boolean;
  readonly allowed: boolean;
  /** Operator dimension Δ. */
  readonly dimension: Exact;
  /** Dimension of the whole coefficient, which is also the exponent of s that it picks up under x = s x′. */
  readonly coefficient: Exact;
  /** Null when it depends on the free dimension: see `ranges`. */
  readonly scalingClass: ScalingClass | null;
  /** What one loop says of a marginal term; null when it says nothing or was not asked. */
  readonly marginally: Marginally | null;
  readonly dimensionFrom: "fields" | "fixed point";
  /** Value of the free dimension where the term is marginal, "8/3"; null if there is no free dimension or no such value. */
  readonly marginalAt: string | null;
  readonly ranges: readonly ClassRange[];
  /** Relative size at the probe scale; null when p, Λ or the dimension has no number. */
  readonly size: Measured | null;
  /** Size as LaTeX formula: "(p/\Lambda)^{2}". */
  readonly sizeLatex: string;
  readonly sizeFrom: "dimension" | "assigned" | "naive dimensional analysis";
}

/** Size against probe scale for a log-log plot; x in `unit`, equally spaced in its logarithm. */
export interface ScalingPlot {
  readonly unit: string;
  readonly probe: Measured;
  readonly heavy: Measured;
  readonly curves: readonly {
    readonly rowId: string;
    readonly latex: string;
    readonly scalingClass: ScalingClass | null;
    readonly points: readonly (readonly [number, number])[];
  }[];
}

export interface ScalingValue {
  readonly counting: "natural size" | "naive dimensional analysis";
  /** "d", "D" or "z" when exactly one dimension is left symbolic. */
  readonly freeDimension: string | null;
  readonly probe: { readonly latex: string; readonly size: Measured | null } | null;
  readonly heavy: { readonly latex: string; readonly size: Measured | null } | null;
  /** Q = p/Λ. */
  readonly expansion: Measured | null;
  /** What Λ stands for under the coupling assumption, prose that may hold $…$; "" when not stated. */
  readonly meaningOfHeavy: string;
  readonly rows: readonly ScalingRow[];
  readonly plot: ScalingPlot | null;
}
