import katex from "katex";
import { describe, expect, it } from "vitest";
import { ask, betas, codes, real, scalar, type Question } from "./ask.ts";

const quartic = real("m^2/2 phi^2", "lambda/4! phi^4");
const problems = (question: Question) => codes(ask(question).problems);
const notices = (question: Question) => codes(ask(question).notices);
const strong = { group: "SU(3)", symbol: "alpha_s", given: "α = g²/4π", value: "0.118" };

describe("what runs", () => {
  it("is the coupling, without the scale it stands with", () => {
    const theory = {
      fields: { phi: "real scalar" as const },
      scales: { Lambda: ["10 TeV", "heavy"] as const },
      terms: ["lambda/4! phi^4", "c/Lambda^2 phi^6"],
    };
    expect(betas({ theory })).toEqual({ lambda: "3\\,\\lambda^{2}", c: "15\\,\\lambda\\,c" });
  });
  it("lets a mass feed irrelevant couplings down, with its scale", () => {
    const theory = {
      fields: { phi: "real scalar" as const },
      scales: { Lambda: ["10 TeV", "heavy"] as const, m: "100 GeV" },
      terms: ["m^2/2 phi^2", "lambda/4! phi^4", "c/Lambda^2 phi^6"],
    };
    expect(betas({ theory })["lambda"]).toBe("3\\,\\lambda^{2} + 720\\,\\frac{c\\,m^{2}}{\\Lambda^{2}}");
    // dλ/dlnμ = (3·0.01 + 720·0.5·10⁻⁴)/16π² at the start, where both hardly move.
    const question: Question = {
      theory,
      values: { lambda: "0.1", c: "0.5" },
      from: "1 TeV",
      to: "1.001 TeV",
    };
    const change = scalar(question, "lambda/to") - 0.1;
    expect(change / ((0.03 + 0.036) / (16 * Math.PI ** 2)) / Math.log(1.001)).toBeCloseTo(1, 4);
  });
  it("takes the sign of the Lagrangian where told", () => {
    const theory = real("-lambda/4! phi^4");
    expect(betas({ theory, sign: "as in the Lagrangian, −V" })["lambda"]).toBe("3\\,\\lambda^{2}");
    expect(betas({ theory })["lambda"]).toBe("-3\\,\\lambda^{2}");
  });
  it("adds the Hermitian conjugate that nobody wrote, and none that somebody did", () => {
    const fields = { phi: "complex scalar" as const };
    const one: Question = { theory: { fields, terms: ["m^2 phi* phi", "lambda (phi* phi)^2", "b phi^2"] } };
    const both: Question = { theory: { fields, terms: [...(one.theory?.terms ?? []), "b (phi*)^2"] } };
    expect(notices(one)).toContain("hermitian-conjugate-added");
    expect(notices(both)).not.toContain("hermitian-conjugate-added");
    expect(betas(one)).toEqual(betas(both));
    // By hand: V″ has λφ*² + 2b and 4λ|φ|² + m²: ½·2·(…)² gives 2λb·(φ² + φ*²)·… = 4λb before φ².
    expect(betas(one)["b"]).toBe("4\\,\\lambda\\,b");
  });
  it("says what it makes beyond the premises", () => {
    const found = ask({ theory: real("lambda/4! phi^4", "tau/6! phi^6") }).value?.generated ?? [];
    expect(found.map(({ operatorLatex }) => operatorLatex)).toEqual(["\\phi^{8}"]);
  });
  it("gives a Weyl coupling the same β however its chiralities are written", () => {
    const fields = { H: "complex scalar" as const, q: "Weyl spinor" as const, t: "Weyl spinor" as const };
    const barred = betas({ theory: { fields, terms: ["lambda (H* H)^2", "y qbar t H"] } });
    expect(barred).toEqual(betas({ theory: { fields, terms: ["lambda (H* H)^2", "y q t H"] } }));
    expect(barred["y"]).toBe("2\\,y^{3}");
  });
});

