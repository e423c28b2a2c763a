import katex from "katex";
import { describe, expect, it } from "vitest";
import { evaluatePremises } from "#engine/premises/evaluate.ts";
import { premisesOf, type Sketch } from "./state.ts";

const lantern: Sketch = {
  symmetries: { parity: "Z2" },
  fields: {
    chi: { kind: "real scalar", charges: "odd" },
    sigma: "real scalar",
    psi: "Dirac spinor",
    V: "massive vector",
  },
  scales: {
    Lambda: ["3.2(4) TeV", "heavy"],
    p: ["350 GeV", "probe"],
    Q: "p/Lambda",
    m: ["120 GeV", "light"],
  },
  terms: [
    "1/2 (dchi)^2",
    { term: "m^2/2 chi^2", assigned: "m^2/p^2" },
    { term: "c_6/Lambda^2 chi^6", natural: "1/2" },
    "chi^3",
    "kappa chi^4 psi",
    "chi^3",
  ],
};

describe("evaluating premises", () => {
  const evaluation = evaluatePremises(premisesOf(lantern));
  it("gives plain JSON that survives storing", () => {
    expect(JSON.parse(JSON.stringify(evaluation))).toEqual(evaluation);
  });
  it("shows each term as understood, with its dimensions and size", () => {
    const [, mass, six] = evaluation.value?.terms ?? [];
    expect(mass?.assigned).toEqual({ value: 0.117551020408, sigma: 0, unit: "", text: "0.118" });
    expect([six?.latex, six?.dimension, six?.coefficient, six?.natural]).toEqual([
      "\\frac{c_6}{\\Lambda^{2}}\\,\\chi^{6}",
      { text: "6", latex: "6" },
      { text: "-2", latex: "-2" },
      0.5,
    ]);
  });
  it("cautions about forbidden terms, odd fermions and duplicates", () => {
    expect(evaluation.notices.map(({ code, path }) => `${code} ${path[1]}`)).toEqual([
      "term-forbidden t4",
      "odd-fermions t5",
      "term-forbidden t6",
      "term-duplicate t6",
    ]);
    expect(evaluation.value?.terms[3]?.forbiddenBy).toEqual(["parity"]);
  });
  it.each([
    ["phi^2 d phi", "4", 1],
    ["A phi^2", "4", 1],
    ["A phi d phi", "4", null],
    ["F A d phi", "4", null],
    ["A d A", "4", 3],
    // The Chern–Simons term: ε takes three indices in d = 3, and only there.
    ["A d A", "3", null],
    ["A d A", "5", 3],
    ["phi^2 d phi", "d", null],
    ["psibar A psi", "4", null],
  ])("%s in d = %s leaves indices: %s", (term, d, count) => {
    const fields = {
      phi: "real scalar",
      A: "gauge potential",
      F: "field strength",
      psi: "Dirac spinor",
    } as const;
    const { notices } = evaluatePremises(premisesOf({ d, fields, terms: [term] }));
    expect(notices.find(({ code }) => code === "odd-indices")?.facts["count"] ?? null).toBe(count);
  });
  it("lets scales, dimensions and Q be pinned", () => {
    const scalars = new Map(evaluation.scalars.map(({ id, value }) => [id, value]));
    expect(scalars.get("k3/value")).toEqual({ type: "number", value: 0.109375, sigma: 0.013671875 });
    expect(scalars.get("k1/value")).toEqual({ type: "number", value: 3.2, sigma: 0.4, unit: "TeV" });
    expect(scalars.get("f3/dimension")).toEqual({ type: "exact", text: "3/2" });
    expect(scalars.get("t3/coefficient")).toEqual({ type: "exact", text: "-2" });
    expect(scalars.size).toBe(evaluation.scalars.length);
  });
  it("shows its working in the notebook's symbols", () => {
    const formulas = evaluation.working.flatMap((step) => (step.step === "formula" ? [step.latex] : []));
    expect(formulas).toContain("[\\chi] = \\frac{d - 2}{2} = 1");
    expect(formulas).toContain("[V] = \\frac{d - 2}{2} = 1,\\qquad \\delta_{V} = 2");
    expect(formulas).toContain("\\Delta\\!\\left(\\chi^{6}\\right) = 6[\\chi] = 6,\\qquad d - \\Delta = -2");
    expect(formulas).toContain("Q = \\frac{p}{\\Lambda} = 0.109(14)");
  });
  it("depends on no title or note", () => {
    const inputs = premisesOf(lantern);
    const renamed = {
      ...inputs,
      name: "Another",
      note: "x",
      terms: inputs.terms.map((row) => ({ ...row, meaning: "y" })),
    };
    expect(evaluatePremises(renamed)).toEqual(evaluation);
  });
  it("says when a dimension was typed, and when two scales have one role", () => {
    const { notices } = evaluatePremises(
      premisesOf({
        d: "d",
        fields: { phi: { kind: "real scalar", dimension: "(d-4)/2" } },
        scales: { a: ["1", "heavy"], b: ["2", "heavy"] },
      }),
    );
    expect(notices.map(({ code }) => code)).toEqual(["dimension-overridden", "roles-shared"]);
  });
});

describe("everything premises typeset", () => {
  const anisotropic: Sketch = {
    D: "D",
    z: "2",
    fields: { n: "Schrödinger field", phi: "anisotropic scalar" },
    scales: { k: "1.2 fm^-1", "M_{Pl}": "1.22e19 GeV" },
    terms: ["i n^\\dagger d_t n", "C_0 (n^\\dagger n)^2", "(d_t phi)^2", "C/k^3 |n|^6"],
  };
  it.each([lantern, anisotropic])("is LaTeX that KaTeX accepts: %#", (sketch) => {
    const { value, working, scalars } = evaluatePremises(premisesOf(sketch));
    const inProse = (text: string) => [...text.matchAll(/\$([^$]+)\$/g)].map(([, latex = ""]) => latex);
    const typeset = [
      ...working.flatMap((step) => (step.step === "formula" ? [step.latex] : inProse(step.text))),
      ...scalars.flatMap(({ label }) => inProse(label)),
      ...(value?.terms.map(({ latex }) => latex) ?? []),
      value?.spacetimeLatex ?? "",
    ];
    for (const latex of typeset)
      expect(() => katex.renderToString(latex, { throwOnError: true, strict: "error" }), latex).not.toThrow();
    expect(typeset.length).toBeGreaterThan(20);
  });
});
