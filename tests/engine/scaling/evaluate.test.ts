import katex from "katex";
import { describe, expect, it } from "vitest";
import { evaluateScaling } from "#engine/scaling/evaluate.ts";
import { scalingShape } from "#engine/scaling/inputs.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryFrom, type Sketch } from "../premises/state.ts";

function scaled(sketch: Sketch, inputs: Readonly<Record<string, string>> = {}) {
  return evaluateScaling(schemaOf(scalingShape).parse(inputs), theoryFrom(sketch));
}
function rowsOf(sketch: Sketch, inputs: Readonly<Record<string, string>> = {}) {
  return scaled(sketch, inputs).value?.rows ?? [];
}
const codes = (list: readonly { readonly code: string }[]) => list.map(({ code }) => code);
const nda = { at: "naive dimensional analysis" };

const lantern: Sketch = {
  symmetries: { parity: "Z2" },
  fields: { chi: { kind: "real scalar", charges: "odd" }, sigma: "real scalar", psi: "Dirac spinor" },
  scales: { Lambda: ["3.2(4) TeV", "heavy"], p: ["350 GeV", "probe"], y: "0.3", m: ["120 GeV", "light"] },
  terms: [
    "1/2 (dchi)^2",
    { term: "m^2/2 chi^2", assigned: "m^2/p^2" },
    "lambda/4! chi^4",
    { term: "c_6/Lambda^2 chi^6", natural: "1/2" },
    "y psibar psi sigma",
    "c (psibar psi)^2",
  ],
};

describe("classes", () => {
  it("follow the sign of the coefficient's dimension", () => {
    expect(
      rowsOf(lantern).map(({ scalingClass, coefficient }) => `${scalingClass} ${coefficient.text}`),
    ).toEqual(["marginal 0", "relevant 2", "marginal 0", "irrelevant -2", "marginal 0", "irrelevant -2"]);
  });
  it("become ranges where d is left symbolic", () => {
    const [, mass, quartic, sextic, , four] = rowsOf({ ...lantern, d: "d" });
    expect([mass?.scalingClass, mass?.marginalAt]).toEqual(["relevant", null]);
    expect([quartic?.scalingClass, quartic?.marginalAt]).toEqual([null, "4"]);
    expect(sextic?.ranges).toEqual([
      { from: null, to: "3", scalingClass: "relevant" },
      { from: "3", to: null, scalingClass: "irrelevant" },
    ]);
    expect(four?.marginalAt).toBe("2");
  });
  it("are told for the free one of D and z", () => {
    const sketch = (D: string, z: string): Sketch => ({
      D,
      z,
      fields: { phi: "anisotropic scalar" },
      terms: ["g phi^4", "m phi^2"],
    });
    // φ⁴ has 3z − D.
    expect(rowsOf(sketch("D", "2"))[0]).toMatchObject({ scalingClass: null, marginalAt: "6" });
    expect(rowsOf(sketch("3", "z"))[0]?.ranges).toEqual([
      { from: null, to: "1", scalingClass: "irrelevant" },
      { from: "1", to: null, scalingClass: "relevant" },
    ]);
    const both = scaled(sketch("D", "z"));
    // The mass has 2z, relevant whatever D and z are; φ⁴ cannot be told.
    expect(both.value?.rows.map(({ scalingClass }) => scalingClass)).toEqual([null, "relevant"]);
    expect(codes(both.notices)).toContain("two-free-dimensions");
  });
  it("do not change at dimensions that no space has", () => {
    // Δ of (dphi)^4 is 2d, so its coefficient −d vanishes at d = 0 only.
    expect(rowsOf({ d: "d", fields: { phi: "real scalar" }, terms: ["c (dphi)^4"] })[0]).toMatchObject({
      scalingClass: "irrelevant",
      marginalAt: null,
    });
  });
});

