/**
 * What renormalisation demands, order by order, against textbooks and papers. Lists follow from ω = d − Σ E δ − Σ V [g]
 * and were worked out by hand; the line says which statement of the source they are, and where it is remembered only.
 */
import { describe, expect, it } from "vitest";
import { closureOf, demanded, missing } from "../engine/closure/ask.ts";
import { theoryOf } from "../engine/theory-builder.ts";

const phi = (n: number, d: number) =>
  theoryOf({ d, fields: { phi: "real scalar" }, terms: { m: "phi2", g: `phi${n}` } });

describe("renormalisable theories close on themselves", () => {
  // Collins (1984) chapter 5, Peskin and Schroeder (1995) section 10.2: mass, field and coupling, the field from two loops.
  it("φ⁴ in d = 4 closes on φ², (∂φ)² and φ⁴", () => {
    const { operators, verdict } = closureOf(phi(4, 4), { maxOrder: "0" });
    expect(operators.map(({ text, loops }) => [text, loops])).toEqual([
      ["phi^2", 1],
      ["d^2 phi^2", 2],
      ["phi^4", 1],
    ]);
    expect(verdict).toBe("closed");
  });
  // Collins (1984) sections 3.3 and 5.7: a linear counterterm too, as nothing forbids it; all from one loop.
  it("φ³ in d = 6 also asks for a term linear in φ", () => {
    expect(demanded(phi(3, 6), { maxOrder: "0" })).toEqual({
      phi: "0",
      "phi^2": "0",
      "d^2 phi^2": "0",
      "phi^3": "0",
    });
    expect(missing(phi(3, 6), { maxOrder: "0" })).toEqual({ phi: "0" });
  });
  // Pisarski 1982, Phys. Rev. Lett. 48, 574 (from memory): φ⁶ runs from two loops, the field's dimension from four.
  it("φ⁶ in d = 3: the coupling at two loops, the field at four, nothing at one and three", () => {
    const upTo = (maxLoops: string) => Object.keys(demanded(phi(6, 3), { maxOrder: "0", maxLoops }));
    expect(upTo("1")).toEqual([]);
    expect(upTo("2")).toEqual(["phi^6"]);
    expect(upTo("3")).toEqual(["phi^6"]);
    expect(upTo("4")).toEqual(["phi^2", "d^2 phi^2", "phi^6"]);
  });
  // Peskin and Schroeder (1995) section 10.2 and problem 10.2: Yukawa theory needs φ⁴.
  it("Yukawa theory demands φ⁴; φ³ and φ only with a fermion mass, which breaks chirality", () => {
    const yukawa = (terms: Record<string, string>) =>
      theoryOf({
        fields: { phi: "real scalar", psi: "Dirac spinor" },
        terms: { y: "psi~ psi phi", m: "phi2", ...terms },
      });
    expect(missing(yukawa({}), { maxOrder: "0" })).toEqual({ "phi^4": "0" });
    expect(missing(yukawa({ M: "psi~ psi" }), { maxOrder: "0" })).toEqual({
      phi: "0",
      "phi^3": "0",
      "phi^4": "0",
    });
  });
  // Peskin and Schroeder (1995) section 10.3: mass, ∂̸, charge and the photon's kinetic term, which Ward identities leave.
  it("quantum electrodynamics closes", () => {
    const qed = theoryOf({
      fields: { A: "gauge potential", psi: "Dirac spinor" },
      terms: { m: "psi~ psi", e: "psi~ psi A" },
    });
    expect(demanded(qed, { maxOrder: "2" })).toEqual({
      "psibar psi": "0",
      "d^2 A^2": "0",
      "d psibar psi": "0",
      "A psibar psi": "0",
    });
    expect(closureOf(qed, { maxOrder: "2" }).verdict).toBe("closed");
  });
});

describe("gauge theories", () => {
  // Collins (1984) chapter 12, Srednicki (2007) chapter 72: the premises' own terms absorb all that diverges.
  it("Yang–Mills theory with ghosts and fermions closes", () => {
    const yangMills = theoryOf({
      fields: { A: "gauge potential", c: "ghost", psi: "Dirac spinor" },
      terms: {
        three: { fields: "A3", derivatives: 1 },
        four: "A4",
        ghost: { fields: "c~ c A", derivatives: 1 },
        quark: "psi~ psi A",
        mass: "psi~ psi",
      },
    });
    expect(missing(yangMills, { maxOrder: "0" })).toEqual({});
    expect(closureOf(yangMills, { maxOrder: "0" }).verdict).toBe("closed");
  });
});

