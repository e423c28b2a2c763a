import { describe, expect, it } from "vitest";
import { readTerm } from "#engine/notation/read-term.ts";
import { anisotropic, readAs, vocabulary } from "./reading.ts";

// The notations are those of Peskin and Schroeder 1995 (gauge fields, γ⁵), Grzadkowski et al. 2010, J. High Energy Phys.
// 10, 085 (labels and adjoint indices), Manohar and Wise 2000 (D_⊥) and Bedaque, Hammer, van Kolck 1999 (D_0).
describe("terms read as papers write them", () => {
  it.each([
    ["g f^{abc} \\partial_\\mu A^a_\\nu A^{b\\mu} A^{c\\nu}", "1 | g | A^3 | 1"],
    ["-\\frac{g^2}{4} f^{abe} f^{cde} A^a_\\mu A^b_\\nu A^{c\\mu} A^{d\\nu}", "-1/4 | g^2 | A^4 | 0"],
    ["g d^{abc} A^a_\\mu A^b_\\nu A^{c\\nu} \\partial^\\mu \\phi", "1 | g | A^3 phi | 1"],
    ["-\\frac14 F^I_{\\mu\\nu} F^{I\\mu\\nu}", "-1/4 |  | F^2 | 0"],
    ["C f^{ABC} F^{A\\nu}_\\mu F^{B\\rho}_\\nu F^{C\\mu}_\\rho", "1 | C | F^3 | 0"],
    ["i g \\bar\\psi \\gamma^5 \\psi \\phi", "1 | i g | psi* psi phi | 0"],
    ["g \\bar\\psi \\gamma^\\mu \\gamma^5 \\psi \\partial_\\mu \\phi", "1 | g | psi* psi phi | 1"],
    ["\\gamma^5 phi^2", "1 | gamma^5 | phi^2 | 0"],
    ["\\frac{1}{2 M} \\bar h_v D_\\perp^2 h_v", "1/2 | M^-1 | h_v* h_v | 2"],
    ["g \\bar h_v v\\cdot A h_v", "1 | g | h_v* h_v A | 0"],
    ["v\\cdot \\phi^3", "1 | v | phi^3 | 0"],
    ["½ (∂φ)²", "1/2 |  | phi^2 | 2"],
    ["g/½ φ", "2 | g | phi | 0"],
    ["y (\\bar\\psi \\psi \\phi + h.c.)", "1 | y | psi* psi phi | 0"],
    ["y \\left(\\bar\\psi \\psi \\phi + {\\rm h.c.}\\right)", "1 | y | psi* psi phi | 0"],
    ["\\lambda \\phi^4\\;.", "1 | lambda | phi^4 | 0"],
    ["\\lambda \\phi^4 \\,,", "1 | lambda | phi^4 | 0"],
    ["\\lambda \\phi^4 \\,", "1 | lambda | phi^4 | 0"],
    ["C^{(3)}_{Hq} \\phi^6", "1 | C_{Hq,3} | phi^6 | 0"],
    ["C_{Hq}^{(1)} \\phi^6", "1 | C_{Hq,1} | phi^6 | 0"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));

  it("shows a label as one, so that nobody takes it for a power", () => {
    const read = readTerm("C^{(3)}_{Hq} phi^6", vocabulary);
    expect(read.ok && read.value.latex).toBe("C_{\\mathrm{Hq},3}\\,\\phi^{6}");
  });

  it("refuses functions of fields, which are no single term", () => {
    expect(readAs("sin(phi)")).toContain("function-in-term");
    expect(readAs("g exp(phi)")).toContain("function-in-term");
  });
});

describe("D with a number", () => {
  it.each([
    ["D_0 (psi^\\dagger psi)^3", "1 | D_0 | psi*^3 psi^3 | 0"],
    ["\\frac{D_0}{36} (psi^\\dagger psi)^3", "1/36 | D_0 | psi*^3 psi^3 | 0"],
    ["D_2 psi^\\dagger psi \\nabla^2 (psi^\\dagger psi)^2", "1 | D_2 | psi*^3 psi^3 | 2"],
    ["psi^\\dagger i D_0 psi", "1 | i | psi* psi | 0, 1 in time"],
    ["(D_0 phi)^2", "1 |  | phi^2 | 0, 2 in time"],
    ["|D_0 Phi|^2", "1 |  | Phi* Phi | 0, 2 in time"],
    ["D_0 Phi^\\dagger D_0 Phi", "1 |  | Phi* Phi | 0, 2 in time"],
  ])("is a coupling before the fields and a derivative among them: %s", (text, expected) =>
    expect(readAs(text, anisotropic)).toBe(expected),
  );
});