describe("sizes", () => {
  it("are natural powers of p/Λ with the uncertainty of Λ", () => {
    const sizes = rowsOf(lantern).map(({ size }) => size?.text);
    // (350/3200)² = 0.01196, relative uncertainty 2 × 12.5 %.
    expect(sizes).toEqual(["1", "0.118", "1", "0.0060(15)", "1", "0.0120(30)"]);
    const [, , , six] = rowsOf(lantern);
    expect(six?.size?.value).toBeCloseTo(0.5 * 0.109375 ** 2, 12);
    expect(six?.size?.sigma).toBeCloseTo(0.5 * 0.109375 ** 2 * 0.25, 12);
    expect(six?.sizeLatex).toBe("0.5\\,\\left(\\frac{p}{\\Lambda}\\right)^{2}");
  });
  it("take p and Λ by role, by symbol or as typed", () => {
    const at = (probe: string, heavy = "") => scaled(lantern, { probe, heavy }).value?.expansion?.text;
    expect([at(""), at("m"), at("p/2"), at("0.7 TeV"), at("p", "10 TeV")]).toEqual([
      "0.109(14)",
      "0.0375(47)",
      "0.0547(68)",
      "0.219(27)",
      "0.035",
    ]);
  });
  it("keep the correlation of p with Λ", () => {
    expect(scaled(lantern, { probe: "Lambda/10" }).value?.expansion).toEqual({
      value: 0.1,
      sigma: 0,
      unit: "",
      text: "0.1",
    });
  });
  it("convert units: 1 fm⁻¹ over 1 GeV is ħc", () => {
    const sketch: Sketch = {
      ...lantern,
      scales: { k: ["1 fm^-1", "probe"], M: ["1 GeV", "heavy"] },
      terms: [],
    };
    expect(scaled(sketch).value?.expansion?.value).toBeCloseTo(0.1973269804593, 12);
  });
  it("fractional powers included", () => {
    const [row] = rowsOf({ ...lantern, d: "3", terms: ["g psibar psi chi"] });
    expect([row?.coefficient.text, row?.size?.value]).toEqual([
      "1/2",
      Number(((350 / 3200) ** -0.5).toPrecision(12)),
    ]);
  });
  it("are not claimed without numbers", () => {
    const without = scaled({ ...lantern, scales: {}, terms: ["chi^6", "chi^4"] });
    expect(without.value?.rows.map(({ size }) => size?.text ?? null)).toEqual([null, "1"]);
    expect(codes(without.notices)).toEqual(expect.arrayContaining(["probe-missing", "heavy-missing"]));
    expect(without.value?.plot).toBeNull();
    const symbolic = rowsOf({ ...lantern, d: "d", terms: ["chi^6"] });
    expect(symbolic[0]).toMatchObject({
      size: null,
      sizeLatex: "\\left(\\frac{p}{\\Lambda}\\right)^{2d - 6}",
    });
    const unread = rowsOf({
      ...lantern,
      terms: [
        { term: "chi^6", natural: "1 GeV" },
        { term: "chi^2", assigned: "q" },
      ],
    });
    expect(unread.map(({ size }) => size)).toEqual([null, null]);
  });
  it.each([
    [{ probe: "q" }, "unknown-symbol", "probe"],
    [{ heavy: "1/0" }, "division-by-zero", "heavy"],
    [{ probe: "0.1" }, "units-differ", "probe"],
    [{ heavy: "-3 TeV" }, "scale-not-positive", "heavy"],
    [{ probe: "0 GeV" }, "scale-not-positive", "probe"],
  ])("%o is a problem, and dimensions are still given", (inputs, code, place) => {
    const { problems, value } = scaled(lantern, inputs);
    expect(problems.map((problem) => [problem.code, problem.path[0]])).toEqual([[code, place]]);
    expect([value?.expansion, value?.rows.length]).toEqual([null, 6]);
  });
});

it("does not choose between two scales of one role", () => {
  const { problems, value } = scaled({ ...lantern, scales: { ...lantern.scales, M: ["9 TeV", "heavy"] } });
  expect([codes(problems), value?.expansion]).toEqual([["role-ambiguous"], null]);
});
it("says when premises are incomplete", () => {
  expect(codes(scaled({ ...lantern, terms: ["chi^4", "chi^"] }).notices)).toEqual(["premises-incomplete"]);
});

describe("cautions", () => {
  it("offer the written size of a relevant term that has none", () => {
    const { notices } = scaled({
      ...lantern,
      terms: ["m^2/2 chi^2", "sigma^3", { term: "m^2/2 sigma^2", assigned: "m^2/p^2" }],
    });
    expect(notices.map(({ code, facts }) => [code, facts["rowId"], facts["written"]])).toEqual([
      ["relevant-unassigned", "t1", "m^2/p^2"],
      ["relevant-unassigned", "t2", undefined],
    ]);
  });
  it("warn of forbidden terms and of p beyond Λ", () => {
    expect(codes(scaled({ ...lantern, terms: ["chi^5"] }).notices)).toEqual(["term-forbidden"]);
    expect(codes(scaled(lantern, { probe: "4 TeV" }).notices)).toEqual(["probe-above-heavy"]);
    // Exactly at Λ the expansion parameter is 1 already.
    expect(codes(scaled(lantern, { probe: "3.2 TeV" }).notices)).toEqual(["probe-above-heavy"]);
  });
  it("say what Λ means under a coupling assumption", () => {
    expect(scaled(lantern).value?.meaningOfHeavy).toBe("");
    expect(scaled(lantern, { couplings: "strong" }).value?.meaningOfHeavy).toContain("g_*^2/M^2");
    const loop = scaled(lantern, { couplings: "loop-generated" });
    // 4π · 0.109 = 1.37: the states behind the loop would be lighter than p.
    expect(loop.notices).toContainEqual({ code: "loop-mass-below-probe", path: [], facts: { ratio: 1.37 } });
    expect(codes(scaled(lantern, { ...nda, couplings: "weak" }).notices)).toContain("analysis-means-strong");
  });
  it("need premises", () => {
    expect(evaluateScaling(schemaOf(scalingShape).parse({}), null)).toMatchObject({
      value: null,
      problems: [{ code: "premises-missing" }],
    });
  });
});

