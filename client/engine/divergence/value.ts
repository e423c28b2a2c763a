/**
 * What a Divergence block says: plain JSON, exact numbers as canonical text with their LaTeX beside them.
 * Degrees and dimensions are linear forms in d (or D and z): text "4 - …", "d - 4", "1/2".
 */

import type { Graph } from "../graphs/graph.ts";
import type { Exact } from "../premises/value.ts";

/** Convergence of one graph: "tree" has no loop integral at all; "depends" when d, D or z is a symbol. */
export type Verdict = "tree" | "convergent" | "logarithmic" | "power" | "depends";

export interface LegCount {
  readonly fieldRowId: string;
  readonly symbol: string;
  /** Legs of the field itself and, for fields that are not their own conjugate, of the conjugate. */
  readonly count: number;
  readonly conjugateCount: number;
}

export interface Legs {
  /** Made of field row ids: "f1:2,f2:1:1" (two legs of f1, one of f2 and one of its conjugate); "vacuum" for none. */
  readonly key: string;
  /** The legs as a product of fields, "\\phi^{2}\\bar{\\psi}\\psi"; "1" for the vacuum. */
  readonly latex: string;
  /** Plain words for screen readers: "phi^2 psibar psi", "vacuum". */
  readonly text: string;
  readonly total: number;
  readonly fields: readonly LegCount[];
}

export interface Counterterm {
  /** The operator's fields and derivatives: "\\partial^{2}\\phi^{2}". */
  readonly latex: string;
  readonly text: string;
  readonly derivatives: number;
  readonly timeDerivatives: number;
  /** ω minus the weight of the derivatives: the power of masses (or of a cutoff) that makes up the rest of the dimension. */
  readonly massPower: Exact;
  /** Whether masses can do so analytically (m², or m with fermions): only then can it be a pole. Else only a cutoff power. */
  readonly analytic: boolean;
  /** Dimension of the operator, and of its coefficient (measure − Δ). */
  readonly dimension: Exact;
  readonly coefficient: Exact;
  /** Order in 1/Λ at which its coefficient enters naturally: max(0, Δ − measure). */
  readonly order: Exact;
  /** The field's own kinetic term, or the mass of a massive kind: its kind supposes it, written down or not. */
  readonly kinetic: boolean;
  /** Row id of the premises' term of the same fields and derivatives; null when nobody wrote it down. */
  readonly presentAs: string | null;
  /** False when a symmetry of the premises forbids it. */
  readonly allowed: boolean;
  /** Legs of gauge potentials: gauge invariance restricts it, or excludes it (only such legs, too few derivatives). */
  readonly gauge: "none" | "restricted" | "excluded";
}

export interface GraphVertex {
  readonly termRowId: string;
  readonly latex: string;
  readonly count: number;
  /** Ultraviolet dimension [g] of the coefficient, and weight k of the derivatives. */
  readonly coefficient: Exact;
  readonly derivatives: Exact;
}

export interface InternalLine {
  readonly fieldRowId: string;
  readonly latex: string;
  readonly count: number;
  /** δ_f. */
  readonly weight: Exact;
}

/** What the degree means in a regulator. */
export type Meaning =
  /** No loop. */
  | "tree"
  /** ω < 0: the overall integral converges; subgraphs may not. */
  | "convergent"
  /** Dimensional regularisation: a pole, with the counterterms listed. */
  | "pole"
  /** Dimensional regularisation: no pole, d and L odd. */
  | "no pole: odd dimension, odd loops"
  /** No local operator with analytic coefficients has the right dimension. */
  | "no pole: no analytic counterterm"
  /** Schrödinger propagators: D·L odd after the energy integrals. */
  | "no pole: Schrödinger, odd D·L"
  /** A closed loop of retarded propagators: zero in vacuum. */
  | "vanishes: retarded loop"
  | "logarithm of the cutoff"
  | "powers of the cutoff"
  | "powers and a logarithm of the cutoff"
  | "depends";

export interface GraphDivergence {
  readonly mode: "one graph";
  readonly legs: Legs;
  readonly vertices: readonly GraphVertex[];
  readonly lines: readonly InternalLine[];
  readonly loops: number;
  readonly omega: Exact;
  /** The two ways with this graph's numbers, as LaTeX: "\\omega = 4\\cdot 1 - 2\\cdot 2 = 0", "\\omega = 4 - 4\\cdot 1 - 2\\cdot 0 = 0". */
  readonly byMomenta: string;
  readonly byDimensions: string;
  readonly verdict: Verdict;
  /** For symbolic d alone: the dimension where ω = 0, and whether ω grows with d. Null otherwise. */
  readonly logarithmicAt: {
    readonly symbol: "d" | "D" | "z";
    readonly value: Exact;
    readonly growsAbove: boolean;
  } | null;
  readonly dimensional: Meaning;
  readonly cutoff: Meaning;
  /** Highest power of the cutoff, when ω is a number > 0. */
  readonly cutoffPower: Exact | null;
  readonly counterterms: readonly Counterterm[];
  /** The graphs themselves; null above six loops, ten legs, twelve vertices or four of them with a single leg. */
  readonly pictures: GraphPictures | null;
}

