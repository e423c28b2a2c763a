/** Dimensions of fields against the literature, in one to ten dimensions. */
import { describe, expect, it } from "vitest";
import type { FieldKind } from "#engine/premises/theory.ts";
import { termOf, theoryFrom, type Sketch } from "../engine/premises/state.ts";

const inDimensions = [1, 2, 3, 4, 5, 6, 10];

/** Dimension of a field in d = 1, 2, 3, 4, 5, 6, 10, with d symbolic and with d a number from the start. */
function dimensionsOf(field: FieldKind | { readonly kind: FieldKind; readonly dimension: string }): string[] {
  return inDimensions.map(
    (d) => theoryFrom({ d: String(d), fields: { x: field } }).fields[0]?.dimension.toString() ?? "none",
  );
}

describe("canonical dimensions", () => {
  it.each([
    // Peskin and Schroeder 1995, sections 4.1 and 10.1; Zinn-Justin, Quantum Field Theory and Critical Phenomena.
    ["real scalar", "scalar, (d−2)/2", ["-1/2", "0", "1/2", "1", "3/2", "2", "4"]],
    ["complex scalar", "scalar, (d−2)/2", ["-1/2", "0", "1/2", "1", "3/2", "2", "4"]],
    [
      "gauge potential",
      "canonically normalised A with −F²/4, (d−2)/2",
      ["-1/2", "0", "1/2", "1", "3/2", "2", "4"],
    ],
    ["Dirac spinor", "ψ̄i∂̸ψ, (d−1)/2", ["0", "1/2", "1", "3/2", "2", "5/2", "9/2"]],
    ["Weyl spinor", "(d−1)/2", ["0", "1/2", "1", "3/2", "2", "5/2", "9/2"]],
    ["Majorana spinor", "(d−1)/2", ["0", "1/2", "1", "3/2", "2", "5/2", "9/2"]],
    // Donoghue 1994 (gr-qc/9405057); Burgess 2004, Living Reviews in Relativity 7, 5: g = η + κh.
    ["metric fluctuation", "h, (d−2)/2", ["-1/2", "0", "1/2", "1", "3/2", "2", "4"]],
    // Neubert 1994 (hep-ph/9306320); Manohar and Wise 2000: h̄ i v·D h.
    ["static heavy field", "h_v, (d−1)/2", ["0", "1/2", "1", "3/2", "2", "5/2", "9/2"]],
    // Standard: Faddeev–Popov ghosts of equal dimension, Rarita–Schwinger fields, F = ∂A.
    ["ghost", "(d−2)/2", ["-1/2", "0", "1/2", "1", "3/2", "2", "4"]],
    ["spin 3/2", "(d−1)/2", ["0", "1/2", "1", "3/2", "2", "5/2", "9/2"]],
    ["field strength", "d/2", ["1/2", "1", "3/2", "2", "5/2", "3", "5"]],
  ] as const)("%s: %s", (kind, _, expected) => {
    expect(dimensionsOf(kind)).toEqual(expected);
    const symbolic = theoryFrom({ d: "d", fields: { x: kind } }).fields[0]?.dimension;
    expect(
      inDimensions.map((d) => symbolic?.at("d", theoryFrom({ d: String(d) }).measure.constant).toString()),
    ).toEqual(expected);
  });
  it.each([
    // Standard: geometric normalisation, where D = ∂ − iA, and curvature.
    ["1", ["1", "1", "1", "1", "1", "1", "1"]],
    ["2", ["2", "2", "2", "2", "2", "2", "2"]],
    ["0", ["0", "0", "0", "0", "0", "0", "0"]],
    // Hornreich, Luban and Shtrikman 1975: isotropic Lifshitz point.
    ["(d-4)/2", ["-3/2", "-1", "-1/2", "0", "1/2", "1", "3"]],
  ] as const)("stated as %s", (dimension, expected) =>
    expect(dimensionsOf({ kind: "real scalar", dimension })).toEqual(expected),
  );
});

describe("nonrelativistic and Lifshitz fields", () => {
  it("a Schrödinger field counts D/2 (Nishida and Son 2007, arXiv:0706.3746; Kaplan 2005, nucl-th/0510023)", () => {
    const found = ["1", "2", "3"].map((D) =>
      theoryFrom({ D, z: "2", fields: { n: "Schrödinger field" } }).fields[0]?.dimension.toString(),
    );
    expect(found).toEqual(["1/2", "1", "3/2"]);
  });
  it.each([
    // Hořava 2009 (arXiv:0901.3775); Visser 2009 (arXiv:0902.0590): (D − z)/2 in D = 1, 2, 3, 4.
    ["1", ["0", "1/2", "1", "3/2"]],
    ["2", ["-1/2", "0", "1/2", "1"]],
    ["3", ["-1", "-1/2", "0", "1/2"]],
    ["4", ["-3/2", "-1", "-1/2", "0"]],
  ])("a Lifshitz scalar at z = %s", (z, expected) => {
    const found = ["1", "2", "3", "4"].map((D) =>
      theoryFrom({ D, z, fields: { phi: "anisotropic scalar" } }).fields[0]?.dimension.toString(),
    );
    expect(found).toEqual(expected);
  });
});

describe("operators of the static quark, d = 4 (Neubert 1994; Manohar 1997, hep-ph/9701294)", () => {
  const fields: Sketch["fields"] = { h_v: "static heavy field", q: "Dirac spinor", G: "field strength" };
  it.each([
    ["hbar_v i v.D h_v", "4", true],
    ["c_k/(2 m_Q) hbar_v D^2 h_v", "5", false],
    ["c_F g/(4 m_Q) hbar_v sigma.G h_v", "5", false],
    // Darwin and spin-orbit: [D, E] with E of dimension 2.
    ["c_D g/(8 m_Q^2) hbar_v D G h_v", "6", false],
    // Neubert and Sachrajda 1997 (hep-ph/9603202): four-quark operators enter rates at 1/m³.
    ["(hbar_v q) (qbar h_v)", "6", false],
  ])("%s has dimension %s", (term, dimension, kinetic) => {
    const read = termOf({ fields, terms: [term] });
    expect([read.dimension.toString(), read.kinetic]).toEqual([dimension, kinetic]);
  });
});

describe("massive vectors and spin 3/2 (own derivation from p_μp_ν/M² in the propagator)", () => {
  it("spoil renormalisability by their weight, not by their dimension", () => {
    const massive = termOf({
      fields: { psi: "Dirac spinor", V: "massive vector" },
      terms: ["g psibar V psi"],
    });
    const conserved = termOf({
      fields: { psi: "Dirac spinor", V: "massive vector, conserved current" },
      terms: ["g psibar V psi"],
    });
    expect(
      [massive, conserved].map((term) => [
        term.coefficient.toString(),
        term.ultravioletCoefficient.toString(),
      ]),
    ).toEqual([
      ["0", "-1"],
      ["0", "0"],
    ]);
  });
});
