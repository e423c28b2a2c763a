/** Countings from the literature, each with its source. Values are from memory unless a derivation stands beside them. */
import { describe, expect, it } from "vitest";
import { count, graphOf, ordersOf, valueOf } from "../engine/counting/ask-counting.ts";
import type { Sketch } from "../engine/premises/state.ts";

describe("pions", () => {
  const theory: Sketch = {
    fields: { phi: "real scalar" },
    scales: { m: ["140 MeV", "light"], f: "92 MeV", p: ["140 MeV", "probe"], Lambda: ["700 MeV", "heavy"] },
    terms: ["1/2 (∂phi)^2", "1/f^2 d^2 phi^4", "m^2/f^2 phi^4", "l_1/f^4 d^4 phi^4", "1/f^4 d^2 phi^6"],
  };
  const preset = "chiral, mesons";
  const graph = (count: string, legs: string, term = "t2") =>
    graphOf({ theory, preset, vertices: [{ term, count }], legs: [{ field: "phi", count: legs }] });
  // Weinberg 1979, eq. (12) there: ν = 2 + 2L + Σ V_n (n − 2).
  it("count 2 at tree level, 4 at one loop and for one vertex of four derivatives, 6 at two loops", () => {
    expect(graph("1", "4")).toBe("2");
    expect(graph("1", "4", "t3")).toBe("2");
    expect(graph("2", "6")).toBe("2");
    expect(graph("2", "4")).toBe("4");
    expect(graph("1", "4", "t4")).toBe("4");
    expect(graph("3", "4")).toBe("6");
  });
  it("keep quark masses and any number of legs beside momenta, where dimensions would not", () => {
    expect(ordersOf({ theory, preset })).toEqual(["0", "0", "0", "2", "0"]);
    expect(valueOf({ theory, preset }).verdict).toBe("another sequence");
  });
  // The same in d dimensions: 2 + (d − 2) L + Σ V_n (n − 2), by counting momenta.
  it("count 2 + (d − 2) L in any dimension", () => {
    const question = { theory: { ...theory, d: "d" }, preset, legs: [{ field: "phi", count: "4" }] };
    expect(graphOf({ ...question, vertices: [{ term: "t2", count: "2" }] })).toBe("d");
  });
});

describe("nucleons and pions", () => {
  const theory: Sketch = {
    fields: { N: "static heavy field", phi: "real scalar" },
    scales: { m: ["140 MeV", "light"], f: "92 MeV", p: ["140 MeV", "probe"], Lambda: ["700 MeV", "heavy"] },
    terms: [
      "Nbar d N", // kinetic
      "g_A/f Nbar N d phi",
      "C_S Nbar Nbar N N",
      "D_1 d^2 Nbar Nbar N N",
      "c_1 m^2/f^2 Nbar N phi^2",
      "c_D/f Nbar Nbar N N d phi",
      "c_E Nbar Nbar Nbar N N N",
    ],
  };
  const preset = "chiral, with nucleons";
  // Weinberg 1990, 1991: Δ = d + n/2 − 2.
  it("have Δ = 0 for the axial coupling and the contact, 2 for two derivatives, 1 for the three-body terms", () => {
    expect(ordersOf({ theory, preset })).toEqual(["0", "0", "0", "2", "1", "1", "1"]);
  });
  const pairs = (count: string) => [{ field: "N", leg: "pair", count }];
  // ν = 4 − A − 2C + 2L + Σ V Δ with A = 2, C = 1: 0 for one pion and the contact, 2 for two-pion exchange.
  it("count 0 for one-pion exchange and the contact, 2 for two-pion exchange", () => {
    const at = (vertices: readonly Record<string, string>[]) =>
      graphOf({ theory, preset, vertices, legs: pairs("2") });
    expect(at([{ term: "t3", count: "1" }])).toBe("0");
    expect(at([{ term: "t2", count: "2" }])).toBe("0");
    expect(at([{ term: "t2", count: "4" }])).toBe("2");
  });
  // Weinberg 1991, 1992: three nucleons with two pions between Δ = 0 vertices stand at 2 in the other normalisation, where
  // they cancel against the iterated potential; nothing but nucleons in between is enhanced, and said.
  it("count 2 for the leading three-nucleon graph, and say that part of it is iterated", () => {
    const asked = { theory, preset, vertices: [{ term: "t2", count: "4" }], legs: pairs("3") };
    expect(graphOf(asked)).toBe("-1");
    expect(graphOf({ ...asked, offset: "3" })).toBe("2");
    expect(count(asked).notices.map(({ code }) => code)).toContain("pure-nucleon-states");
    const onePion = { ...asked, vertices: [{ term: "t2", count: "2" }], legs: pairs("2") };
    expect(count(onePion).notices.map(({ code }) => code)).not.toContain("pure-nucleon-states");
  });
  // In the other normalisation ν = −2 + 2A − 2C + …: 3A − 6 more. The leading three-nucleon force of three c_E, c_D, c_1
  // stands at 3 there (van Kolck 1994).
  it("count 3 for the three-nucleon contact when 3A − 6 is added", () => {
    const contact = { theory, preset, vertices: [{ term: "t7", count: "1" }], legs: pairs("3") };
    expect(graphOf(contact)).toBe("0");
    expect(graphOf({ ...contact, offset: "3" })).toBe("3");
  });
});