export type LineStyle = "solid" | "dashed" | "dotted" | "wavy" | "curly" | "double" | "double wavy";
export type VertexMark = "vertex" | "insertion" | "counterterm";

/** A one-particle irreducible subgraph with ω ≥ 0. */
export interface NestedDivergence {
  /** Indices of its vertices in the graph. */
  readonly vertices: readonly number[];
  readonly lines: number;
  readonly loops: number;
  readonly omega: Exact;
  /** How many choices among equal lines give it. */
  readonly ways: number;
}

export interface GraphPicture extends Graph {
  /** Null when the degrees are no numbers, or the graph has too many choices of lines to look at. */
  readonly nested: readonly NestedDivergence[] | null;
}

export interface GraphPictures {
  /** False when no graph is one-particle irreducible: then all connected ones are listed. */
  readonly irreducible: boolean;
  /** Graphs found and not left out. */
  readonly count: number;
  /** Whether legs of one field are told apart; else they are interchangeable. */
  readonly labelled?: boolean;
  /** What was asked to be left out: "nothing", "closed lines" or "tadpole parts". Absent from older results. */
  readonly leftOut?: string;
  /** How many graphs found cancel by charge conjugation and are left out; null when that was not asked for. */
  readonly cancelled?: number | null;
  /** False when the search was cut short: there are more than `count`. */
  readonly complete: boolean;
  readonly fields: readonly {
    readonly symbol: string;
    readonly latex: string;
    readonly style: LineStyle;
    readonly directed: boolean;
  }[];
  readonly kinds: readonly {
    readonly termRowId: string;
    readonly latex: string;
    readonly mark: VertexMark;
  }[];
  /** The first of them. */
  readonly list: readonly GraphPicture[];
}

/** "divergent": ω ≥ 0 and a graph exists. The rest have ω ≥ 0 by their legs but no graph makes them. */
export type AmplitudeStatus =
  | "divergent"
  | "forbidden by symmetry"
  | "forbidden by fermion parity"
  | "no graph within the caps"
  /** Every graph has a closed loop of retarded propagators. */
  | "vanishes in vacuum";

export interface AmplitudeAtOrder {
  /** Order in 1/Λ: Σ V max(0, −[g]). */
  readonly order: Exact;
  readonly omega: Exact;
  /** Fewest loops at which this degree is reached, and the vertices that reach it, "2 × (r1) + …" as counts. */
  readonly loops: number;
  readonly vertices: readonly {
    readonly termRowId: string;
    readonly latex: string;
    readonly count: number;
  }[];
}

export interface Amplitude {
  readonly legs: Legs;
  readonly status: AmplitudeStatus;
  /** Name of the symmetry that forbids it. */
  readonly forbiddenBy: string | null;
  /** Largest degree within the caps; for an amplitude without a graph, the bound by its legs alone. */
  readonly omega: Exact;
  readonly verdict: "logarithmic" | "power";
  /** Largest degree at each order in 1/Λ within the caps that has a divergent graph, ascending. */
  readonly atOrders: readonly AmplitudeAtOrder[];
  /** Counterterms of the largest degree. */
  readonly counterterms: readonly Counterterm[];
}

export type TheoryVerdict =
  | "free"
  | "super-renormalisable"
  | "renormalisable"
  | "infinitely many divergent amplitudes"
  | "new terms at every order";

export interface VerdictRange {
  /** What runs: d, or D or z of an anisotropic theory. */
  readonly symbol: "d" | "D" | "z";
  /** A single dimension (from = to) or an open interval; null is no bound. */
  readonly from: Exact | null;
  readonly to: Exact | null;
  readonly verdict: TheoryVerdict;
}

export interface TheoryDivergence {
  readonly mode: "whole theory";
  /** Null when d, D or z is a symbol: then `ranges` says where each verdict holds. */
  readonly verdict: TheoryVerdict | null;
  readonly ranges: readonly VerdictRange[];
  /** The interactions with their ultraviolet coefficient dimension. */
  readonly couplings: readonly {
    readonly termRowId: string;
    readonly latex: string;
    readonly coefficient: Exact;
  }[];
  /** Divergent ones first, by number of legs. Empty when d, D or z is a symbol. */
  readonly amplitudes: readonly Amplitude[];
  /** Counterterms that symmetries allow and the premises lack, without repetition, by order in 1/Λ. */
  readonly missing: readonly Counterterm[];
  /** At each order n in 1/Λ within the caps: no divergence needs an operator of dimension above measure + n. */
  readonly bounds: readonly { readonly order: Exact; readonly largestDimension: Exact }[];
  /** False when an interacting field has δ ≤ 0: then each order has infinitely many divergent amplitudes. */
  readonly finitelyManyPerOrder: boolean | null;
  readonly caps: { readonly loops: number; readonly legs: number; readonly order: Exact };
}

export type DivergenceValue = GraphDivergence | TheoryDivergence;
