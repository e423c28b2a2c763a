/** Reads the typed vertices and legs of one graph, and refuses in words what no connected graph can have. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { readTerm } from "../notation/read-term.ts";
import type { Theory } from "../premises/theory.ts";
import { degreeOf, type Degree, type GraphParts } from "./degree.ts";
import { graphExists } from "./graph-existence.ts";
import {
  addHalfEdges,
  conjugated,
  countOf,
  halfEdgesOf,
  noHalfEdges,
  totalOf,
  type HalfEdges,
} from "./half-edges.ts";
import type { DivergenceInputs } from "./inputs.ts";

/** Larger graphs have the same degree formula, but their connectedness would take long to settle. */
export const MOST_OF_A_KIND = 60;

export type ReadGraph =
  | { readonly ok: true; readonly graph: GraphParts; readonly degree: Degree }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/** The tables of any block that asks for one graph. */
export type TypedGraph = Pick<DivergenceInputs, "vertices" | "legs">;

export function readGraph(inputs: TypedGraph, theory: Theory): ReadGraph {
  const problems: Problem[] = [];
  const vertices = readVertices(inputs, theory, problems);
  const legs = readLegs(inputs, theory, problems);
  if (problems.length === 0 && vertices.length === 0) {
    problems.push({ code: "graph-without-vertices", path: ["vertices"], facts: {} });
  }
  if (problems.length > 0) return { ok: false, problems };
  const graph: GraphParts = { vertices, legs };
  const degree = degreeOf(graph, theory);
  const refusal = refuse(graph, degree, theory);
  return refusal ? { ok: false, problems: [refusal] } : { ok: true, graph, degree };
}

/** A whole number from 1 to the most allowed; anything else is a problem at its place. */
function readCount(text: string, table: string, rowId: string, problems: Problem[]): number | null {
  const typed = text.trim();
  const count = /^\d{1,6}$/.test(typed) ? Number(typed) : 0;
  if (count >= 1 && count <= MOST_OF_A_KIND) return count;
  problems.push({
    code: "count-unreadable",
    path: [table, rowId, "count"],
    facts: { text, most: MOST_OF_A_KIND },
  });
  return null;
}

function readVertices(inputs: TypedGraph, theory: Theory, problems: Problem[]): GraphParts["vertices"] {
  const found = new Map<string, GraphParts["vertices"][number]>();
  for (const row of inputs.vertices) {
    if (row.term === "") continue;
    const count = readCount(row.count, "vertices", row.id, problems);
    const term = theory.terms.find(({ rowId }) => rowId === row.term);
    const edges = term ? halfEdgesOf(term.monomial, theory) : null;
    const path = ["vertices", row.id, "term"];
    if (!term || !edges) problems.push({ code: "vertex-unknown", path, facts: { text: row.term } });
    else if (term.kinetic) problems.push({ code: "vertex-kinetic", path, facts: { latex: term.latex } });
    else if (totalOf(edges) === 0)
      problems.push({ code: "vertex-without-fields", path, facts: { latex: term.latex } });
    else if (count !== null) {
      found.set(term.rowId, { term, edges, count: count + (found.get(term.rowId)?.count ?? 0) });
    }
  }
  return [...found.values()];
}

function readLegs(inputs: TypedGraph, theory: Theory, problems: Problem[]): HalfEdges {
  let legs = noHalfEdges(theory);
  for (const row of inputs.legs) {
    if (row.field.trim() === "") continue;
    const count = readCount(row.count, "legs", row.id, problems);
    const written = readLeg(row.field, theory);
    if (!written) {
      problems.push({ code: "leg-unknown", path: ["legs", row.id, "field"], facts: { text: row.field } });
      continue;
    }
    const other = conjugated(written, theory);
    if (row.leg !== "conjugate") legs = addHalfEdges(legs, written, count ?? 0);
    if (row.leg !== "field") legs = addHalfEdges(legs, other, count ?? 0);
  }
  return legs;
}

/** One field as it is written in a term: "phi", "\psi", "psibar", "phi^\dagger"; null for anything else. */
function readLeg(text: string, theory: Theory): HalfEdges | null {
  const fields = theory.fields.map(
    ({ symbol, selfConjugate }) => [symbol, { selfConjugate, inError: false, strength: false }] as const,
  );
  const read = readTerm(text, {
    geometry: theory.spacetime.geometry,
    fields: new Map(fields),
    scales: new Set(),
  });
  if (!read.ok) return null;
  const { monomial } = read.value;
  const edges = halfEdgesOf(monomial, theory);
  const isBare =
    monomial.coefficients.length === 0 &&
    monomial.prefactor.equals(Rational.one) &&
    monomial.derivatives + monomial.timeDerivatives === 0;
  return edges && totalOf(edges) === 1 && isBare ? edges : null;
}

/** The reason why no connected graph has these vertices and legs; null when one has. */
function refuse({ vertices, legs }: GraphParts, { lines, loops }: Degree, theory: Theory): Problem | null {
  const ends = vertices.reduce(
    (sum, { edges, count }) => addHalfEdges(sum, edges, count),
    noHalfEdges(theory),
  );
  for (const [f, field] of theory.fields.entries()) {
    const facts = {
      symbol: field.symbol,
      latex: field.latex,
      ends: countOf(ends, f),
      legs: countOf(legs, f),
    };
    const internal = lines[f] ?? 0;
    if (internal < 0) return { code: "graph-too-many-legs", path: ["legs"], facts };
    if (!Number.isInteger(internal)) return { code: "graph-half-line", path: ["legs"], facts };
  }
  const vertexCount = vertices.reduce((sum, { count }) => sum + count, 0);
  if (loops < 0) {
    const internal = lines.reduce((sum, count) => sum + count, 0);
    return {
      code: "graph-unconnected",
      path: ["vertices"],
      facts: { lines: internal, vertices: vertexCount, needed: vertexCount - 1 },
    };
  }
  const existence = graphExists(vertices, legs, lines, theory);
  if (existence === "lines do not close") {
    return {
      code: "graph-charge",
      path: ["legs"],
      facts: { symbols: directedSymbols(vertices, legs, theory) },
    };
  }
  return existence === "falls apart" ? { code: "graph-falls-apart", path: ["vertices"], facts: {} } : null;
}

/** Fields with a direction that take part: the ones whose number the legs or vertices fail to conserve. */
function directedSymbols(vertices: GraphParts["vertices"], legs: HalfEdges, theory: Theory): string {
  const taking = (f: number) => countOf(legs, f) > 0 || vertices.some(({ edges }) => countOf(edges, f) > 0);
  return theory.fields
    .filter((field, f) => !field.selfConjugate && taking(f))
    .map(({ symbol }) => symbol)
    .join(", ");
}