describe("a large scattering length", () => {
  const theory: Sketch = {
    D: "3",
    z: "2",
    fields: { N: "Schrödinger field" },
    scales: { M: "940 MeV", p: ["60 MeV", "probe"], Lambda: ["140 MeV", "heavy"] },
    terms: ["N* d_t N", "C_0 N* N* N N", "C_2 d_i^2 N* N* N N", "C_4 d_i^4 N* N* N N"],
  };
  const preset = "large scattering length";
  const graph = (vertices: readonly Record<string, string>[]) =>
    graphOf({ theory, preset, vertices, legs: [{ field: "N", leg: "pair", count: "2" }] });
  // Kaplan, Savage and Wise 1998: A_{-1} is the sum of all chains of C_0, A_0 has one C_2 p².
  it("puts every chain of C₀ at Q⁻¹ and one insertion of C₂ at Q⁰, of C₄ at Q¹", () => {
    for (const count of ["1", "2", "5"]) expect(graph([{ term: "t2", count }])).toBe("-1");
    expect(graph([{ term: "t3", count: "1" }])).toBe("0");
    expect(
      graph([
        { term: "t2", count: "2" },
        { term: "t3", count: "1" },
      ]),
    ).toBe("0");
    expect(graph([{ term: "t4", count: "1" }])).toBe("1");
  });
  it("is not dimensional analysis", () => {
    expect(valueOf({ theory, preset }).verdict).toBe("another sequence");
    expect(ordersOf({ theory, preset: "nonrelativistic velocity" })).toEqual(["0", "1", "3", "5"]);
  });
});

describe("a nonrelativistic bound state", () => {
  // Lepage et al. 1992, table I: relative to ψ†(iD_t + D²/2M)ψ the terms with 1/M² and D⁴/8M³ are of order v².
  const theory: Sketch = {
    D: "3",
    z: "2",
    fields: {
      psi: "Schrödinger field",
      A: { kind: "gauge potential", dimension: "2" },
      E: { kind: "field strength", dimension: "3" },
      B: { kind: "field strength", dimension: "4" },
    },
    scales: { M: "4.7 GeV" },
    terms: [
      "psi* d_t psi",
      "A psi* psi",
      "1/(2 M) psi* d_i^2 psi",
      "c_1/(8 M^3) psi* d_i^4 psi",
      "c_2/(8 M^2) psi* psi d_i E",
      "c_4/(2 M) psi* psi B",
      "f/M^2 psi* psi* psi psi",
    ],
  };
  it("has kinetic and Coulomb energy alike, spin and relativity at v², the contact at v", () => {
    const preset = "nonrelativistic velocity";
    const rules = [...valueOf({ theory, preset }).proposal.rules].map((rule) =>
      rule.symbol === "B" ? { ...rule, weight: "4" } : { ...rule },
    );
    expect(ordersOf({ theory, preset, rules, parameters: [{ symbol: "v", value: "0.3" }] })).toEqual([
      "0",
      "0",
      "0",
      "2",
      "2",
      "2",
      "1",
    ]);
  });
});

describe("soft and collinear modes", () => {
  const theory: Sketch = {
    fields: { xi: "Dirac spinor", A: "gauge potential" },
    terms: ["xibar d xi", "xibar d A xi", "xibar A A xi"],
  };
  // Bauer, Fleming, Pirjol and Stewart 2001: ξ̄ n·D ξ ~ λ⁴ with d⁴x ~ λ⁻⁴; two transverse gluons as well.
  it("give leading collinear vertices no power of λ", () => {
    expect(
      ordersOf({ theory, preset: "soft-collinear", exceptions: [{ term: "t2", weight: "-1" }] }),
    ).toEqual(["0", "0", "0"]);
  });
  // δ = 4 + 4u + Σ (k − 4) V^C + Σ (k − 8) V^U: the measure of what is only ultrasoft counts four less, u = 1 adds four.
  it("give δ = 4 to leading collinear graphs and 8 to ultrasoft ones, however many loops", () => {
    const gluons: Sketch = { fields: { a: "gauge potential" }, terms: ["g d a^3"] };
    const rules = [
      { of: "field", symbol: "a", weight: "2" },
      { of: "derivative", weight: "2" },
      { of: "measure", weight: "-4" },
    ];
    const ultrasoft = { theory: gluons, preset: "soft-collinear", rules, offset: "4" };
    const exceptions = [{ term: "t1", weight: "-4" }];
    const delta = (asked: Parameters<typeof valueOf>[0]) =>
      valueOf(asked)
        .graph?.withLegs.map(({ text }) => text)
        .join();
    for (const count of ["2", "4"]) {
      const vertices = [{ term: "t1", count }];
      expect(delta({ ...ultrasoft, exceptions, vertices, legs: [{ field: "a", count: "2" }] })).toBe("8");
    }
    const collinear = { theory, preset: "soft-collinear", exceptions: [{ term: "t2", weight: "-1" }] };
    const legs = [{ field: "xi", leg: "pair" }];
    for (const count of ["2", "4"])
      expect(delta({ ...collinear, vertices: [{ term: "t2", count }], legs })).toBe("4");
  });
});

