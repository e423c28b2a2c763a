/** Numbers and symmetry factors of graphs against published tables. */
import { describe, expect, it } from "vitest";
import { enumerateGraphs } from "#engine/graphs/enumerate.ts";
import type { Graph } from "#engine/graphs/graph.ts";
import { scalarGraphs, weightOf } from "../engine/graphs/count-graphs.ts";

const irreducible = { onlyOneParticleIrreducible: true };

// Kleinert, Pelster, Kastening, Bachmann 2000, Phys. Rev. E 62, 1537, tables I to III; legs interchangeable.
describe("φ⁴: connected graphs and their weight, irreducible ones and theirs, those without closed lines", () => {
  it.each([
    [1, 0, 1, "1/8", 1, "1/8", 0],
    [2, 0, 2, "1/12", 2, "1/12", 1],
    [3, 0, 4, "11/96", 4, "11/96", 1],
    [4, 0, 10, "17/72", 10, "17/72", 3],
    [5, 0, 28, "619/960", 28, "619/960", 6],
    [1, 2, 1, "1/2", 1, "1/2", 0],
    [2, 2, 3, "2/3", 2, "5/12", 1],
    [3, 2, 8, "11/8", 5, "5/6", 2],
    [1, 4, 1, "1", 1, "1", 1],
    [2, 4, 2, "7/2", 1, "3/2", 1],
    [3, 4, 8, "149/12", 3, "21/4", 2],
  ])(
    "%i vertices, %i legs",
    (vertices, legs, count, weight, countOfIrreducible, weightOfIrreducible, open) => {
      const connected = scalarGraphs({ 4: vertices }, legs);
      const proper = scalarGraphs({ 4: vertices }, legs, irreducible);
      expect([connected.length, weightOf(connected).toString()]).toEqual([count, weight]);
      expect([proper.length, weightOf(proper).toString()]).toEqual([countOfIrreducible, weightOfIrreducible]);
      expect(scalarGraphs({ 4: vertices }, legs, { ...irreducible, dropSelfLoops: true })).toHaveLength(open);
    },
  );

  // The same paper lists multiplicities M; S = (4!)^p p!/M for p vertices.
  it("symmetry factors of vacuum graphs without closed lines", () => {
    const factors = (vertices: number) =>
      scalarGraphs({ 4: vertices }, 0, { dropSelfLoops: true })
        .map(({ symmetry }) => Number(symmetry))
        .sort((a, b) => a - b);
    expect(factors(2)).toEqual([48]);
    expect(factors(3)).toEqual([48]);
    expect(factors(5)).toEqual([16, 32, 48, 120, 288, 320]);
  });

  // OEIS A361135, which cites table II.
  it("connected two-point graphs: 1, 3, 8, 30", () => {
    expect([1, 2, 3, 4].map((n) => scalarGraphs({ 4: n }, 2).length)).toEqual([1, 3, 8, 30]);
  });
  // OEIS A352174: legs told apart.
  it("connected two-point graphs with labelled legs: 1, 3, 10", () => {
    expect([1, 2, 3].map((n) => scalarGraphs({ 4: n }, 2, { labelledLegs: true }).length)).toEqual([
      1, 3, 10,
    ]);
  });
  // Own count, confirmed by an independent enumeration: a part may hang on one vertex without any closed line.
  it("four loops, four legs: 27 graphs without closed lines, 26 without tadpole parts", () => {
    expect(scalarGraphs({ 4: 5 }, 4, { ...irreducible, dropSelfLoops: true })).toHaveLength(27);
    expect(scalarGraphs({ 4: 5 }, 4, { ...irreducible, dropTadpoles: true })).toHaveLength(26);
  });
});

