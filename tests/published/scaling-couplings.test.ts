/** Dimensions of couplings, marginal dimensions and naive dimensional analysis against the literature. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evaluateScaling } from "#engine/scaling/evaluate.ts";
import { scalingShape } from "#engine/scaling/inputs.ts";
import { schemaOf } from "#engine/shape.ts";
import { termOf, theoryFrom, type Sketch } from "../engine/premises/state.ts";

const inDimensions = [1, 2, 3, 4, 5, 6, 10];
const fields: Sketch["fields"] = {
  phi: "real scalar",
  Phi: "complex scalar",
  psi: "Dirac spinor",
  A: "gauge potential",
  F: "field strength",
  h: "metric fluctuation",
  // Curvature, a sigma-model field of dimension 0, and a potential in geometric normalisation.
  R: { kind: "metric fluctuation", dimension: "2" },
  U: { kind: "real scalar", dimension: "0" },
  B: { kind: "gauge potential", dimension: "1" },
  G: { kind: "field strength", dimension: "2" },
};

describe("the dimension of a coupling in d = 1, 2, 3, 4, 5, 6, 10", () => {
  it.each([
    // Peskin and Schroeder 1995, chapter 10; Weinberg, The Quantum Theory of Fields I, chapter 12.
    ["m^2 phi^2", ["2", "2", "2", "2", "2", "2", "2"]],
    ["m psibar psi", ["1", "1", "1", "1", "1", "1", "1"]],
    ["j phi", ["3/2", "2", "5/2", "3", "7/2", "4", "6"]],
    ["g_3 phi^3", ["5/2", "2", "3/2", "1", "1/2", "0", "-2"]],
    ["g_4/4! phi^4", ["3", "2", "1", "0", "-1", "-2", "-6"]],
    ["g_5 phi^5", ["7/2", "2", "1/2", "-1", "-5/2", "-4", "-10"]],
    ["g_6/6! phi^6", ["4", "2", "0", "-2", "-4", "-6", "-14"]],
    ["g_7 phi^7", ["9/2", "2", "-1/2", "-3", "-11/2", "-8", "-18"]],
    ["g_8 phi^8", ["5", "2", "-1", "-4", "-7", "-10", "-22"]],
    ["g_9 phi^9", ["11/2", "2", "-3/2", "-5", "-17/2", "-12", "-26"]],
    ["g_10 phi^10", ["6", "2", "-2", "-6", "-10", "-14", "-30"]],
    ["g_11 phi^11", ["13/2", "2", "-5/2", "-7", "-23/2", "-16", "-34"]],
    ["g_12 phi^12", ["7", "2", "-3", "-8", "-13", "-18", "-38"]],
    ["y phi psibar psi", ["3/2", "1", "1/2", "0", "-1/2", "-1", "-3"]],
    ["G_F (psibar psi)^2", ["1", "0", "-1", "-2", "-3", "-4", "-8"]],
    ["g psibar \\gamma^\\mu A_\\mu psi", ["3/2", "1", "1/2", "0", "-1/2", "-1", "-3"]],
    ["c phi^2 psibar psi", ["2", "1", "0", "-1", "-2", "-3", "-7"]],
    ["c psibar \\sigma^{\\mu\\nu} psi F_{\\mu\\nu}", ["1/2", "0", "-1/2", "-1", "-3/2", "-2", "-4"]],
    ["c phi (d_mu phi)^2", ["1/2", "0", "-1/2", "-1", "-3/2", "-2", "-4"]],
    ["c Tr(F^3)", ["-1/2", "-1", "-3/2", "-2", "-5/2", "-3", "-5"]],
    ["c F^4", ["-1", "-2", "-3", "-4", "-5", "-6", "-10"]],
    // Standard, with Donoghue 1994: κhT, and curvature terms of a metric with [R] = 2.
    ["kappa h (dphi)^2", ["1/2", "0", "-1/2", "-1", "-3/2", "-2", "-4"]],
    ["M R", ["-1", "0", "1", "2", "3", "4", "8"]],
    ["c R^2", ["-3", "-2", "-1", "0", "1", "2", "6"]],
    ["c R^4", ["-7", "-6", "-5", "-4", "-3", "-2", "2"]],
    // f²(∂U)²: 1/f² has 2 − d (Polyakov 1975).
    ["f^2 (dU)^2", ["-1", "0", "1", "2", "3", "4", "8"]],
    // 1/e² of Maxwell theory in geometric normalisation has d − 4.
    ["1/e^2 G^2", ["-3", "-2", "-1", "0", "1", "2", "6"]],
  ])("%s", (term, expected) => {
    const found = inDimensions.map((d) =>
      termOf({ d: String(d), fields, terms: [term] }).coefficient.toString(),
    );
    expect(found).toEqual(expected);
  });
  it("is zero for the θ parameter in d = 4 (textbook) and for the Chern–Simons level in d = 3 (Deser, Jackiw and Templeton 1982)", () => {
    expect(termOf({ d: "4", fields, terms: ["theta/(32 pi^2) G Gtilde"] }).coefficient.toString()).toBe("0");
    expect(
      termOf({
        d: "3",
        fields,
        terms: ["k/(4pi) \\epsilon^{\\mu\\nu\\rho} B_\\mu \\partial_\\nu B_\\rho"],
      }).coefficient.toString(),
    ).toBe("0");
  });
});

/** Where the only term is marginal, as the free dimension runs. */
function marginalAt(sketch: Sketch): string | null | undefined {
  return evaluateScaling(schemaOf(scalingShape).parse({}), theoryFrom(sketch)).value?.rows[0]?.marginalAt;
}

