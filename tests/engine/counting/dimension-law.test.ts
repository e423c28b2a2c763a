/** Counting by dimension is the case where every weight is the dimension: of terms, and of graphs their degree. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readGraph } from "#engine/divergence/read-graph.ts";
import { theoryFrom, type Sketch } from "../premises/state.ts";
import { valueOf } from "./ask-counting.ts";

const content = fc.record({
  pairs: fc.nat(3),
  scalars: fc.nat(6),
  vectors: fc.nat(3),
  derivatives: fc.nat(4),
});
type Content = typeof content extends fc.Arbitrary<infer One> ? One : never;

/** "c_1 d^2 psibar psi phi^3": an operator as somebody would type it. */
function typed({ pairs, scalars, vectors, derivatives }: Content, at: number): string {
  const fields = [
    ...Array.from({ length: pairs }, () => "psibar psi"),
    ...(scalars > 0 ? [`phi^${scalars}`] : []),
    ...(vectors > 0 ? [`A^${vectors}`] : []),
  ];
  return `c_${at + 1} ${derivatives > 0 ? `d^${derivatives} ` : ""}${fields.join(" ")}`;
}

describe("counting by dimension", () => {
  it("gives every term its dimension above the measure", () => {
    const operators = fc.array(
      content.filter(({ pairs, scalars, vectors }) => pairs + scalars + vectors > 0),
      { minLength: 1, maxLength: 4 },
    );
    fc.assert(
      fc.property(operators, fc.constantFrom("2", "3", "4", "5", "6", "d"), (terms, d) => {
        const theory: Sketch = {
          d,
          fields: { phi: "real scalar", psi: "Dirac spinor", A: "gauge potential" },
          terms: terms.map(typed),
        };
        const value = valueOf({ theory });
        for (const { order, byDimension } of value.terms) expect(order).toEqual([byDimension.text]);
        expect(value.verdict).toMatch(d === "d" ? /just by dimension|not comparable/ : /^just by dimension$/);
      }),
      { numRuns: 40 },
    );
  });

  it("gives every graph the degree of divergence", () => {
    const graphs = fc
      .record({
        legs: fc.integer({ min: 3, max: 6 }),
        derivatives: fc.nat(4),
        vertices: fc.integer({ min: 1, max: 4 }),
      })
      .chain((one) => {
        const ends = one.legs * one.vertices;
        return fc
          .integer({ min: one.vertices - 1, max: Math.floor((ends - 1) / 2) })
          .map((lines) => ({ ...one, external: ends - 2 * lines }));
      });
    fc.assert(
      fc.property(graphs, fc.constantFrom("2", "4", "6", "d"), (graph, d) => {
        const theory: Sketch = {
          d,
          fields: { phi: "real scalar" },
          terms: [`g ${graph.derivatives > 0 ? `d^${graph.derivatives} ` : ""}phi^${graph.legs}`],
        };
        const vertices = [{ id: "v", term: "t1", count: String(graph.vertices) }];
        const legs = [{ id: "l", field: "phi", leg: "field" as const, count: String(graph.external) }];
        const read = readGraph({ vertices, legs }, theoryFrom(theory));
        if (!read.ok) throw new Error(JSON.stringify(read.problems));
        expect(valueOf({ theory, vertices, legs }).graph?.order.map(({ text }) => text)).toEqual([
          read.degree.omega.toString(),
        ]);
      }),
      { numRuns: 40 },
    );
  });
});