// Kleinert et al. 2000 for the method; numbers from an independent enumeration of all pairings.
describe("φ³", () => {
  it.each([
    [2, 0, 2, "5/24", 1, "1/12"],
    [4, 0, 5, "5/16", 2, "5/48"],
    [1, 1, 1, "1/2", 1, "1/2"],
    [3, 1, 3, "5/8", 1, "1/4"],
    [5, 1, 12, "15/8", 3, "5/8"],
    [2, 2, 2, "1", 1, "1/2"],
    [4, 2, 9, "25/8", 2, "1"],
    [1, 3, 1, "1", 1, "1"],
    [3, 3, 3, "4", 1, "1"],
  ])("%i vertices, %i legs", (vertices, legs, count, weight, countOfIrreducible, weightOfIrreducible) => {
    const connected = scalarGraphs({ 3: vertices }, legs);
    const proper = scalarGraphs({ 3: vertices }, legs, irreducible);
    expect([connected.length, weightOf(connected).toString()]).toEqual([count, weight]);
    expect([proper.length, weightOf(proper).toString()]).toEqual([countOfIrreducible, weightOfIrreducible]);
  });
  // OEIS A005967 (from memory).
  it("connected vacuum graphs: 2, 5, 17", () => {
    expect([2, 4, 6].map((n) => scalarGraphs({ 3: n }, 0).length)).toEqual([2, 5, 17]);
  });
});

// Peskin, Schroeder (1995) section 4.4; Srednicki (2007) chapter 9.
describe("textbook symmetry factors", () => {
  it.each([
    ["φ⁴ tadpole", { 4: 1 }, 2, ["2"]],
    ["φ⁴ sunset and double scoop", { 4: 2 }, 2, ["4", "6"]],
    ["φ⁴ figure eight", { 4: 1 }, 0, ["8"]],
    ["φ⁴ bubble", { 4: 2 }, 4, ["2"]],
    ["φ³ self-energy", { 3: 2 }, 2, ["2"]],
    ["φ³ sunset", { 3: 2 }, 0, ["12"]],
    ["φ³ tetrahedron and its companion", { 3: 4 }, 0, ["16", "24"]],
  ])("%s", (_, vertices, legs, factors) => {
    expect(
      scalarGraphs(vertices, legs, irreducible)
        .map(({ symmetry }) => symmetry)
        .sort(),
    ).toEqual(factors);
  });
});

/** Whether some closed electron line has an odd number of vertices: such graphs cancel (Furry 1937). */
function hasOddElectronLoop(graph: Graph): boolean {
  const next = new Map(
    graph.edges.filter(({ field }) => field === 1).map(({ from, to }) => [from, to] as const),
  );
  return graph.vertices.some((_, start) => {
    let at = next.get(start);
    let steps = 1;
    while (at !== undefined && at !== start && steps <= graph.vertices.length) {
      at = next.get(at);
      steps += 1;
    }
    return at === start && steps % 2 === 1;
  });
}

function electrodynamics(vertices: number, photons: number): readonly Graph[] {
  return enumerateGraphs({
    fields: [
      { id: "A", directed: false },
      { id: "e", directed: true },
    ],
    vertices: [{ id: "e", legs: { plain: [1, 1], conjugate: [0, 1] }, count: vertices }],
    external: { plain: [photons, 1], conjugate: [0, 1] },
    onlyOneParticleIrreducible: true,
  }).graphs.filter((graph) => !hasOddElectronLoop(graph));
}

// OEIS A005412 and A005413; Cvitanović, Lautrup, Pearson 1978, Phys. Rev. D 18, 1939.
describe("quantum electrodynamics: directed lines", () => {
  it("proper electron self-energies: 1, 3, 18", () => {
    expect([2, 4, 6].map((vertices) => electrodynamics(vertices, 0).length)).toEqual([1, 3, 18]);
  });
  it("proper vertices: 1, 1, 7, 72, each with symmetry factor 1", () => {
    const graphs = [1, 3, 5, 7].map((vertices) => electrodynamics(vertices, 1));
    expect(graphs.map(({ length }) => length)).toEqual([1, 1, 7, 72]);
    expect(new Set(graphs.flat().map(({ symmetry }) => symmetry))).toEqual(new Set(["1"]));
  });
});