describe("the dimension in which a coupling is marginal", () => {
  it.each([
    // 2n/(n−2): Zinn-Justin; Cardy 1996. φ³: Lee–Yang edge (Fisher 1978) and percolation (Harris et al. 1975).
    ["phi^3", "6"],
    ["phi^4", "4"],
    ["phi^5", "10/3"],
    // Tricritical; theta point of polymers (de Gennes 1975).
    ["phi^6", "3"],
    ["phi^7", "14/5"],
    ["phi^8", "8/3"],
    ["phi^9", "18/7"],
    ["phi^12", "12/5"],
    // Gross and Neveu 1974.
    ["u (psibar psi)^2", "2"],
    // Zinn-Justin 1991.
    ["y phi psibar psi", "4"],
    ["g psibar A psi", "4"],
    // Halperin, Lubensky and Ma 1974.
    ["e A Phi^\\dagger d Phi", "4"],
    ["e^2 A^2 |Phi|^2", "4"],
    // Polyakov 1975; Weinberg 1979; standard.
    ["f^2 (dU)^2", "2"],
    ["kappa h (dphi)^2", "2"],
    ["c phi^2 psibar psi", "3"],
    ["1/g^2 (D G)^2", "6"],
  ])("%s: d = %s", (term, expected) =>
    expect(marginalAt({ d: "d", fields, terms: [`x ${term}`] })).toBe(expected),
  );

  it.each([
    // Fisher, Ma and Nickel 1972: kinetic term |k|^σ, upper critical dimension 2σ.
    ["(d-1)/2", "2"],
    ["(d-3/2)/2", "3"],
    ["(d-2)/2", "4"],
    // Hornreich, Luban and Shtrikman 1975: quartic gradients in all directions.
    ["(d-4)/2", "8"],
  ])("φ⁴ with [φ] = %s: d = %s", (dimension, expected) => {
    expect(
      marginalAt({ d: "d", fields: { phi: { kind: "real scalar", dimension } }, terms: ["u phi^4"] }),
    ).toBe(expected);
  });

  it.each([
    // Lee 1994 (J. Phys. A 27, 2633); Nishida and Son 2007: k-body contact terms of a Schrödinger field, 2/(k−1).
    [2, "2"],
    [3, "1"],
    [4, "2/3"],
    [5, "1/2"],
    [6, "2/5"],
  ])("%i-body contact terms: D = %s", (k, expected) => {
    expect(
      marginalAt({ D: "D", z: "2", fields: { n: "Schrödinger field" }, terms: [`C (n^\\dagger n)^${k}`] }),
    ).toBe(expected);
  });

  it("directed percolation: 4 (Janssen 1981; Grassberger 1982)", () => {
    // Response field and field share D equally; the cubic term is ñ n².
    expect(
      marginalAt({ D: "D", z: "2", fields: { n: "Schrödinger field" }, terms: ["g n^\\dagger n^2"] }),
    ).toBe("4");
  });
  it("the nonlinearity of interface growth: 2 (Kardar, Parisi and Zhang 1986)", () => {
    const heights: Sketch["fields"] = {
      h: { kind: "anisotropic scalar", dimension: "(D-2)/2" },
      k: { kind: "anisotropic scalar", dimension: "(D+2)/2" },
    };
    expect(marginalAt({ D: "D", z: "2", fields: heights, terms: ["lambda k (grad h)^2"] })).toBe("2");
  });
  it("relaxational dynamics, model A: 4 (Hohenberg and Halperin 1977)", () => {
    const modelA: Sketch["fields"] = {
      phi: { kind: "anisotropic scalar", dimension: "(D-2)/2" },
      k: { kind: "anisotropic scalar", dimension: "(D+2)/2" },
    };
    expect(marginalAt({ D: "D", z: "2", fields: modelA, terms: ["u k phi^3"] })).toBe("4");
  });
  it("a uniaxial dipolar magnet: D + 1 = 3 (Larkin and Khmelnitskii 1969)", () => {
    // The axis counts two, q_z ~ q², and the quadratic action is q² + q_z²/q².
    expect(
      marginalAt({
        D: "D",
        z: "2",
        fields: { phi: { kind: "anisotropic scalar", dimension: "(D+2-2)/2" } },
        terms: ["u phi^4"],
      }),
    ).toBe("2");
  });
  it("a uniaxial Lifshitz point: D + 1 = 9/2 (Hornreich, Luban and Shtrikman 1975)", () => {
    // Along the axis gradients are quartic, so it counts one half of the others.
    const field = { kind: "anisotropic scalar", dimension: "(D+1/2-2)/2" } as const;
    expect(marginalAt({ D: "D", z: "1/2", fields: { phi: field }, terms: ["u phi^4"] })).toBe("7/2");
  });
  it("at z = D a Lifshitz scalar has no dimension, so every power of it costs nothing (Visser 2009; Anselmi and Halat 2007)", () => {
    for (const n of [3, 4, 6, 10])
      expect(
        termOf({
          D: "3",
          z: "3",
          fields: { phi: "anisotropic scalar" },
          terms: [`g phi^${n}`],
        }).coefficient.toString(),
      ).toBe("6");
    // The φⁿ coupling has D + z − n(D − z)/2 = D + z; with 2z gradients it is marginal.
    expect(
      termOf({
        D: "3",
        z: "3",
        fields: { phi: "anisotropic scalar" },
        terms: ["g phi^4 grad^6 phi^2"],
      }).coefficient.toString(),
    ).toBe("0");
  });
});

