/** Laws that hold for every graph, on random theories. The cases are seeded, so that a failure can be found again. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { degreeOf, type GraphParts } from "#engine/divergence/degree.ts";
import { graphExists, internalLines } from "#engine/divergence/graph-existence.ts";
import {
  addHalfEdges,
  countOf,
  halfEdgesOf,
  noHalfEdges,
  type HalfEdges,
} from "#engine/divergence/half-edges.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { theoryOf, type TheorySketch } from "../theory-builder.ts";

const kinds = { a: "real scalar", b: "complex scalar", c: "Dirac spinor", v: "massive vector" } as const;
const seed = { seed: 20_260_901 };

const term = fc
  .record({
    a: fc.nat(3),
    b: fc.nat(2),
    bConjugate: fc.nat(2),
    c: fc.nat(1),
    v: fc.nat(2),
    derivatives: fc.nat(4),
  })
  .filter(({ a, b, bConjugate, c, v }) => a + b + bConjugate + 2 * c + v > 1)
  .map(({ a, b, bConjugate, c, v, derivatives }) => ({
    fields: `a${a} b${b} b~${bConjugate} c${c} c~${c} v${v}`,
    derivatives,
  }));
const dimension = fc.constantFrom("d", "2", "3", "4", "6", "8/3", "-1/2");

function theoryWith(d: string, terms: TheorySketch["terms"]): Theory {
  return theoryOf({ d, fields: kinds, terms });
}
function vertex(theory: Theory, index: number, count: number): GraphParts["vertices"][number] {
  const found = theory.terms[index];
  const edges = found && halfEdgesOf(found.monomial, theory);
  if (!found || !edges) throw new Error("the sketch has this term");
  return { term: found, edges, count };
}
const legsOf = (theory: Theory, plain: readonly number[]): HalfEdges => ({ ...noHalfEdges(theory), plain });
const counts = fc.array(fc.nat(4), { minLength: 4, maxLength: 4 });

describe("the degree of divergence", () => {
  it("comes out the same by momenta and by dimensions, for any vertices and legs", () => {
    fc.assert(
      fc.property(
        dimension,
        fc.array(term, { minLength: 1, maxLength: 4 }),
        fc.nat(5),
        counts,
        (d, terms, count, legs) => {
          const theory = theoryWith(d, Object.fromEntries(terms.map((one, n) => [`r${n}`, one])));
          const vertices = terms.map((_, n) => vertex(theory, n, count + n));
          // degreeOf throws when they differ.
          expect(degreeOf({ vertices, legs: legsOf(theory, legs) }, theory).omega).toBeDefined();
        },
      ),
      seed,
    );
  });

  it("falls by [g] with each further vertex and by δ with each further leg", () => {
    fc.assert(
      fc.property(
        dimension,
        term,
        fc.integer({ min: 1, max: 6 }),
        counts,
        fc.nat(3),
        (d, one, count, legs, leg) => {
          const theory = theoryWith(d, { r: one });
          const degree = (vertices: number, external: readonly number[]) =>
            degreeOf({ vertices: [vertex(theory, 0, vertices)], legs: legsOf(theory, external) }, theory)
              .omega;
          const coupling = theory.terms[0]?.ultravioletCoefficient;
          const weight = theory.fields[leg]?.weight;
          if (!coupling || !weight) throw new Error("the sketch has this term and field");
          expect(degree(count + 1, legs).toString()).toBe(degree(count, legs).minus(coupling).toString());
          const longer = legs.map((had, f) => (f === leg ? had + 1 : had));
          expect(degree(count, longer).toString()).toBe(degree(count, legs).minus(weight).toString());
        },
      ),
      seed,
    );
  });

  // Own derivation: joining two graphs by one line of f adds its propagator, −(d − 2δ_f), and no loop.
  it("adds over graphs joined by a single line, less the propagator's power", () => {
    fc.assert(
      fc.property(dimension, term, term, counts, counts, fc.nat(3), (d, one, other, left, right, f) => {
        const theory = theoryWith(d, { r: one, s: other });
        const grown = (legs: readonly number[]) => legs.map((count, g) => (g === f ? count + 1 : count));
        const parts = (index: number, legs: readonly number[]): GraphParts => ({
          vertices: [vertex(theory, index, 2)],
          legs: legsOf(theory, legs),
        });
        const [first, second] = [parts(0, grown(left)), parts(1, grown(right))];
        const joined: GraphParts = {
          vertices: [...first.vertices, ...second.vertices],
          legs: addHalfEdges(legsOf(theory, left), legsOf(theory, right)),
        };
        const weight = theory.fields[f]?.weight;
        if (!weight) throw new Error("the sketch has this field");
        const propagator = theory.measure.minus(weight.times(2));
        const [a, b, c] = [first, second, joined].map((graph) => degreeOf(graph, theory));
        expect(c?.omega.toString()).toBe(
          a?.omega
            .plus(b?.omega ?? propagator)
            .minus(propagator)
            .toString(),
        );
        expect(c?.loops).toBe((a?.loops ?? NaN) + (b?.loops ?? NaN));
      }),
      seed,
    );
  });
});

interface End {
  readonly vertex: number;
  readonly field: number;
  readonly conjugated: boolean;
}

/** Whether some choice of external ends and some pairing of the rest gives a connected graph: all are tried. */
function existsByTrial(vertices: readonly HalfEdges[], legs: HalfEdges, theory: Theory): boolean {
  const ends: End[] = vertices.flatMap((edges, v) =>
    theory.fields.flatMap((_, field) => [
      ...Array.from({ length: edges.plain[field] ?? 0 }, () => ({ vertex: v, field, conjugated: false })),
      ...Array.from({ length: edges.conjugate[field] ?? 0 }, () => ({ vertex: v, field, conjugated: true })),
    ]),
  );
  const isConnected = (lines: readonly (readonly [number, number])[]): boolean => {
    const reached = new Set([0]);
    for (let grew = true; grew;) {
      grew = false;
      for (const [a, b] of lines)
        if (reached.has(a) !== reached.has(b)) {
          reached.add(a).add(b);
          grew = true;
        }
    }
    return reached.size === vertices.length;
  };
  const pair = (
    left: readonly End[],
    missing: HalfEdges,
    lines: readonly (readonly [number, number])[],
  ): boolean => {
    const [first, ...rest] = left;
    if (!first)
      return [...missing.plain, ...missing.conjugate].every((count) => count === 0) && isConnected(lines);
    const side = first.conjugated ? "conjugate" : "plain";
    if ((missing[side][first.field] ?? 0) > 0) {
      const fewer = {
        ...missing,
        [side]: missing[side].map((count, f) => (f === first.field ? count - 1 : count)),
      };
      if (pair(rest, fewer, lines)) return true;
    }
    return rest.some((other, n) => {
      const joins = theory.fields[first.field]?.selfConjugate ? true : first.conjugated !== other.conjugated;
      if (other.field !== first.field || !joins) return false;
      return pair(
        rest.filter((_, m) => m !== n),
        missing,
        [...lines, [first.vertex, other.vertex]],
      );
    });
  };
  return pair(ends, legs, []);
}