describe("refusals", () => {
  it.each<[string, Question, string]>([
    ["nothing at all", {}, "nothing-runs"],
    ["another dimension", { theory: { ...quartic, d: "3" } }, "running-needs-four"],
    [
      "anisotropic spacetime",
      { theory: { D: "3", z: "2", fields: { phi: "anisotropic scalar" }, terms: ["g phi^4"] } },
      "nothing-runs",
    ],
    [
      "couplings that share an operator",
      { theory: real("lambda/4! phi^4", "g phi^4") },
      "couplings-dependent",
    ],
    [
      "a relation that running breaks",
      {
        theory: {
          fields: { a: "real scalar", b: "real scalar" },
          terms: ["u/4! a^4", "u a^2 b^2", "u/4! b^4"],
        },
      },
      "couplings-driven-apart",
    ],
    [
      "one coupling with two scales",
      { theory: real("c/M^2 phi^6", "c/M^4 phi^8") },
      "coupling-at-two-scales",
    ],
    [
      "odd powers of a vector",
      { theory: real("g phi^3", "lambda phi^4"), components: { phi: "2" } },
      "components-odd",
    ],
    ["components of nothing", { theory: quartic, components: { chi: "2" } }, "running-field-unknown"],
    [
      "components without number",
      { theory: quartic, components: { phi: "many" } },
      "running-components-unreadable",
    ],
    ["an unknown group", { groups: [{ group: "E(8)" }] }, "running-group-not-known"],
    [
      "an unknown representation",
      { groups: [strong], content: [{ name: "q", charges: "5" }] },
      "representation-not-known",
    ],
    [
      "a charge that is none",
      { groups: [{ group: "U(1)" }], content: [{ name: "q", charges: "x" }] },
      "charge-not-a-number",
    ],
    [
      "a charged real scalar",
      { groups: [{ group: "U(1)" }], content: [{ name: "q", charges: "1", kind: "real scalar" }] },
      "real-scalar-charged",
    ],
    [
      "copies that are none",
      { groups: [strong], content: [{ name: "q", charges: "3", copies: "few" }] },
      "running-copies-unreadable",
    ],
    ["fixed points of gauge couplings", { groups: [strong], about: "4 - eps" }, "fixed-points-need-premises"],
    ["no marginal coupling", { theory: real("m^2/2 phi^2"), about: "4 - eps" }, "no-marginal-coupling"],
    ["ε that is none", { theory: quartic, about: "4 - eps", epsilon: "-1" }, "epsilon-unreadable"],
    ["equal scales", { theory: quartic, from: "1 GeV", to: "1000 MeV" }, "running-scales-same"],
    ["scales of different kinds", { theory: quartic, from: "1 GeV", to: "2" }, "units-differ"],
    [
      "a scale outside",
      { theory: quartic, from: "1 GeV", to: "2 GeV", at: ["3 GeV"] },
      "running-scale-outside",
    ],
    [
      "an unknown coupling",
      { theory: quartic, from: "1 GeV", to: "2 GeV", values: { g: "1" } },
      "running-coupling-unknown",
    ],
    [
      "a mass without unit",
      { theory: quartic, from: "1 GeV", to: "2 GeV", values: { "m^2": "1" } },
      "running-value-dimension",
    ],
    [
      "a coupling too strong",
      { theory: quartic, from: "1 GeV", to: "2 GeV", values: { lambda: "60" } },
      "start-nonperturbative",
    ],
  ])("%s", (_, question, code) => {
    expect(problems(question)).toContain(code);
  });

  it.each<[string, Question, string]>([
    ["no scales", { theory: quartic }, "running-scales-missing"],
    [
      "a value missing",
      { theory: quartic, from: "1 GeV", to: "2 GeV", values: { "m^2": "1 GeV^2" } },
      "start-missing",
    ],
    [
      "gauge values missing",
      { groups: [{ group: "SU(3)" }], from: "1 GeV", to: "2 GeV" },
      "gauge-values-missing",
    ],
    ["derivatives", { theory: real("lambda phi^4", "c/M^2 (dphi)^2 phi^2") }, "running-left-out"],
    ["a coupling that is a number", { theory: real("lambda phi^4", "1/6 phi^3") }, "running-left-out"],
    ["a pole", { theory: quartic, from: "1 GeV", to: "1e60 GeV", values: { lambda: "1" } }, "running-pole"],
    [
      "three quartics",
      {
        theory: { fields: { a: "real scalar", b: "real scalar" }, terms: ["u a^4", "v b^4", "w a^2 b^2"] },
        about: "4 - eps",
      },
      "fixed-points-searched",
    ],
  ])("notices %s", (_, question, code) => {
    expect(notices(question)).toContain(code);
  });

  it("runs what does not stand on the missing value", () => {
    const found = ask({ theory: quartic, from: "1 GeV", to: "2 GeV", values: { lambda: "0.1" } });
    expect(found.value?.couplings.map(({ id }) => id)).toEqual(["lambda"]);
  });
});