describe("naive dimensional analysis", () => {
  it("counts 4π for every leg beyond two, declared couplings and light masses", () => {
    const rows = rowsOf(
      {
        ...lantern,
        terms: [
          "1/2 (dchi)^2",
          "m^2/2 chi^2",
          "lambda/4! chi^4",
          "c chi^6",
          "y psibar psi sigma",
          "c (psibar psi)^2",
        ],
      },
      nda,
    );
    const q = 0.109375;
    const expected = [
      1,
      (120 / 350) ** 2,
      (4 * Math.PI) ** 2,
      (4 * Math.PI) ** 4 * q ** 2,
      0.3,
      (4 * Math.PI) ** 2 * q ** 2,
    ];
    expect(rows.map(({ size }) => size?.value)).toEqual(
      expected.map((value) => Number(value.toPrecision(12))),
    );
    // m²/Λ² · Λ²/p² does not depend on Λ, so neither does its uncertainty.
    expect(rows[1]?.size?.sigma).toBe(0);
  });
  it("knows a quartic coupling's 16π² and a gauge coupling's 4π wherever they occur", () => {
    const sketch: Sketch = {
      fields: { phi: "complex scalar", A: "gauge potential" },
      scales: { ...lantern.scales, lambda: "0.13", g: "0.65" },
      terms: ["lambda |phi|^4", "i g phi^\\dagger A D phi", "g^2 A^2 |phi|^2", "lambda^2 g^2 |phi|^6"],
    };
    const [quartic, current, seagull, sextic] = rowsOf(sketch, nda);
    expect(quartic?.size?.value).toBeCloseTo(0.13, 12);
    expect(current?.size?.value).toBeCloseTo(0.65, 12);
    expect(seagull?.size?.value).toBeCloseTo(0.65 ** 2, 12);
    // (4π)⁴ (p/Λ)² (λ/16π²)² (g/4π)²
    expect(sextic?.size?.value).toBeCloseTo(0.109375 ** 2 * 0.13 ** 2 * (0.65 / (4 * Math.PI)) ** 2, 12);
  });
  it("says which couplings it takes at their strongest", () => {
    const { notices } = scaled(lantern, nda);
    expect(
      notices.filter(({ code }) => code === "coupling-at-strongest").map(({ facts }) => facts["symbols"]),
    ).toEqual(["lambda"]);
  });
  it.each([
    [{ d: "3" }, "analysis-needs-four-dimensions"],
    [{ d: "d" }, "analysis-needs-four-dimensions"],
    [{ D: "3", z: "1" }, "analysis-needs-four-dimensions"],
    [{ fields: { h: "metric fluctuation" } }, "analysis-kind-not-covered"],
    [{ fields: { N: "static heavy field" } }, "analysis-kind-not-covered"],
    [{ fields: { x: "spin 3/2" } }, "analysis-kind-not-covered"],
    [{ fields: { phi: { kind: "real scalar", dimension: "3/2" } } }, "analysis-dimension-overridden"],
  ] as const)("refuses %o", (sketch, code) => {
    const { problems, value } = scaled({ ...sketch, scales: lantern.scales ?? {} }, nda);
    expect([codes(problems), value === null]).toEqual([[code], false]);
  });
  it("gives no sizes where it refuses, yet dimensions", () => {
    const [row] = rowsOf({ ...lantern, d: "3", terms: ["chi^6"] }, nda);
    expect([row?.size, row?.dimension.text]).toEqual([null, "3"]);
  });
});

