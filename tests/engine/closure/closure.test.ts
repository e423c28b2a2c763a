/** Closure: refusals, selection, bounds, and that what it finds is closed. Own derivations throughout. */
import { describe, expect, it } from "vitest";
import { closureOf, askClosure, demanded, missing } from "./ask.ts";
import { isMissing } from "#engine/closure/value.ts";
import { theoryOf, type TheorySketch } from "../theory-builder.ts";
import { typed } from "../typed-premises.ts";

const codes = (...asked: Parameters<typeof askClosure>) =>
  askClosure(...asked).problems.map(({ code }) => code);

const scalar: TheorySketch = { fields: { phi: "real scalar" }, terms: { m: "phi2", l: "phi4" } };
const pair = theoryOf({
  symmetries: [2],
  fields: { phi: { kind: "real scalar", charges: [1] }, chi: "real scalar" },
  terms: { a: "phi2", b: "chi2", l: "phi4", k: "phi2 chi2", h: "chi4", c: "phi6" },
});

describe("what cannot be asked", () => {
  it("says why, and where", () => {
    const theory = theoryOf(scalar);
    expect(codes(null)).toEqual(["premises-missing"]);
    expect(codes(theory, { maxLoops: "9" })).toEqual(["cap-unreadable"]);
    expect(codes(theory, { maxOrder: "two" })).toEqual(["cap-unreadable"]);
    expect(codes(theory, { shift: "chi" })).toEqual(["shift-unknown"]);
    expect(codes(theoryOf({ ...scalar, d: "d" }))).toEqual(["closure-needs-numbers"]);
    const fermion = theoryOf({ fields: { psi: "Dirac spinor" }, terms: { g: "psi~2 psi2" } });
    expect(codes(fermion, { shift: "psi" })).toEqual(["shift-not-scalar"]);
  });
  it("leaves out terms that break what is imposed, and says so", () => {
    const broken = theoryOf(scalar);
    const { value, problems } = askClosure(broken, { shift: "phi" });
    expect(problems.map(({ code, facts }) => [code, facts["latex"]])).toEqual([
      ["closure-term-breaks-shift", "phi2"],
      ["closure-term-breaks-shift", "phi4"],
    ]);
    expect(value?.operators).toEqual([]);
  });
});

describe("selection", () => {
  it("by charges: an odd field comes in pairs, and undeclared symmetries of the terms hold by themselves", () => {
    const texts = Object.keys(demanded(pair, { maxOrder: "2" }));
    expect(texts).toContain("phi^4 chi^2");
    // χ → −χ is declared nowhere, and no term breaks it.
    expect(texts.filter((text) => /chi(?:\^[135])?(?: |$)/.test(text))).toEqual([]);
  });
  it("without the symmetries' selection, what only they forbid is demanded no more than graphs allow", () => {
    expect(demanded(pair, { maxOrder: "2", symmetries: "no" })).toEqual(demanded(pair, { maxOrder: "2" }));
  });
  it("a term that breaks a symmetry is not inserted while symmetries select", () => {
    const theory = typed({
      symmetries: ["parity|Z2"],
      fields: ["phi|real scalar||odd"],
      terms: ["g phi^3", "lambda phi^4"],
    });
    expect(askClosure(theory).problems.map(({ code }) => code)).toEqual(["closure-term-forbidden"]);
    expect(demanded(theory)).not.toHaveProperty("phi^3");
    expect(demanded(theory, { symmetries: "no" })).toHaveProperty("phi^3");
  });
  it("a mass that turns one field into another lets graphs mix them", () => {
    const mixing = (terms: Record<string, string>) =>
      theoryOf({
        fields: { phi: "real scalar", chi: "real scalar" },
        terms: { l: "phi4", c: "phi6", k: "phi2 chi2", ...terms },
      });
    expect(demanded(mixing({}), { maxOrder: "2" })).not.toHaveProperty("phi^3 chi");
    expect(demanded(mixing({ x: "phi chi" }), { maxOrder: "2" })["phi^3 chi"]).toBe("2");
  });
});

describe("caps", () => {
  it("legs follow from the order where they are not given, and a lower cap is said", () => {
    expect(closureOf(pair, { maxOrder: "4" }).caps.legs).toBe(8);
    const cut = askClosure(pair, { maxOrder: "4", maxLegs: "6" });
    expect(cut.notices.map(({ code }) => code)).toContain("closure-legs-cut");
    expect(cut.value?.legsBeyond).toBe(8);
    expect(cut.value?.operators.every(({ legs }) => legs <= 6)).toBe(true);
  });
  it("higher caps only add, and never raise an order", () => {
    const low = demanded(pair, { maxOrder: "2", maxLoops: "1" });
    const high = demanded(pair, { maxOrder: "4", maxLoops: "2" });
    for (const [text, order] of Object.entries(low))
      expect(Number(high[text]), text).toBeLessThanOrEqual(Number(order));
  });
});

