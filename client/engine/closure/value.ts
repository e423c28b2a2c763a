/** What a Closure gives: plain JSON, exact numbers as canonical text with their LaTeX beside them. */
import type { Counterterm, GraphPictures } from "../divergence/value.ts";
import type { Graph } from "../graphs/graph.ts";
import type { Exact } from "../premises/value.ts";

/**
 * Whether an operator is independent of others modulo integration by parts, equations of motion and field
 * redefinitions. "normalisation": a kinetic term, which fixes its field's normalisation.
 */
export type Independence = "independent" | "redundant" | "normalisation" | "not decided";

/** An insertion of the graph that demands an operator: a term of the premises, or an operator demanded before. */
export interface DemandingVertex {
  /** Null for an operator that the premises lack. */
  readonly termRowId: string | null;
  readonly latex: string;
  /** [g] with ultraviolet weights. */
  readonly coefficient: Exact;
  readonly count: number;
}

export interface DemandedOperator {
  /** Made of field row ids and derivatives: "f1:4/d2". */
  readonly key: string;
  readonly latex: string;
  readonly text: string;
  readonly legs: number;
  /** Legs of each field, with those of its conjugate. */
  readonly legsOf: readonly { readonly fieldRowId: string; readonly count: number }[];
  readonly derivatives: number;
  readonly timeDerivatives: number;
  readonly dimension: Exact;
  /** Order in 1/Λ at which it is first demanded. */
  readonly order: Exact;
  /** Order of the insertions of its graph: with a cutoff of the size of Λ it may be larger than `order`. */
  readonly insertionOrder: Exact;
  /** ω of its graph, and ω minus its derivatives: the power of masses, or of the cutoff, that its coefficient has. */
  readonly omega: Exact;
  readonly remainder: Exact;
  readonly loops: number;
  readonly vertices: readonly DemandingVertex[];
  /** A one-particle irreducible graph of these insertions; null past the first `MOST_DRAWN`. */
  readonly graph: Graph | null;
  readonly kinds: GraphPictures["kinds"];
  /** Row id of the premises' term of the same fields and derivatives. */
  readonly presentAs: string | null;
  /** The kinetic term, or the mass of a massive kind, that the field's kind supposes. */
  readonly supposed: boolean;
  readonly gauge: Exclude<Counterterm["gauge"], "excluded">;
  readonly independence: Independence;
  /** How many independent operators of these fields and derivatives there are; null where it is not decided. */
  readonly structures: number | null;
  /** A missing one as the premises take it: "c_1/Lambda^2 phi^6"; "" for the others. */
  readonly term: string;
}

export interface ClosedOrder {
  readonly order: Exact;
  /** Operators first demanded at this order, and those of them that the premises lack. */
  readonly demanded: number;
  readonly missing: number;
  /** How many operators the closed set has up to this order, kinetic terms aside. */
  readonly size: number;
  /** Those that enter at this order: the premises' terms, and what they lack. */
  readonly enters: readonly { readonly latex: string; readonly isNew: boolean }[];
}

export interface ClosureValue {
  readonly regulator: "dimensional regularisation" | "cutoff";
  readonly massless: boolean;
  readonly shift: readonly { readonly fieldRowId: string; readonly latex: string }[];
  readonly caps: { readonly order: Exact; readonly loops: number; readonly legs: number };
  /** Legs that operators up to the order's cap can have, when that is more than the cap. */
  readonly legsBeyond: number | null;
  /** Whether the premises have every operator that is demanded within the caps, or all but redundant ones. */
  readonly verdict: "closed" | "closed up to redundant operators" | "not closed";
  readonly missing: number;
  /** How many of the missing ones are not known to be redundant, and the lowest order of those. */
  readonly missingNotRedundant: number;
  readonly firstMissing: Exact | null;
  readonly orders: readonly ClosedOrder[];
  /** By order, then by dimension. */
  readonly operators: readonly DemandedOperator[];
  /** How often what was found had to be inserted in turn until nothing new came. */
  readonly rounds: number;
  /** How lines are drawn, in the order of the fields. */
  readonly fields: GraphPictures["fields"];
}

export const MOST_DRAWN = 150;

/** Missing, and not known to be redundant. */
export function isNeeded(
  operator: Pick<DemandedOperator, "presentAs" | "supposed" | "independence">,
): boolean {
  return isMissing(operator) && operator.independence !== "redundant";
}

/** Whether nobody wrote down what renormalisation demands. */
export function isMissing({
  presentAs,
  supposed,
}: Pick<DemandedOperator, "presentAs" | "supposed">): boolean {
  return presentAs === null && !supposed;
}