describe("Schrödinger and Lifshitz couplings", () => {
  it.each([
    // Kaplan 2005 (nucl-th/0510023): C₀ has 2 − D, the two-derivative contact term −D.
    ["C_0 (n^\\dagger n)^2", ["1", "0", "-1"]],
    ["C_2 (n^\\dagger grad n)^2", ["-1", "-2", "-3"]],
  ])("%s in D = 1, 2, 3", (term, expected) => {
    expect(
      ["1", "2", "3"].map((D) =>
        termOf({ D, z: "2", fields: { n: "Schrödinger field" }, terms: [term] }).coefficient.toString(),
      ),
    ).toEqual(expected);
  });
  it.each([
    // Visser 2009; Anselmi and Halat 2007: 3z − D in D = 1, 2, 3, 4.
    ["1", ["2", "1", "0", "-1"]],
    ["4", ["11", "10", "9", "8"]],
  ])("Lifshitz φ⁴ at z = %s", (z, expected) => {
    expect(
      ["1", "2", "3", "4"].map((D) =>
        termOf({ D, z, fields: { phi: "anisotropic scalar" }, terms: ["g phi^4"] }).coefficient.toString(),
      ),
    ).toEqual(expected);
  });
});

describe("naive dimensional analysis", () => {
  function sizesOf(terms: readonly string[], probe: string, heavy: string): (number | undefined)[] {
    const theory = theoryFrom({
      fields: { phi: "real scalar", psi: "Dirac spinor", A: "gauge potential" },
      scales: { p: [probe, "probe"], Lambda: [heavy, "heavy"] },
      terms,
    });
    const inputs = schemaOf(scalingShape).parse({ at: "naive dimensional analysis" });
    return evaluateScaling(inputs, theory).value?.rows.map(({ size }) => size?.value) ?? [];
  }
  it("gives a four-fermion term 1/f² at Λ = 4πf (Manohar and Georgi 1984): 117.97 GeV⁻² for f = 92.07 MeV, own evaluation", () => {
    const [size = NaN] = sizesOf(["c (psibar psi)^2"], "1 GeV", "1156.99 MeV");
    expect(size).toBeCloseTo(117.97, 2);
  });
  it("agrees with f²Λ²(φ/f)^A (ψ/f√Λ)^B (A/f)^C (∂/Λ)^D for any term (Manohar and Georgi 1984)", () => {
    // The older spelling of the rule of Gavela, Jenkins, Manohar and Merlo 2016 (arXiv:1601.07551), with Λ = 4πf.
    const few = fc.integer({ min: 0, max: 4 });
    fc.assert(
      fc.property(
        few,
        few,
        few,
        few,
        fc.double({ min: 0.05, max: 0.9, noNaN: true }),
        (scalars, pairs, vectors, derivatives, q) => {
          if (scalars + 2 * pairs + vectors < 3) return true;
          const term = [
            "c",
            ...Array<string>(derivatives).fill("d"),
            `phi^${scalars}`,
            `(psibar psi)^${pairs}`,
            `A^${vectors}`,
          ].join(" ");
          const [size = NaN] = sizesOf([term], `${q} GeV`, "1 GeV");
          const [heavy, f] = [1, 1 / (4 * Math.PI)];
          const coefficient =
            f ** 2 *
            heavy ** 2 *
            f ** -(scalars + vectors) *
            (f * Math.sqrt(heavy)) ** -(2 * pairs) *
            heavy ** -derivatives;
          // Every leg and derivative at its power of p, against kinetic terms of p⁴.
          const expected = coefficient * q ** (scalars + vectors + 3 * pairs + derivatives - 4);
          return Math.abs(size / expected - 1) < 1e-9;
        },
      ),
    );
  });
});