describe("plot, scalars and working", () => {
  const evaluation = scaled(lantern);
  it("draws power laws through the sizes at p", () => {
    const plot = evaluation.value?.plot;
    expect([plot?.unit, plot?.probe.value, plot?.heavy.value]).toEqual(["GeV", 350, 3200]);
    for (const row of evaluation.value?.rows ?? []) {
      const curve = plot?.curves.find(({ rowId }) => rowId === row.rowId);
      if (row.kinetic) expect(curve).toBeUndefined();
      else {
        const [[x1, y1], [x2, y2]] = [curve?.points[0] ?? [NaN, NaN], curve?.points.at(-1) ?? [NaN, NaN]];
        const slope = Math.log(y2 / y1) / Math.log(x2 / x1);
        expect(slope).toBeCloseTo(-Number(row.coefficient.text), 8);
        expect(y1 * (350 / x1) ** slope).toBeCloseTo(row.size?.value ?? NaN, 8);
      }
    }
  });
  it("draws nothing between scales whose ratio is no double", () => {
    const far: Sketch = {
      fields: { chi: "real scalar" },
      scales: { Lambda: ["1e300 GeV", "heavy"], p: ["1e-20 eV", "probe"] },
      terms: ["lambda chi^4"],
    };
    expect(scaled(far).value?.plot).toBeNull();
    expect(JSON.stringify(scaled(far).scalars)).not.toContain("null");
  });
  it("writes derivatives in space as such under anisotropic scaling", () => {
    const contact: Sketch = {
      D: "3",
      z: "2",
      fields: { psi: "Schrödinger field" },
      terms: ["C_2 psi^dagger psi^dagger psi \\nabla^2 psi"],
    };
    const text = JSON.stringify(scaled(contact).working);
    expect(text).toContain("nabla^{2} (\\\\psi^\\\\dagger)^{2}");
    expect(text).not.toContain("partial^{2}");
  });
  it("shows an assigned size at p only, where its dimension is symbolic", () => {
    const plot = scaled({ ...lantern, d: "d", terms: [{ term: "chi^4", assigned: "0.2" }] }).value?.plot;
    expect(plot?.curves.map(({ points }) => points)).toEqual([[[350, 0.2]]]);
  });
  it("lets each number and class be pinned under its row", () => {
    const scalars = new Map(evaluation.scalars.map(({ id, value }) => [id, value]));
    expect(scalars.get("Q")).toEqual({ type: "number", value: 0.109375, sigma: 0.013671875 });
    expect(scalars.get("t4/dimension")).toEqual({ type: "exact", text: "6" });
    expect(scalars.get("t4/coefficient")).toEqual({ type: "exact", text: "-2" });
    expect(scalars.get("t4/class")).toEqual({ type: "word", text: "irrelevant" });
    expect(scalars.get("t4/size")).toEqual({
      type: "number",
      value: 0.0059814453125,
      sigma: expect.closeTo(0.001495361328125, 12),
    });
    expect(scaled({ ...lantern, d: "d" }).scalars.find(({ id }) => id === "t4/marginalAt")?.value).toEqual({
      type: "exact",
      text: "3",
    });
  });
  it("derives each term in the notebook's symbols", () => {
    const formulas = evaluation.working.flatMap((step) => (step.step === "formula" ? [step.latex] : []));
    expect(formulas).toContain("\\Delta\\!\\left(\\chi^{6}\\right) = 6[\\chi] = 6");
    expect(formulas).toContain(
      "\\left[\\frac{c_6}{\\Lambda^{2}}\\right] = d - \\left[\\chi^{6}\\right] = 4 - 6 = -2",
    );
    expect(formulas).toContain("Q = \\frac{p}{\\Lambda} = 0.109(14)");
    const symbolic = scaled({ ...lantern, d: "d" }).working.flatMap((step) =>
      step.step === "formula" ? [step.latex] : [],
    );
    expect(symbolic).toContain(
      "\\left[\\frac{c_6}{\\Lambda^{2}}\\right] = d - \\left[\\chi^{6}\\right] = -2d + 6,\\qquad 0 \\text{ at } d = 3",
    );
  });
  it("is plain JSON and LaTeX that KaTeX accepts, in every counting", () => {
    const sketches: readonly Sketch[] = [
      lantern,
      { ...lantern, d: "d" },
      { D: "D", z: "2", fields: { n: "Schrödinger field" }, terms: ["C (n^\\dagger n)^2"] },
    ];
    for (const sketch of sketches)
      for (const at of ["natural size", nda.at])
        for (const couplings of ["not stated", "strong", "weak", "loop-generated"]) {
          const result = scaled(sketch, { at, couplings });
          expect(JSON.parse(JSON.stringify(result))).toEqual(result);
          const prose = [
            ...result.working.flatMap((step) =>
              step.step === "formula" ? [`$${step.latex}$`] : [step.text],
            ),
            ...result.scalars.map(({ label }) => label),
            `$${result.value?.rows[0]?.sizeLatex ?? ""}$`,
          ];
          for (const [, latex = ""] of prose.join("\n").matchAll(/\$([^$]+)\$/g))
            expect(
              () => katex.renderToString(latex, { throwOnError: true, strict: "error" }),
              latex,
            ).not.toThrow();
        }
  });
});