describe("whether a connected graph exists", () => {
  const small = fc.record({ a: fc.nat(3), b: fc.nat(1), c: fc.nat(1), real: fc.nat(2) });
  it("agrees with trying every way to join the legs, for neutral vertices", () => {
    let existing = 0;
    let refused = 0;
    fc.assert(
      fc.property(
        fc.array(small, { minLength: 1, maxLength: 3 }),
        counts,
        fc.nat(1),
        (shapes, wanted, pairs) => {
          const theory = theoryOf({
            fields: { a: "real scalar", e: "real scalar", b: "complex scalar", c: "Dirac spinor" },
            terms: {},
          });
          const edgesOf = ({ a, b, c, real }: (typeof shapes)[number]): HalfEdges => ({
            plain: [a, real, b, c],
            conjugate: [0, 0, b, c],
          });
          const vertices = shapes.map(edgesOf).filter((edges) => edges.plain.some((count) => count > 0));
          if (vertices.length === 0) return;
          const legs: HalfEdges = {
            plain: [(wanted[0] ?? 0) % 4, (wanted[1] ?? 0) % 3, pairs, 0],
            conjugate: [0, 0, pairs, 0],
          };
          const lines = internalLines(
            vertices.map((edges) => ({ edges, count: 1 })),
            legs,
            theory,
          );
          if (lines.some((count) => count < 0 || !Number.isInteger(count))) return;
          const found =
            graphExists(
              vertices.map((edges) => ({ edges, count: 1 })),
              legs,
              lines,
              theory,
            ) === "exists";
          expect(found).toBe(existsByTrial(vertices, legs, theory));
          if (found) existing += 1;
          else refused += 1;
        },
      ),
      { ...seed, numRuns: 2_000 },
    );
    // The law says something only if both answers occur.
    expect(Math.min(existing, refused)).toBeGreaterThan(30);
  });

  it("counts each pair of ends once", () => {
    const theory = theoryOf({ fields: { a: "real scalar" }, terms: { r: "a4" } });
    const one = vertex(theory, 0, 1);
    expect(countOf(one.edges, 0)).toBe(4);
    expect(graphExists([{ ...one, count: 40 }], legsOf(theory, [2]), [79], theory)).toBe("exists");
  });
});
