/** The plain JSON that evaluating premises gives. Nothing in it depends on titles and notes, which enter no key. */
import type { FieldKind, ScaleRole } from "./theory.ts";

/** An exact number or linear form: canonical text, and the same as LaTeX. */
export interface Exact {
  readonly text: string;
  readonly latex: string;
}

/** A float rounded to 12 digits with standard uncertainty, as shown: "0.109(14)", "3.2(4) TeV". */
export interface Measured {
  readonly value: number;
  readonly sigma: number;
  readonly unit: string;
  readonly text: string;
}

export interface PremisesValue {
  readonly geometry: "isotropic" | "anisotropic";
  /** "d = 4", "D = 3,\; z = 2" as LaTeX. */
  readonly spacetimeLatex: string;
  /** Weight of the measure: d, or D + z. */
  readonly measure: Exact;
  readonly symmetries: readonly { readonly rowId: string; readonly name: string; readonly group: string }[];
  readonly fields: readonly {
    readonly rowId: string;
    readonly symbol: string;
    readonly latex: string;
    readonly kind: FieldKind;
    readonly statistics: "boson" | "fermion";
    readonly dimension: Exact;
    /** Ultraviolet weight, propagator ~ p^(2δ − d). */
    readonly weight: Exact;
    readonly overridden: boolean;
    /** One per symmetry, canonical text. */
    readonly charges: readonly string[];
  }[];
  readonly scales: readonly {
    readonly rowId: string;
    readonly symbol: string;
    readonly latex: string;
    readonly role: ScaleRole;
    /** Null when the scale has no number. */
    readonly size: Measured | null;
  }[];
  readonly terms: readonly {
    readonly rowId: string;
    /** "Reads as": the term as understood. */
    readonly latex: string;
    readonly dimension: Exact;
    readonly coefficient: Exact;
    readonly ultravioletCoefficient: Exact;
    readonly kinetic: boolean;
    readonly allowed: boolean;
    /** Names of the symmetries that forbid it. */
    readonly forbiddenBy: readonly string[];
    /** Null when its text is in error. */
    readonly natural: number | null;
    readonly assigned: Measured | null;
  }[];
}