describe("a heavy quark", () => {
  // Neubert 1994: kinetic energy and magnetic moment at 1/m_Q; Darwin and spin-orbit terms at 1/m_Q² (from memory).
  it("counts powers of 1/m", () => {
    const theory: Sketch = {
      fields: { h: "static heavy field", A: "gauge potential", G: "field strength" },
      scales: { p: ["0.5 GeV", "probe"], m: ["4.8 GeV", "heavy"] },
      terms: ["g hbar A h", "1/(2 m) hbar d^2 h", "g/(4 m) hbar h G", "g/(8 m^2) hbar h d G"],
    };
    expect(ordersOf({ theory, preset: "heavy quark" })).toEqual(["0", "1", "1", "2"]);
    expect(valueOf({ theory, preset: "heavy quark" }).verdict).toBe("just by dimension");
  });
});

describe("gravity", () => {
  const quantum: Sketch = {
    fields: { h: "metric fluctuation" },
    scales: { p: ["1 GeV", "probe"], M: ["2.4e18 GeV", "heavy"] },
    terms: ["1/M d^2 h^3", "c/M^3 d^4 h^3"],
  };
  // Donoghue 1994: each loop (E/M)²; curvature squared like one loop.
  it("at low energy counts two powers of E/M for each loop", () => {
    const preset = "gravity at low energy";
    const at = (count: string, legs: string, term = "t1") =>
      graphOf({ theory: quantum, preset, vertices: [{ term, count }], legs: [{ field: "h", count: legs }] });
    expect(at("2", "4")).toBe("2");
    expect(at("4", "4")).toBe("4");
    expect(at("6", "4")).toBe("6");
    expect(at("1", "3", "t2")).toBe("4");
  });
  // Goldberger and Rothstein 2006, table 2: source m H/m_Pl ~ L^{1/2}, bulk H³ ~ v²/L^{1/2}, source m v² H ~ v² L^{1/2}.
  it("of slow bodies counts L^{1/2} for a source and v²/L^{1/2} for the cubic vertex", () => {
    const theory: Sketch = {
      D: "3",
      z: "1",
      fields: { H: { kind: "metric fluctuation", dimension: "1" } },
      scales: { m: ["1", "light"], M: ["1", "heavy"] },
      terms: ["m/M H", "1/M d_i^2 H^3", "m/M^2 H^2"],
    };
    expect(ordersOf({ theory, preset: "post-Newtonian" })).toEqual(["0, -1/2", "2, 1/2", "2, 0"]);
    // As Lagrangians, one v above the action: Newton's potential L, three sources at the cubic vertex v² L (first order).
    const at = (vertices: readonly Record<string, string>[]) =>
      graphOf({ theory, preset: "post-Newtonian", vertices });
    expect(at([{ term: "t1", count: "2" }])).toBe("1, -1");
    expect(
      at([
        { term: "t1", count: "3" },
        { term: "t2", count: "1" },
      ]),
    ).toBe("3, -1");
  });
});

describe("a Fermi surface", () => {
  const theory: Sketch = {
    D: "2",
    z: "1",
    fields: { psi: { kind: "Schrödinger field", dimension: "1/2" } },
    terms: ["psi* d_t psi", "V psi* psi* psi psi"],
  };
  // Polchinski 1992, Shankar 1994: forward scattering and pairing are marginal, a generic quartic falls with s.
  it("leaves forward scattering and pairs marginal and lets generic scattering fall", () => {
    expect(ordersOf({ theory, preset: "Fermi surface" })).toEqual(["0", "0"]);
    const generic = [{ term: "t2", weight: "1" }];
    expect(ordersOf({ theory, preset: "Fermi surface", exceptions: generic })).toEqual(["0", "1"]);
  });
});
