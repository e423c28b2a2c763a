import { describe, expect, it } from "vitest";
import { evaluateDivergence } from "#engine/divergence/evaluate.ts";
import { divergenceShape } from "#engine/divergence/inputs.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryOf } from "../theory-builder.ts";
import { askGraph, graphOf, refusalOf } from "./ask.ts";

const phi4 = theoryOf({
  fields: { phi: "real scalar" },
  terms: { l: "phi4", m: "phi2", k: { fields: "phi2", derivatives: 2, kinetic: true } },
});
const qed = theoryOf({
  fields: { A: "gauge potential", psi: "Dirac spinor" },
  terms: { e: "psi~ psi A", m: "psi~ psi" },
});
const charged = theoryOf({
  fields: { phi: "complex scalar", chi: "Dirac spinor" },
  terms: { l: "phi~2 phi2", y: "phi chi2" },
});
const mixed = theoryOf({
  fields: { phi: "real scalar", chi: "real scalar" },
  terms: { a: "phi4", b: "chi4", ab: "phi2 chi2" },
});

describe("one graph", () => {
  // Own derivation: I = (2·4 − 4)/2 = 2, L = 2 − 2 + 1 = 1, ω = 4 − 2·2 = 0.
  it("counts the one-loop four-point graph of φ⁴ both ways", () => {
    const { value, scalars, working } = askGraph(phi4, { l: 2 }, { phi: 4 });
    expect(value).toMatchObject({
      loops: 1,
      omega: { text: "0" },
      verdict: "logarithmic",
      dimensional: "pole",
      cutoff: "logarithm of the cutoff",
    });
    expect(value?.counterterms).toMatchObject([
      { derivatives: 0, presentAs: "l", dimension: { text: "4" }, order: { text: "0" } },
    ]);
    expect(scalars.map(({ id, value: { type } }) => `${id} ${type}`)).toEqual([
      "omega exact",
      "loops exact",
      "verdict word",
    ]);
    const formulas = working.flatMap((step) => (step.step === "formula" ? [step.latex] : []));
    expect(formulas).toContain("L = 2 - 2 + 1 = 1");
    expect(formulas.some((latex) => latex.includes("4\\cdot 1 - 2\\cdot 2 = 0"))).toBe(true);
    expect(formulas.some((latex) => latex.includes("4 - 4\\cdot 1 - 2\\cdot 0 = 0"))).toBe(true);
  });

  it("finds the counterterms of a self-energy among the premises, in powers of m²", () => {
    const { counterterms, cutoff, verdict, cutoffPower } = graphOf(phi4, { l: 2 }, { phi: 2 });
    expect(verdict).toBe("power");
    expect(cutoffPower?.text).toBe("2");
    expect(cutoff).toBe("powers and a logarithm of the cutoff");
    expect(
      counterterms.map(({ derivatives, massPower, presentAs }) => [derivatives, massPower.text, presentAs]),
    ).toEqual([
      [2, "0", "k"],
      [0, "2", "m"],
    ]);
  });

  it("lowers the degree by each mass insertion", () => {
    expect(graphOf(phi4, { l: 2, m: 1 }, { phi: 4 }).omega.text).toBe("-2");
  });

  it("calls a tree a tree", () => {
    const { verdict, dimensional, counterterms } = graphOf(phi4, { l: 2 }, { phi: 6 });
    expect([verdict, dimensional, counterterms.length]).toEqual(["tree", "tree", 0]);
  });

  it.each([
    ["half an internal line", phi4, { l: 1 }, { phi: 3 }, "graph-half-line"],
    ["more legs than the vertices have", phi4, { l: 1 }, { phi: 6 }, "graph-too-many-legs"],
    ["too few lines to connect the vertices", phi4, { l: 3 }, { phi: 10 }, "graph-unconnected"],
    ["vertices with no field in common", mixed, { a: 2, b: 2 }, { phi: 2, chi: 2 }, "graph-falls-apart"],
    ["legs that violate fermion number", qed, { e: 2 }, { psi: 2 }, "graph-charge"],
    ["a kinetic term as a vertex", phi4, { k: 1 }, { phi: 2 }, "vertex-kinetic"],
    ["a vertex that the premises lack", phi4, { nowhere: 1 }, { phi: 2 }, "vertex-unknown"],
    ["a field that the premises lack", phi4, { l: 1 }, { sigma: 2 }, "leg-unknown"],
    ["no vertices", phi4, {}, { phi: 2 }, "graph-without-vertices"],
    ["a count of nothing", phi4, { l: 0 }, { phi: 2 }, "count-unreadable"],
    ["a count that is not whole", phi4, { l: 1.5 }, { phi: 2 }, "count-unreadable"],
  ])("refuses %s", (_, theory, vertices, legs, code) => {
    expect(refusalOf(theory, vertices as Record<string, number>, legs as Record<string, number>)).toEqual([
      code,
    ]);
  });

  it("connects different fields through a vertex that has both", () => {
    expect(graphOf(mixed, { a: 1, b: 1, ab: 1 }, { phi: 2, chi: 2 }).loops).toBe(2);
  });

  it("takes a term for itself and its Hermitian conjugate", () => {
    // Yukawa φχχ + h.c. in d = 4: the φ self-energy needs one of each; ω = 4 − 2·1 − 0 = 2.
    expect(graphOf(charged, { y: 2 }, { phi: 1, "phi~": 1 }).omega.text).toBe("2");
    expect(refusalOf(charged, { y: 3 }, { phi: 1, chi: 2, "chi~": 2 })).not.toEqual([]);
  });

  it("reads legs as terms write them, conjugates and LaTeX included", () => {
    const legs = (field: string, leg: string) => {
      const asked = { vertices: [{ id: "v", term: "e", count: 2 }], legs: [{ id: "l", field, leg }] };
      const { value, problems } = evaluateDivergence(schemaOf(divergenceShape).parse(asked), qed);
      return value?.mode === "one graph" ? value.legs.text : problems.map(({ code }) => code).join();
    };
    expect([legs("psi", "pair"), legs("\\psi", "pair"), legs("psibar", "pair")]).toEqual(
      Array(3).fill("psibar psi"),
    );
    expect([legs("psibar", "field"), legs("psi", "conjugate")]).toEqual([
      "graph-half-line",
      "graph-half-line",
    ]);
    expect([legs("A", "pair"), legs("2 A", "field"), legs("A^2", "field"), legs("d A", "field")]).toEqual([
      "A^2",
      "leg-unknown",
      "leg-unknown",
      "leg-unknown",
    ]);
  });

  it("says what is symbolic: where the graph is logarithmic", () => {
    const inAnyDimension = theoryOf({ d: "d", fields: { phi: "real scalar" }, terms: { l: "phi4" } });
    const { value, scalars } = askGraph(inAnyDimension, { l: 2 }, { phi: 4 });
    expect(value).toMatchObject({
      omega: { text: "d - 4" },
      verdict: "depends",
      logarithmicAt: { symbol: "d", value: { text: "4" }, growsAbove: true },
    });
    expect(scalars.at(-1)?.value).toEqual({ type: "word", text: "logarithmic at d = 4" });
  });

  // 't Hooft, Veltman 1972 (analytic regularisation in d): an odd number of momenta in odd d leaves no pole.
  it("finds no pole at odd loop order in odd dimension, and one at even", () => {
    const phi6 = theoryOf({ d: 3, fields: { phi: "real scalar" }, terms: { t: "phi6" } });
    expect(graphOf(phi6, { t: 1 }, { phi: 4 })).toMatchObject({
      loops: 1,
      omega: { text: "1" },
      dimensional: "no pole: odd dimension, odd loops",
      cutoff: "powers of the cutoff",
    });
    expect(graphOf(phi6, { t: 2 }, { phi: 6 })).toMatchObject({
      loops: 2,
      omega: { text: "0" },
      dimensional: "pole",
    });
  });

  it("counts a massive vector by its ultraviolet weight, and by its dimension when its current is conserved", () => {
    const theory = (kind: "massive vector" | "massive vector, conserved current") =>
      theoryOf({ fields: { V: kind, psi: "Dirac spinor" }, terms: { g: "psi~ psi V" } });
    // Own derivation: δ = d/2 = 2 makes [g]_UV = 4 − 3 − 2 = −1; ω(ψ̄ψ, 2 vertices) = 4 − 3 + 2 = 3 against 1.
    expect(graphOf(theory("massive vector"), { g: 2 }, { psi: 1, "psi~": 1 }).omega.text).toBe("3");
    expect(
      graphOf(theory("massive vector, conserved current"), { g: 2 }, { psi: 1, "psi~": 1 }).omega.text,
    ).toBe("1");
  });

  it("warns that ω is a bound, by what the legs are", () => {
    const codes = (theory: typeof qed, vertices: Record<string, number>, legs: Record<string, number>) =>
      askGraph(theory, vertices, legs).notices.map(({ code }) => code);
    expect(codes(qed, { e: 2 }, { A: 2 })).toEqual(["omega-not-sufficient", "omega-gauge"]);
    expect(codes(qed, { e: 2 }, { psi: 1, "psi~": 1 })).toEqual(["omega-not-sufficient", "omega-chiral"]);
    expect(codes(phi4, { l: 1 }, { phi: 2 })).toContain("graph-closed-line");
    expect(codes(phi4, { l: 3 }, { phi: 6 })).toEqual(["omega-subgraphs"]);
  });
});

