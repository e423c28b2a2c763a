/**
 * Degrees of divergence and lists of divergent amplitudes against textbooks and papers. Lists were enumerated
 * independently of this engine; where a statement was only remembered, the line says so.
 */
import { describe, expect, it } from "vitest";
import { divergent, graphOf, listOf } from "../engine/divergence/ask.ts";
import { theoryOf } from "../engine/theory-builder.ts";

const qed = (d: number | string) =>
  theoryOf({ d, fields: { A: "gauge potential", psi: "Dirac spinor" }, terms: { e: "psi~ psi A" } });
const phi = (n: number, d: number | string) =>
  theoryOf({ d, fields: { phi: "real scalar" }, terms: { g: `phi${n}` } });

describe("lists of superficially divergent amplitudes", () => {
  // Peskin, Schroeder (1995) ch. 10; Srednicki (2007) ch. 18; Collins (1984).
  it("φ⁴ in d = 4: ω = 4 − E, even E", () => {
    expect(divergent(phi(4, 4))).toEqual({ vacuum: "4", "phi^2": "2", "phi^4": "0" });
  });
  it("φ³ in d = 6: ω = 6 − 2E", () => {
    expect(divergent(phi(3, 6))).toEqual({ vacuum: "6", phi: "4", "phi^2": "2", "phi^3": "0" });
  });
  it("φ⁶ in d = 3: ω = 3 − E/2, even E", () => {
    expect(divergent(phi(6, 3))).toEqual({ vacuum: "3", "phi^2": "2", "phi^4": "1", "phi^6": "0" });
  });

  // Peskin, Schroeder (1995) ch. 10; Srednicki (2007) ch. 51.
  it("Yukawa theory in d = 4, where φ⁴ is demanded though nobody wrote it", () => {
    const yukawa = theoryOf({
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: { y: "psi~ psi phi", k: { fields: "phi2", derivatives: 2, kinetic: true } },
    });
    expect(divergent(yukawa)).toEqual({
      vacuum: "4",
      phi: "3",
      "phi^2": "2",
      "phi^3": "1",
      "phi^4": "0",
      "psibar psi": "1",
      "phi psibar psi": "0",
    });
    expect(listOf(yukawa).missing.map(({ text }) => text)).toContain("phi^4");
  });

  // Peskin, Schroeder (1995) fig. 10.2: seven amplitudes, from ω = 4 − E_γ − (3/2) E_e (Mandl, Shaw).
  it("quantum electrodynamics in d = 4", () => {
    expect(divergent(qed(4))).toEqual({
      vacuum: "4",
      A: "3",
      "A^2": "2",
      "A^3": "1",
      "A^4": "0",
      "psibar psi": "1",
      "A psibar psi": "0",
    });
  });

  // Srednicki (2007) ch. 72; Collins (1984): ω = 4 − E_A − E_c − (3/2) E_ψ.
  it("Yang–Mills theory with ghosts and fermions in d = 4", () => {
    const yangMills = theoryOf({
      fields: { A: "gauge potential", c: "ghost", psi: "Dirac spinor" },
      terms: {
        three: { fields: "A3", derivatives: 1 },
        four: "A4",
        ghost: { fields: "c~ c A", derivatives: 1 },
        quark: "psi~ psi A",
      },
    });
    expect(divergent(yangMills)).toEqual({
      vacuum: "4",
      A: "3",
      "A^2": "2",
      "A^3": "1",
      "A^4": "0",
      "cbar c": "2",
      "A cbar c": "1",
      "A^2 cbar c": "0",
      "cbar^2 c^2": "0",
      "psibar psi": "1",
      "A psibar psi": "0",
    });
  });

  // Neubert 1994, Phys. Rep. 245, 259; Manohar, Wise (2000): ω = 4 − E_A − (3/2) E_h, static quark loops vanish.
  it("a static quark with gluons in d = 4", () => {
    const staticQuark = theoryOf({
      fields: { A: "gauge potential", h: "static heavy field" },
      terms: { three: { fields: "A3", derivatives: 1 }, four: "A4", heavy: "h~ h A" },
    });
    const found = divergent(staticQuark);
    expect([found["hbar h"], found["A hbar h"]]).toEqual(["1", "0"]);
    expect(found).toEqual({
      vacuum: "4",
      A: "3",
      "A^2": "2",
      "A^3": "1",
      "A^4": "0",
      "hbar h": "1",
      "A hbar h": "0",
    });
    expect(
      divergent(
        theoryOf({ fields: { A: "gauge potential", h: "static heavy field" }, terms: { heavy: "h~ h A" } }),
      ),
    ).toEqual({
      vacuum: "4",
      "hbar h": "1",
      "A hbar h": "0",
    });
  });
});

