/**
 * Retarded propagators: Schrödinger and static fields run only forward in time, so where their number is conserved a
 * closed loop of them vanishes in vacuum, and no vertex can meet more of them at once than come in from outside.
 */
import type { Theory } from "../premises/theory.ts";
import type { HalfEdges } from "./half-edges.ts";

/** Whether the field's propagator runs forward in time only. */
export function isRetarded(field: Theory["fields"][number]): boolean {
  return !field.selfConjugate && (field.kind === "Schrödinger field" || field.kind === "static heavy field");
}

function incoming(edges: HalfEdges, fields: readonly number[]): number {
  return fields.reduce((sum, f) => sum + (edges.plain[f] ?? 0), 0);
}
function outgoing(edges: HalfEdges, fields: readonly number[]): number {
  return fields.reduce((sum, f) => sum + (edges.conjugate[f] ?? 0), 0);
}

/**
 * Whether every graph with these vertices and legs vanishes in vacuum. Number conservation is required of each vertex;
 * it is used for all retarded fields together and for each one that every vertex conserves by itself.
 *
 * @example one (ψ†ψ)² vertex with legs ψ†ψ: two particles would have to meet where only one came in; vanishes.
 */
export function vanishesInVacuum(
  vertices: readonly { readonly edges: HalfEdges }[],
  legs: HalfEdges,
  theory: Theory,
): boolean {
  const retarded = theory.fields.flatMap((field, f) => (isRetarded(field) ? [f] : []));
  return [retarded, ...retarded.map((f) => [f])].some((fields) => {
    const conserved = vertices.every(({ edges }) => incoming(edges, fields) === outgoing(edges, fields));
    return conserved && vertices.some(({ edges }) => incoming(edges, fields) > incoming(legs, fields));
  });
}