describe("Schrödinger propagators", () => {
  const contact = (D: number) =>
    theoryOf({ D, z: 2, fields: { psi: "Schrödinger field" }, terms: { c: "psi~2 psi2" } });
  // Own derivation: the bubble is ∫ dE dᴰk / (E − k²/2)² → ∫ dᴰk / k², degree D − 2.
  it("has a linear divergence but no pole in the two-body bubble for D = 3, and a pole for D = 2", () => {
    expect(graphOf(contact(3), { c: 2 }, { psi: 2, "psi~": 2 })).toMatchObject({
      omega: { text: "1" },
      dimensional: "no pole: Schrödinger, odd D·L",
      cutoff: "powers of the cutoff",
    });
    expect(graphOf(contact(2), { c: 2 }, { psi: 2, "psi~": 2 })).toMatchObject({
      omega: { text: "0" },
      dimensional: "pole",
    });
  });

  // Wu 1959; Braaten, Nieto 1999: the 3 → 3 amplitude has a logarithm at two loops, order four in the coupling.
  it("has a logarithm in three-body contact scattering for D = 3 at two loops", () => {
    expect(graphOf(contact(3), { c: 4 }, { psi: 3, "psi~": 3 })).toMatchObject({
      loops: 2,
      omega: { text: "0" },
      dimensional: "pole",
    });
  });

  it("vanishes in vacuum where retarded lines would have to close", () => {
    expect(graphOf(contact(2), { c: 2 }, { psi: 1, "psi~": 1 })).toMatchObject({
      dimensional: "vanishes: retarded loop",
      cutoff: "vanishes: retarded loop",
      counterterms: [],
    });
    expect(askGraph(contact(2), { c: 1 }, { psi: 1, "psi~": 1 }).notices.map(({ code }) => code)).toContain(
      "graph-retarded",
    );
  });

  it("counts time derivatives with z", () => {
    const { counterterms } = graphOf(
      theoryOf({ D: 4, z: 2, fields: { psi: "Schrödinger field" }, terms: { c: "psi~2 psi2" } }),
      { c: 2 },
      { psi: 2, "psi~": 2 },
    );
    expect(
      counterterms.map(({ derivatives, timeDerivatives, massPower }) => [
        derivatives,
        timeDerivatives,
        massPower.text,
      ]),
    ).toEqual([
      [2, 0, "0"],
      [0, 1, "0"],
      [0, 0, "2"],
    ]);
  });
});
