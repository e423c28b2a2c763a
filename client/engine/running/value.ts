/** The plain JSON that evaluating Running gives. */
import type { Exact } from "../premises/value.ts";
import type { subjects } from "./inputs.ts";

export interface BetaRow {
  /** "lambda", "m^2", or the row of a gauge group. */
  readonly id: string;
  /** The coupling itself. */
  readonly latex: string;
  /** "16\pi^2\,\mu\,\frac{d\lambda}{d\mu}" and what it equals. */
  readonly leftLatex: string;
  readonly rightLatex: string;
}
export interface ScaleColumn {
  readonly id: string;
  /** "91.19 GeV". */
  readonly text: string;
  readonly ratio: number;
}
export interface CouplingRow {
  readonly id: string;
  readonly latex: string;
  readonly plain: string;
  readonly unit: string;
  /** One per column of scales; null from a pole on. */
  readonly values: readonly ({ readonly value: number; readonly text: string } | null)[];
}
export interface RunningPlot {
  readonly unit: string;
  readonly curves: readonly {
    readonly id: string;
    readonly label: string;
    readonly points: readonly (readonly [number, number])[];
  }[];
  readonly thresholds: readonly { readonly at: number; readonly label: string }[];
  readonly pole: { readonly at: number; readonly label: string } | null;
}
export interface FixedPointRow {
  readonly id: string;
  /** Couplings there, per power of ε: "\frac{16\pi^2}{3}\epsilon". */
  readonly couplings: readonly { readonly id: string; readonly latex: string; readonly value: number }[];
  readonly name: string;
  /** How many of the marginal directions flow away toward low energy. */
  readonly unstable: number;
  readonly exponents: readonly ExponentRow[];
  /** Terms that keep their form along the flow; others mix and have no dimension of their own. */
  readonly dimensions: readonly TermDimension[];
  /** η of each scalar field to the lowest order at which it is not zero; 2γ. */
  readonly etas: readonly {
    readonly field: string;
    readonly latex: string;
    readonly value: number;
    readonly formula: string;
  }[];
}
export interface ExponentRow {
  readonly id: string;
  /** Which operators mix in it: "\phi^{4}". */
  readonly operatorLatex: string;
  /** μ-slope of the coupling of this direction: ω for the quartic ones. */
  readonly slopeLatex: string;
  readonly slope: number;
  /** Δ = d + slope. */
  readonly dimensionLatex: string;
  readonly dimension: number;
}

/** What a term of the premises becomes at a fixed point: Δ = constant + perEpsilon · ε, fractions as text. */
export interface TermDimension {
  readonly rowId: string;
  readonly constant: string;
  readonly perEpsilon: string;
}
/** How the coupling of a term in d = 4 moves with the scale at one loop; null where its sign depends on values. */
export interface TermDrift {
  readonly rowId: string;
  readonly drift: "grows with energy" | "fades with energy" | "stays" | null;
}

export interface RunningValue {
  readonly about: (typeof subjects)[number];
  readonly betas: readonly BetaRow[];
  /** What running makes that no term has. */
  readonly generated: readonly { readonly operatorLatex: string; readonly slopeLatex: string }[];
  readonly scales: readonly ScaleColumn[];
  readonly couplings: readonly CouplingRow[];
  readonly pole: {
    readonly text: string;
    readonly latex: string;
    readonly value: number;
    readonly unit: string;
  } | null;
  readonly plot: RunningPlot | null;
  /** Dimension of spacetime where the marginal couplings are marginal. */
  readonly critical: 4 | 3;
  readonly epsilon: Exact | null;
  readonly fixedPoints: readonly FixedPointRow[];
  readonly drifts: readonly TermDrift[];
  /** Rows of the premises' terms whose couplings run here. */
  readonly termRows: readonly string[];
}
