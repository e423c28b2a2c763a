/** What a reader should know beside a degree of divergence: it is a bound, and why. */
import type { Notice } from "../evaluation.ts";
import type { Theory } from "../premises/theory.ts";
import { countOf, type HalfEdges } from "./half-edges.ts";
import { isSpinor } from "./legs.ts";

function caution(code: string, facts: Notice["facts"] = {}): Notice {
  return { code, path: [], facts };
}

function hasLeg(
  legs: HalfEdges,
  theory: Theory,
  holds: (field: Theory["fields"][number]) => boolean,
): boolean {
  return theory.fields.some((field, f) => holds(field) && countOf(legs, f) > 0);
}

/** Symmetries that commonly take powers away from amplitudes with these legs. */
export function symmetryCautions(legs: HalfEdges, theory: Theory): Notice[] {
  return [
    ...(hasLeg(legs, theory, ({ kind }) => kind === "gauge potential" || kind === "metric fluctuation")
      ? [caution("omega-gauge")]
      : []),
    ...(hasLeg(legs, theory, ({ kind }) => kind === "ghost") ? [caution("omega-ghost")] : []),
    ...(hasLeg(legs, theory, isSpinor) ? [caution("omega-chiral")] : []),
    ...(hasLeg(legs, theory, ({ kind }) => kind === "real scalar" || kind === "complex scalar")
      ? [caution("omega-shift")]
      : []),
  ];
}

export interface CautionFacts {
  readonly sign: -1 | 0 | 1 | null;
  readonly loops: number;
  readonly legs: HalfEdges;
  readonly vertexCount: number;
  /** Fewest legs of any vertex. */
  readonly fewestLegs: number;
  readonly vanishes: boolean;
}

export function graphCautions(facts: CautionFacts, theory: Theory): Notice[] {
  if (facts.loops === 0) return [caution("graph-tree")];
  const found: Notice[] = [];
  if (facts.fewestLegs < 2) found.push(caution("graph-reducible"));
  if (facts.vanishes) found.push(caution("graph-retarded"));
  if (facts.vertexCount === 1) found.push(caution("graph-closed-line"));
  if (facts.sign !== null && facts.sign < 0) found.push(caution("omega-subgraphs"));
  else found.push(caution("omega-not-sufficient"), ...symmetryCautions(facts.legs, theory));
  return found;
}
