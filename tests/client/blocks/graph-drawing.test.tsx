/** Drawn graphs: nothing overlaps, everything is said in words. */
import { render, screen } from "@testing-library/react";
import { describe, expect, it } from "vitest";
import type { GraphPictures } from "#engine/divergence/value.ts";
import { enumerateGraphs } from "#engine/graphs/enumerate.ts";
import type { Graph } from "#engine/graphs/graph.ts";
import { GraphDrawing } from "../../../client/blocks/parts/graph-drawing.tsx";
import { layOut, pointOn, SPACING } from "../../../client/blocks/parts/graph-layout.ts";

const fields: GraphPictures["fields"] = [
  { symbol: "phi", latex: "\\phi", style: "solid", directed: false },
  { symbol: "psi", latex: "\\psi", style: "solid", directed: true },
  { symbol: "A", latex: "A", style: "wavy", directed: false },
];
const kinds: GraphPictures["kinds"] = [
  { termRowId: "t1", latex: "\\phi^4", mark: "vertex" },
  { termRowId: "t2", latex: "\\phi^4", mark: "counterterm" },
];

function phi4(vertices: number, legs: number): readonly Graph[] {
  return enumerateGraphs({
    fields: [{ id: "phi", directed: false }],
    vertices: [{ id: "t1", legs: { plain: [4], conjugate: [0] }, count: vertices }],
    external: { plain: [legs], conjugate: [0] },
  }).graphs;
}
const apart = (a: { x: number; y: number }, b: { x: number; y: number }) => Math.hypot(a.x - b.x, a.y - b.y);

describe("layout", () => {
  const cases = [
    [1, 0],
    [1, 2],
    [1, 4],
    [2, 0],
    [2, 2],
    [2, 4],
    [3, 2],
    [3, 4],
    [4, 4],
    [5, 0],
  ] as const;
  it.each(cases)("of every φ⁴ graph with %i vertices and %i legs keeps things apart", (vertices, legs) => {
    for (const graph of phi4(vertices, legs)) {
      const drawn = layOut(graph);
      drawn.vertices.forEach((one, u) => {
        for (const other of drawn.vertices.slice(u + 1))
          expect(apart(one, other)).toBeGreaterThan(0.9 * SPACING);
      });
      // No line runs through a vertex it does not end at, and no two legs end at one place.
      const ends = drawn.lines.filter(({ external }) => external).map(({ curve }) => curve[0]);
      ends.forEach((one, n) => {
        for (const other of ends.slice(n + 1)) expect(apart(one, other)).toBeGreaterThan(8);
      });
      for (const { curve } of drawn.lines) {
        const points = Array.from({ length: 41 }, (_, k) => pointOn(curve, k / 40));
        for (const vertex of drawn.vertices) {
          if (apart(vertex, curve[0]) < 1 || apart(vertex, curve[3]) < 1) continue;
          for (const point of points) expect(apart(vertex, point)).toBeGreaterThan(8);
        }
        for (const number of drawn.numbers) {
          for (const point of points) expect(apart(number, point)).toBeGreaterThan(3);
        }
      }
      for (const { x, y } of [...drawn.vertices, ...drawn.numbers, ...drawn.names]) {
        expect(x).toBeGreaterThan(0);
        expect(y).toBeGreaterThan(0);
        expect(x).toBeLessThan(drawn.width);
        expect(y).toBeLessThan(drawn.height);
      }
    }
  });
  it("is the same for the same graph", () => {
    const [graph] = phi4(4, 2);
    expect(graph && layOut(graph)).toEqual(graph && layOut(graph));
  });
});

describe("a drawing", () => {
  const vertexCorrection: Graph = {
    vertices: [0, 0, 1],
    edges: [
      { from: 0, to: 1, field: 1, count: 1 },
      { from: 1, to: 2, field: 1, count: 1 },
      { from: 0, to: 2, field: 2, count: 1 },
    ],
    legs: [
      { vertex: 0, field: 1, conjugate: false, count: 1, label: null },
      { vertex: 1, field: 2, conjugate: false, count: 1, label: null },
      { vertex: 2, field: 1, conjugate: true, count: 1, label: null },
    ],
    loops: 1,
    symmetry: "1",
    labellings: "1",
  };
  it("is named in words", () => {
    render(<GraphDrawing graph={vertexCorrection} fields={fields} kinds={kinds} numbered />);
    expect(
      screen.getByRole("img", {
        name: "3 vertices; psi line from 1 to 2, psi line from 2 to 3, A line from 1 to 3; external legs: psi at 1, A at 2, psi conjugate at 3",
      }),
    ).toBeTruthy();
  });
  it("has arrows on directed lines only, and a crossed circle for a counterterm", () => {
    const { container } = render(<GraphDrawing graph={vertexCorrection} fields={fields} kinds={kinds} />);
    expect(container.querySelectorAll(".graph-arrow")).toHaveLength(4);
    expect(container.querySelectorAll(".graph-counterterm")).toHaveLength(1);
    expect(container.querySelectorAll(".graph-line-wavy")).toHaveLength(2);
  });
});
