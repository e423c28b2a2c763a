/** The plain JSON that Counting rules give. */
import type { Exact, Measured } from "../premises/value.ts";
import type { Proposal } from "./presets.ts";

/** One exponent per parameter, in their order. */
export type OrderVector = readonly Exact[];

export interface CountingParameter {
  readonly id: string;
  readonly symbol: string;
  readonly latex: string;
  /** Null when it has no number. */
  readonly size: number | null;
  readonly sigma: number | null;
  readonly shown: Measured | null;
  /** What one standard deviation of each independent source does to its logarithm. */
  readonly spread: Readonly<Record<string, number>>;
  /** Its powers of the probe and the heavy scale; null where it is no power of them, and without numbers. */
  readonly follows: { readonly probe: number; readonly heavy: number } | null;
}

export interface CountedTerm {
  readonly termId: string;
  readonly latex: string;
  readonly kinetic: boolean;
  readonly allowed: boolean;
  /** Exponent of each parameter, canonical text, relative to the kinetic term; null when a rule for it is missing. */
  readonly order: readonly string[] | null;
  readonly orderLatex: OrderVector | null;
  /** Product of the parameters to these powers, relative to the kinetic term. */
  readonly size: Measured | null;
  /** Δ − measure: its order by dimension alone. */
  readonly byDimension: Exact;
  /** Places in the two sequences, equal ones alike, from 1; null where the sequence is not known. */
  readonly place: number | null;
  readonly placeByDimension: number | null;
  /** How many other terms stand on another side of it in the other sequence. */
  readonly changes: number;
}

export interface CountedGraph {
  readonly legsLatex: string;
  readonly loops: number;
  readonly lines: readonly { readonly latex: string; readonly count: number; readonly weight: OrderVector }[];
  readonly order: OrderVector;
  readonly withLegs: OrderVector;
  readonly size: Measured | null;
}

export type CountingVerdict =
  /** Orders are dimensions times one number. */
  | "just by dimension"
  /** Other numbers, the same sequence. */
  | "same sequence"
  | "another sequence"
  /** Several parameters without numbers, or dimensions left symbolic. */
  | "not comparable";

export interface CountingValue {
  readonly parameters: readonly CountingParameter[];
  readonly terms: readonly CountedTerm[];
  readonly verdict: CountingVerdict;
  /** Terms that change place. */
  readonly changed: number;
  readonly graph: CountedGraph | null;
  readonly loopWeight: OrderVector;
  /** What the published counting assumes: Lagrangian, signs, covariant derivative. */
  readonly conventions: string;
  /** Whether the rules are no longer those of the published counting. */
  readonly isEdited: boolean;
  /** Its rows, to begin rules of one's own with. */
  readonly proposal: Proposal;
}