describe("fixed points of several couplings", () => {
  // Two quartics that do not see each other: four points of the product, and those of the coupled theory.
  it("of two scalars contain the two decoupled ones and the vector", () => {
    const theory = {
      fields: { a: "real scalar" as const, b: "real scalar" as const },
      terms: ["u/4! a^4", "v/4! b^4", "w/4 a^2 b^2"],
    };
    const points = ask({ theory, about: "4 - eps" }).value?.fixedPoints ?? [];
    const found = points.map(({ couplings }) => couplings.map(({ value }) => value / (16 * Math.PI ** 2)));
    const near = (...values: number[]) => values.map((value) => expect.closeTo(value, 6) as number);
    for (const point of [
      near(0, 0, 0),
      near(1 / 3, 0, 0),
      near(0, 1 / 3, 0),
      near(1 / 3, 1 / 3, 0),
      near(0.3, 0.3, 0.1),
    ])
      expect(found).toContainEqual(point);
    // Both Ising points rotated by 45°: u = v = w = 1/6.
    expect(found).toContainEqual(near(1 / 6, 1 / 6, 1 / 6));
    expect(found).toHaveLength(6);
  });
  // Own derivation: each of the three quartic couplings falls as −ε where all vanish; one root three times over.
  it("gives exponents that repeat as exactly as those that do not", () => {
    const theory = {
      fields: { a: "real scalar" as const, b: "real scalar" as const },
      terms: ["u/4! a^4", "v/4! b^4", "w/4 a^2 b^2"],
    };
    const question: Question = { theory, about: "4 - eps" };
    const slopes = ["gaussian/4.1", "gaussian/4.2", "gaussian/4.3"].map((id) =>
      scalar(question, `${id}/slope`),
    );
    expect(slopes).toEqual([-1, -1, -1]);
    expect(scalar(question, "u=1/6,v=1/6,w=1/6/4.2/slope")).toBe(0);
  });
});

describe("working and values", () => {
  const all: Question[] = [
    { theory: quartic, from: "1 GeV", to: "1e60 GeV", values: { lambda: "1", "m^2": "1 GeV^2" } },
    { theory: real("m^2/2 phi^2", "lambda/4! phi^4"), about: "4 - eps", components: { phi: "3" } },
    { theory: real("tau/6! phi^6"), about: "3 - eps" },
    {
      groups: [strong],
      content: [{ name: "q", kind: "Dirac fermion", charges: "3", copies: "5", mass: "5 GeV" }],
      from: "91 GeV",
      to: "2 GeV",
      gaugeLoops: "2",
    },
  ];
  it.each(all.map((question, index) => [index, question] as const))("typeset (%i)", (_, question) => {
    const { value, working } = ask(question);
    for (const step of working) {
      if (step.step === "formula")
        expect(() => katex.renderToString(step.latex, { throwOnError: true })).not.toThrow();
      else
        for (const [, latex = ""] of step.text.matchAll(/\$([^$]+)\$/g))
          expect(() => katex.renderToString(latex, { throwOnError: true })).not.toThrow();
    }
    for (const { leftLatex, rightLatex } of value?.betas ?? [])
      expect(() =>
        katex.renderToString(`${leftLatex} = ${rightLatex}`, { throwOnError: true }),
      ).not.toThrow();
    expect(working.length).toBeGreaterThan(4);
  });
  it("have scalars of different names", () => {
    for (const question of all) {
      const ids = ask(question).scalars.map(({ id }) => id);
      expect(new Set(ids).size).toBe(ids.length);
      expect(ids.length).toBeGreaterThan(1);
    }
  });
});