describe("what demands an operator", () => {
  const { operators } = closureOf(pair, { maxOrder: "4" });
  it("is a one-particle irreducible graph with the operator's legs, the loops and the insertions named", () => {
    for (const { graph, vertices, loops, legs, text } of operators) {
      if (!graph) throw new Error(`no graph of ${text}`);
      expect(graph.loops, text).toBe(loops);
      expect(graph.legs.reduce((sum, { count }) => sum + count, 0)).toBe(legs);
      expect(graph.vertices).toHaveLength(vertices.reduce((sum, { count }) => sum + count, 0));
    }
  });
  it("has ω = d − Σ E δ − Σ V [g] = derivatives + remainder, and the order of its insertions", () => {
    for (const { omega, remainder, derivatives, legs, vertices, insertionOrder, order } of operators) {
      const taken = vertices.reduce(
        (sum, { count, coefficient }) => sum + count * Number(coefficient.text),
        0,
      );
      expect(Number(omega.text)).toBe(4 - legs - taken);
      expect(Number(omega.text)).toBe(derivatives + Number(remainder.text));
      expect(order).toEqual(insertionOrder);
    }
  });
  it("sees momenta where there are more derivatives than at its vertices", () => {
    const sunset = closureOf(theoryOf(scalar), { maxOrder: "0" }).operators.find(
      ({ derivatives }) => derivatives === 2,
    );
    expect(sunset?.graph?.edges).toEqual([{ from: 0, to: 1, field: 0, count: 3 }]);
  });
});

describe("what is missing, added to the premises", () => {
  it("reads as the operator, and leaves nothing missing", () => {
    const base = {
      symmetries: ["parity|Z2"],
      fields: ["phi|real scalar||odd", "s|complex scalar", "psi|Dirac spinor"],
      scales: ["Lambda|3 TeV|heavy"],
    };
    const terms = ["m phi^2", "lambda phi^4", "k phi^2 s^\\dagger s", "c_1/Lambda phi^2 psibar psi"];
    const theoryWith = (all: readonly string[]) => typed({ ...base, terms: all });
    let [all, rounds] = [[...terms], 0];
    let value = closureOf(theoryWith(all), { maxOrder: "2" });
    // Again where that demands more: a term that is written down counts at the order of its dimension, which may be
    // lower than the one at which it was demanded. Here that is the fermion's mass.
    while (value.missing > 0 && rounds < 4) {
      const added = value.operators.filter(isMissing).map(({ term }) => term);
      expect(new Set(added).size).toBe(added.length);
      all = [...all, ...added];
      const theory = theoryWith(all);
      expect(theory.problems).toEqual([]);
      const before = Object.fromEntries(value.operators.map(({ text, order }) => [text, order.text]));
      value = closureOf(theory, { maxOrder: "2" });
      for (const { text, order } of value.operators)
        expect(Number(order.text), text).toBeLessThanOrEqual(Number(before[text] ?? 2));
      rounds += 1;
    }
    expect(all.length).toBeGreaterThan(terms.length + 10);
    expect([value.verdict, rounds]).toEqual(["closed", 2]);
  });
  it("in anisotropic theories names its directions", () => {
    const theory = typed({
      D: "3",
      fields: ["psi|Schrödinger field"],
      terms: ["g (psi^\\dagger psi)^2"],
    });
    const [three] = closureOf(theory, { maxOrder: "4" }).operators.filter(isMissing);
    expect(three?.term).toBe("c_1 (psi^\\dagger)^3 psi^3");
  });
});

describe("independence", () => {
  it("scalars by polynomials in Mandelstam invariants: one of degree two on four equal legs, none of degree one", () => {
    const { operators } = closureOf(theoryOf({ ...scalar, terms: { l: "phi4", c: "phi6" } }), {
      maxOrder: "4",
    });
    const of = Object.fromEntries(
      operators.map(({ text, independence, structures }) => [text, [independence, structures]]),
    );
    expect(of["d^2 phi^4"]).toEqual(["redundant", 0]);
    expect(of["d^4 phi^4"]).toEqual(["independent", 1]);
    expect(of["d^2 phi^2"]).toEqual(["normalisation", null]);
  });
  it("Dirac spinors by both chiralities: ψ̄ψ and ψ̄γ₅ψ with a scalar", () => {
    const yukawa = theoryOf({
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: { y: "psi~ psi phi" },
    });
    const { operators } = closureOf(yukawa, { maxOrder: "0" });
    expect(operators.find(({ text }) => text === "phi psibar psi")?.structures).toBe(2);
  });
});

it("missing operators are those of the value, order by order", () => {
  const { orders, operators } = closureOf(pair, { maxOrder: "4" });
  expect(orders.reduce((sum, { demanded: all }) => sum + all, 0)).toBe(operators.length);
  expect(Object.keys(missing(pair, { maxOrder: "4" }))).toHaveLength(
    orders.reduce((sum, { missing: lacking }) => sum + lacking, 0),
  );
});