describe("degrees of worked graphs", () => {
  // Peskin, Schroeder (1995) eq. (10.7): ω = d + V (d − 4)/2 − E_γ (d − 2)/2 − E_e (d − 1)/2.
  it("quantum electrodynamics in d dimensions", () => {
    expect(graphOf(qed("d"), { e: 2 }, { A: 2 }).omega.text).toBe("d - 2"); // d + (d − 4) − (d − 2)
    expect(graphOf(qed("d"), { e: 2 }, { psi: 1, "psi~": 1 }).omega.text).toBe("d - 3"); // d + (d − 4) − (d − 1)
    expect(graphOf(qed("d"), { e: 3 }, { A: 1, psi: 1, "psi~": 1 }).omega.text).toBe("d - 4");
  });

  // Peskin, Schroeder (1995) eq. (10.13): ω = d + V [n (d − 2)/2 − d] − E (d − 2)/2.
  it.each([
    [3, 6, 3, 3, "0"],
    [4, 4, 3, 2, "2"],
    [6, 3, 2, 6, "0"],
    [4, 3, 2, 2, "0"],
    [6, 4, 2, 8, "0"],
    [5, "10/3", 2, 4, "2/3"],
  ])("φ^%i in d = %s with %i vertices and %i legs: ω = %s", (n, d, vertices, legs, omega) => {
    expect(graphOf(phi(n, d), { g: vertices }, { phi: legs }).omega.text).toBe(omega);
  });

  // Weinberg, The Quantum Theory of Fields I (1995), section 12.1: ω = 4 − (3/2) E + 2 V.
  it("Fermi theory in d = 4", () => {
    const fermi = theoryOf({ fields: { psi: "Dirac spinor" }, terms: { G: "psi~2 psi2" } });
    for (const vertices of [2, 3, 4]) {
      expect(graphOf(fermi, { G: vertices }, { psi: 2, "psi~": 2 }).omega.text).toBe(
        String(2 * vertices - 2),
      );
    }
  });

  // 't Hooft, Veltman 1974; Goroff, Sagnotti 1986: ω = (d − 2) L + 2, whatever the legs: 4, 6, 8 at one to three loops in d = 4.
  it("gravity: every vertex has two derivatives", () => {
    const gravity = (d: number | string) =>
      theoryOf({
        d,
        fields: { h: "metric fluctuation" },
        terms: { three: { fields: "h3", derivatives: 2 }, four: { fields: "h4", derivatives: 2 } },
      });
    expect(graphOf(gravity(4), { three: 2 }, { h: 2 })).toMatchObject({ loops: 1, omega: { text: "4" } });
    expect(graphOf(gravity(4), { three: 4 }, { h: 4 })).toMatchObject({ loops: 1, omega: { text: "4" } });
    expect(graphOf(gravity(4), { four: 2 }, { h: 2 })).toMatchObject({ loops: 2, omega: { text: "6" } });
    expect(graphOf(gravity(4), { four: 3 }, { h: 2 })).toMatchObject({ loops: 3, omega: { text: "8" } });
    expect(graphOf(gravity("d"), { three: 4, four: 1 }, { h: 4 })).toMatchObject({
      loops: 2,
      omega: { text: "2*d - 2" },
    });
  });

  // Kaplan, Savage, Wise 1998, Nucl. Phys. B 534, 329: the bubble with C₀ diverges linearly in D = 3; C_2n adds 2n powers.
  it("nonrelativistic contact interactions", () => {
    const contact = theoryOf({
      D: 3,
      z: 2,
      fields: { N: "Schrödinger field" },
      terms: { c0: "N~2 N2", c2: { fields: "N~2 N2", derivatives: 2 } },
    });
    const degree = (vertices: Record<string, number>) =>
      graphOf(contact, vertices, { N: 2, "N~": 2 }).omega.text;
    expect(degree({ c0: 2 })).toBe("1");
    expect(degree({ c0: 1, c2: 1 })).toBe("3");
    expect(degree({ c2: 2 })).toBe("5");
  });

  // Visser 2009, Phys. Rev. D 80, 025011: for z = D and vertices without derivatives only single-vertex loops diverge.
  it("a Lifshitz scalar with z = D: ω = 2D (1 − V)", () => {
    const lifshitz = theoryOf({
      D: 3,
      z: 3,
      fields: { phi: "anisotropic scalar" },
      terms: { l4: "phi4", l6: "phi6" },
    });
    expect(graphOf(lifshitz, { l4: 1 }, { phi: 2 }).omega.text).toBe("0");
    expect(graphOf(lifshitz, { l6: 1 }, { phi: 2 })).toMatchObject({ loops: 2, omega: { text: "0" } });
    expect(graphOf(lifshitz, { l4: 2 }, { phi: 4 }).omega.text).toBe("-6");
    expect(graphOf(lifshitz, { l4: 2, l6: 1 }, { phi: 4 }).omega.text).toBe("-12");
    const withGradients = theoryOf({
      D: 3,
      z: 3,
      fields: { phi: "anisotropic scalar" },
      terms: { g: { fields: "phi4", derivatives: 6 } },
    });
    expect([1, 2, 3].map((count) => graphOf(withGradients, { g: count }, { phi: 2 }).omega.text)).toEqual([
      "6",
      "6",
      "6",
    ]);
  });

  // Weinberg 1979, Physica A 96, 327: 2 + (d − 2) L + Σ V_n (n − 2), pions as scalars with n derivatives per vertex.
  it("chiral vertices in d dimensions", () => {
    const chiral = theoryOf({
      d: "d",
      fields: { pi: "real scalar" },
      terms: { p2: { fields: "pi4", derivatives: 2 }, p4: { fields: "pi4", derivatives: 4 } },
    });
    expect(graphOf(chiral, { p2: 2 }, { pi: 4 }).omega.text).toBe("d"); // 2 + (d − 2)
    expect(graphOf(chiral, { p2: 1, p4: 1 }, { pi: 4 }).omega.text).toBe("d + 2");
  });
});

