/**
 * What an Order plan says: plain JSON. Orders are exact powers of Q = p/Λ as text; sizes are floats relative to the
 * leading amplitude (or rate), rounded to 12 digits.
 */
import type { PlanLattice } from "./lattice.ts";
import type { Exact } from "../premises/value.ts";

export interface Measured {
  readonly value: number;
  /** Standard uncertainty; 0 when none is stated. */
  readonly sigma: number;
}

/** A scale as used, in `unit`. */
export interface PlanScale extends Measured {
  readonly latex: string;
  readonly unit: string;
}

/** Room for several parameters: this version always gives one, Q = p/Λ. */
export interface ExpansionParameter extends Measured {
  readonly latex: string;
}

/** One term or product of terms: of an amplitude, or of a rate when that is the observable. */
export interface PlanEntry {
  /** Row ids joined by "*" for repeated insertions: "r4", "r4*r4"; in a rate "r4|r4" is |A|² and "r4|" interference. */
  readonly id: string;
  readonly latex: string;
  /** One exponent per expansion parameter. */
  readonly order: readonly Exact[];
  readonly size: number;
  /** How often each term is inserted. */
  readonly insertions: readonly { readonly termRowId: string; readonly count: number }[];
  /** "insertion": in an amplitude; "interference", "square": in a rate. */
  readonly role: "insertion" | "interference" | "square";
  /** True when a size given by hand enters. */
  readonly assigned: boolean;
}

export interface PlanOrder {
  readonly order: readonly Exact[];
  /** Entries of exactly this order, largest first; of long lists the largest 40. */
  readonly entries: readonly PlanEntry[];
  /** How many there are. */
  readonly count: number;
  /** Sum of the entries' sizes. */
  readonly sum: number;
  /** What is left out when one stops here: listed entries beyond, and the estimate of unlisted ones. */
  readonly leftOut: { readonly listed: number; readonly unlisted: number; readonly used: number };
  /** Largest p (in the probe's unit) at which stopping here meets the target. */
  readonly largestProbe: number;
  /** True when the target is met up to Q = 1, the end of the expansion, so that `largestProbe` is Λ. */
  readonly largestProbeIsHeavy: boolean;
  /**
   * Loops that go with this order. `insertions`: the most that its suppressed insertions can close by themselves.
   * `needed`: the fewest after which one loop more, at `loopFactor`, falls below the target; never more than
   * `insertions` when no leading interaction closes loops; null when leading ones do and d is not a whole number.
   */
  readonly loops: { readonly insertions: number; readonly needed: number | null };
  readonly included: boolean;
  /** Independent operators of mass dimension d + order, in digits, where a Basis count says; null outside its range. */
  readonly operators?: string | null;
}

export interface Shift {
  /** Which scale moved, and how: "p + σ". */
  readonly what: "probe up" | "probe down" | "heavy up" | "heavy down";
  readonly Q: number;
  /** The order to stop at then; null when the listed terms do not reach the target or Q ≥ 1. */
  readonly order: Exact | null;
  readonly leftOut: number | null;
}

export interface ProbeRow {
  readonly probe: number;
  readonly Q: number;
  readonly order: Exact | null;
  readonly leftOut: number | null;
}

/** One curve: the sum left out against p when one stops at `order`. */
export interface LeftOutCurve {
  readonly order: Exact;
  readonly points: readonly { readonly probe: number; readonly leftOut: number }[];
}

export interface OrderPlanValue {
  readonly parameters: readonly ExpansionParameter[];
  readonly probe: PlanScale;
  readonly heavy: PlanScale;
  readonly target: number;
  readonly observable: "amplitude" | "rate with interference" | "rate without interference";
  /** Which sum decides: listed terms with the natural tail, or listed terms only. */
  readonly sumUsed: "natural tail" | "listed terms only";
  /** The order to stop at; null when the listed terms do not reach the target. */
  readonly order: Exact | null;
  /** What is left out at that order (or at the highest order, when the target is not reached). */
  readonly leftOut: {
    readonly listed: number;
    readonly unlisted: number;
    readonly used: number;
    /** Standard uncertainty of `used` from p, Λ and sizes given by hand. */
    readonly sigma: number;
  };
  /** First entry left out among the listed ones; null when all are in. */
  readonly firstOut: PlanEntry | null;
  /** First order at which no new term is listed, and its natural size: where the tail begins. */
  readonly firstUnlisted: { readonly order: Exact; readonly size: number };
  /** Distance between the orders at which unlisted terms may exist, from fields and symmetries. */
  readonly step: Exact;
  /** Of the order to stop at, in the probe's unit; of the highest order when the target is not reached. */
  readonly largestProbe: number;
  readonly largestProbeIsHeavy: boolean;
  /** Ascending; order 0 first. */
  readonly orders: readonly PlanOrder[];
  /** Size of one loop, 1/((4π)^{d/2} Γ(d/2)), with couplings of 1; null when d is not a number. */
  readonly loopFactor: number | null;
  /** Each counted term on its own: its order, its size at p, and whether the size was given by hand. */
  readonly terms: readonly {
    readonly rowId: string;
    readonly latex: string;
    readonly order: Exact;
    readonly size: number;
    readonly assigned: boolean;
  }[];
  /** Orders of an amplitude in the parameters of a Counting rules block; null when they have no numbers below 1. */
  readonly lattice?: PlanLattice | null;
  readonly shifts: readonly Shift[];
  readonly probeTable: readonly ProbeRow[];
  readonly curves: readonly LeftOutCurve[];
}