describe("theories that need new terms at every order", () => {
  // Weinberg 1979, Physica A 96, 327, section 3: one loop of the two-derivative terms asks for four derivatives. Here with
  // (∂φ)⁴/Λ⁴, whose shift symmetry forbids everything with fewer: own derivation, k = 4L + Σ V k_i − 2 I.
  it("(∂φ)⁴ in d = 4: eight derivatives on four legs from one loop, at 1/Λ⁸", () => {
    const goldstone = theoryOf({
      fields: { phi: "real scalar" },
      terms: { c: { fields: "phi4", derivatives: 4 } },
    });
    const { operators } = closureOf(goldstone, { maxOrder: "8", maxLoops: "1", shift: "phi" });
    expect(operators.map(({ text, order }) => [text, order.text])).toEqual([["d^8 phi^4", "8"]]);
    expect(operators[0]?.vertices).toMatchObject([{ termRowId: "c", count: 2 }]);
    // Without the shift symmetry masses come in, and with them φ² and everything between.
    expect(missing(goldstone, { maxOrder: "4", maxLoops: "1" })).toEqual({
      "phi^2": "4",
      "d^4 phi^2": "4",
    });
  });

  // Burgess 2007, Ann. Rev. Nucl. Part. Sci. 57, 329, section 3 (from memory): with dimensional regularisation graphs with
  // insertions of total order n renormalise operators of order n alone. The list itself: own derivation.
  const six = theoryOf({
    symmetries: [2],
    fields: { phi: { kind: "real scalar", charges: [1] } },
    terms: { m: "phi2", lambda: "phi4", c: "phi6" },
  });
  it("φ⁶/Λ² once renormalises itself with λ; twice it demands φ⁸, and with ∂²φ⁴ also ∂⁴φ⁴, at 1/Λ⁴", () => {
    const { operators, verdict } = closureOf(six, { maxOrder: "4" });
    const of = (text: string) => operators.find((operator) => operator.text === text);
    expect(of("phi^6")?.vertices).toMatchObject([
      { termRowId: "lambda", count: 1 },
      { termRowId: "c", count: 1 },
    ]);
    expect(of("phi^8")).toMatchObject({ order: { text: "4" }, loops: 1, presentAs: null });
    expect(of("phi^8")?.vertices).toMatchObject([{ termRowId: "c", count: 2 }]);
    expect(of("d^4 phi^4")).toMatchObject({ order: { text: "4" }, independence: "independent" });
    expect(verdict).toBe("not closed");
    expect(closureOf(six, { maxOrder: "2" }).verdict).toBe("closed up to redundant operators");
  });
  it("dimensions at each order: what is first demanded at order n has at most dimension 4 + n", () => {
    for (const { order, dimension } of closureOf(six, { maxOrder: "4" }).operators)
      expect(Number(dimension.text)).toBeLessThanOrEqual(4 + Number(order.text));
  });

  // Four-fermion theory: ω = 4 − 3E/2 + 2V (Peskin and Schroeder 1995, section 10.1).
  it("a four-fermion contact term demands derivatives on four legs at 1/Λ⁴, six and eight legs later", () => {
    const fermi = theoryOf({ fields: { psi: "Dirac spinor" }, terms: { G: "psi~2 psi2" } });
    expect(missing(fermi, { maxOrder: "4", maxLoops: "1" })).toEqual({ "d^2 psibar^2 psi^2": "4" });
    expect(missing(fermi, { maxOrder: "6", maxLoops: "1" })).toMatchObject({
      "d^2 psibar^2 psi^2": "4",
      "d psibar^3 psi^3": "6",
    });
  });

  // Braaten and Nieto 1999, Eur. Phys. J. B 11, 143: the contact coupling of two bosons does not run in dimensional
  // regularisation, and that of three does, from two loops and four two-body vertices.
  it("nonrelativistic bosons in D = 3: three-body contact from four two-body ones at two loops, and nothing else", () => {
    const bosons = theoryOf({ D: 3, fields: { psi: "Schrödinger field" }, terms: { g: "psi~2 psi2" } });
    const { operators } = closureOf(bosons, { maxOrder: "4" });
    expect(operators.map(({ text, loops, vertices }) => [text, loops, vertices[0]?.count])).toEqual([
      ["psi*^3 psi^3", 2, 4],
    ]);
  });
});

describe("with a cutoff", () => {
  // Burgess 2007, section 3.2 (from memory); Polchinski 1984, Nucl. Phys. B 231, 269: operators of lower dimension are
  // renormalised too, by powers of the cutoff.
  it("φ⁶/Λ² demands φ⁴ and φ² without a price in 1/Λ, where dimensional regularisation asks for a mass", () => {
    const theory = theoryOf({ fields: { phi: "real scalar" }, terms: { c: "phi6" } });
    expect(demanded(theory, { regulator: "cutoff", maxLoops: "2" })).toMatchObject({
      "phi^2": "0",
      "phi^4": "0",
    });
    expect(demanded(theory, { maxLoops: "2" })).toMatchObject({ "phi^2": "2", "phi^4": "2" });
    expect(demanded(theory, { maxLoops: "2", masses: "none: a massless theory" })).toEqual({});
  });
  // Weisskopf 1939, Phys. Rev. 56, 72: the electron's self-energy diverges as a logarithm, as chirality protects its mass.
  it("chirality protects a fermion's mass from a power of the cutoff", () => {
    const qed = (terms: Record<string, string>) =>
      theoryOf({
        fields: { A: "gauge potential", psi: "Dirac spinor" },
        terms: { e: "psi~ psi A", ...terms },
      });
    expect(demanded(qed({}), { regulator: "cutoff" })).not.toHaveProperty("psibar psi");
    expect(demanded(qed({ m: "psi~ psi" }), { regulator: "cutoff" })).toHaveProperty("psibar psi");
  });
});
