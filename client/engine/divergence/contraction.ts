/** Which derivatives can be contracted with which legs to make a scalar. */
import type { Theory } from "../premises/theory.ts";
import { countOf, type HalfEdges } from "./half-edges.ts";
import { isSpinor } from "./legs.ts";

const vectors = ["gauge potential", "massive vector", "massive vector, conserved current"];

export function legsThat(
  edges: HalfEdges,
  theory: Theory,
  holds: (field: Theory["fields"][number]) => boolean,
): number {
  return theory.fields.reduce((sum, field, f) => sum + (holds(field) ? countOf(edges, f) : 0), 0);
}

/**
 * Derivatives and vector indices contract in pairs, unless a gamma matrix or a fixed velocity takes one. In d = 4 a Weyl
 * spinor has one undotted index, its conjugate a dotted one, a derivative or vector one of each: of each kind there must
 * be an even number. Other spinors have both kinds and set no condition.
 */
export function contracts(legs: HalfEdges, derivatives: number, theory: Theory): boolean {
  const indices = legsThat(legs, theory, ({ kind }) => vectors.includes(kind));
  if (theory.spacetime.geometry === "anisotropic") return indices > 0 || derivatives % 2 === 0;
  const vectorIndices = derivatives + indices;
  const spinors = legsThat(legs, theory, isSpinor);
  if (spinors === 0) return vectorIndices % 2 === 0;
  const isFour = theory.spacetime.d.asRational()?.toString() === "4";
  if (!isFour || spinors > legsThat(legs, theory, ({ kind }) => kind === "Weyl spinor")) return true;
  const ofSide = (side: readonly number[]) =>
    theory.fields.reduce((sum, { kind }, f) => sum + (kind === "Weyl spinor" ? (side[f] ?? 0) : 0), 0);
  return (ofSide(legs.plain) + vectorIndices) % 2 === 0 && (ofSide(legs.conjugate) + vectorIndices) % 2 === 0;
}