describe("renormalisability by the dimension of the coupling", () => {
  // Peskin, Schroeder (1995), p. 321 (from memory); the degrees behind it are derived above.
  it.each([
    ["φ³ in d = 4", "super-renormalisable", phi(3, 4)],
    ["φ³ in d = 6", "renormalisable", phi(3, 6)],
    ["φ⁴ in d = 3", "super-renormalisable", phi(4, 3)],
    ["φ⁴ in d = 4", "renormalisable", phi(4, 4)],
    ["φ⁴ in d = 5", "new terms at every order", phi(4, 5)],
    ["electrodynamics in d = 3", "super-renormalisable", qed(3)],
    ["electrodynamics in d = 4", "renormalisable", qed(4)],
    ["electrodynamics in d = 5", "new terms at every order", qed(5)],
    ["φ⁴ in d = 2, a dimensionless scalar with a coupling of dimension 2", "super-renormalisable", phi(4, 2)],
  ])("%s: %s", (_, verdict, theory) => {
    expect(listOf(theory).verdict).toBe(verdict);
  });

  // Zinn-Justin, Quantum Field Theory and Critical Phenomena: ω = 2 for every number of legs in d = 2.
  it("a sigma model in d = 2 has infinitely many divergent amplitudes of degree 2", () => {
    const sigma = theoryOf({
      d: 2,
      fields: { pi: "real scalar" },
      terms: { g: { fields: "pi4", derivatives: 2 } },
    });
    const { verdict, amplitudes } = listOf(sigma, { maxLegs: "8" });
    expect(verdict).toBe("infinitely many divergent amplitudes");
    expect(
      amplitudes
        .filter(({ status }) => status === "divergent")
        .map(({ legs, omega }) => `${legs.total}: ${omega.text}`),
    ).toEqual(["0: 2", "2: 2", "4: 2", "6: 2", "8: 2"]);
  });
});
