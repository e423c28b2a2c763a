import { describe, expect, it } from "vitest";
import { anisotropic, readAs } from "./reading.ts";

describe("a term reads as it is meant", () => {
  it.each([
    // The four that mathematics parsers read otherwise.
    ["g/2 phi^2 chi", "1/2 | g | phi^2 chi | 0"],
    ["c/Lambda^2 (dphi)^2 phi^2", "1 | c Lambda^-2 | phi^4 | 2"],
    ["y (psibar psi)", "1 | y | psi* psi | 0"],
    ["12345678901234567890123 phi", "12345678901234567890123 |  | phi | 0"],
    // Juxtaposition and division have one precedence, from the left.
    ["lambda/4! phi^4", "1/24 | lambda | phi^4 | 0"],
    ["lambda phi^4/4!", "1/24 | lambda | phi^4 | 0"],
    ["lambda/(4! phi^0) phi^4", "1/24 | lambda | phi^4 | 0"],
    ["a/b c phi", "1 | a b^-1 c | phi | 0"],
    ["a/(b c) phi", "1 | a b^-1 c^-1 | phi | 0"],
    ["a/b/c phi", "1 | a b^-1 c^-1 | phi | 0"],
    ["1/2 m^2 phi^2", "1/2 | m^2 | phi^2 | 0"],
    ["1/(16 pi^2) phi^4", "1/16 | pi^-2 | phi^4 | 0"],
    ["2 phi chi", "2 |  | phi chi | 0"],
    ["2*phi*chi", "2 |  | phi chi | 0"],
    ["-phi^4", "-1 |  | phi^4 | 0"],
    ["(1 + 1/2) phi", "3/2 |  | phi | 0"],
    ["1.5e-3 phi", "3/2000 |  | phi | 0"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));
});

describe("LaTeX reads as plain spelling does", () => {
  it.each([
    ["\\frac{\\lambda}{4!}\\phi^4", "lambda/4! phi^4"],
    ["\\frac{c}{\\Lambda^2} (\\partial\\phi)^2 \\phi^2", "c/Lambda^2 (dphi)^2 phi^2"],
    ["\\frac12 m^2\\phi^2", "1/2 m^2 phi^2"],
    ["\\tfrac{1}{2}\\,m^{2}\\,\\phi^{2}", "1/2 m^2 phi^2"],
    ["λ/4! φ⁴", "lambda/4! phi^4"],
    ["\\left(\\partial_\\mu\\phi\\right)\\left(\\partial^\\mu\\phi\\right)", "(dphi)^2"],
    ["\\partial_{\\mu}\\phi\\,\\partial^{\\mu}\\phi", "(dphi)^2"],
    ["\\phi\\,\\Box\\,\\phi", "phi box phi"],
    ["phi \\Box^2 phi", "phi d d d d phi"],
    ["y \\bar\\psi \\psi \\phi", "y psibar psi phi"],
    ["y \\bar{\\psi} \\psi \\phi", "y psibar psi phi"],
    ["y ψ̄ψ φ", "y psibar psi phi"],
    ["y \\bar\\psi \\psi \\phi + \\text{h.c.}", "y psibar psi phi + h.c."],
    ["y psibar psi phi + h.c.", "y psibar psi phi"],
    ["g \\bar\\psi \\gamma^\\mu A_\\mu \\psi", "g psibar A psi"],
    ["g \\bar\\psi \\not{A} \\psi", "g psibar A psi"],
    ["\\bar\\psi \\slashed{D} \\psi", "psibar D psi"],
    ["c \\bar\\psi \\sigma^{\\mu\\nu} \\psi F_{\\mu\\nu}", "c psibar psi F"],
    ["c psibar sigma^{mu nu} psi F_{mu nu}", "c psibar psi F"],
    ["\\bar\\psi \\gamma_5 \\psi", "psibar psi"],
    ["\\bar\\psi P_L \\psi", "psibar psi"],
    ["-\\frac{1}{4} F_{\\mu\\nu}F^{\\mu\\nu}", "-1/4 F^2"],
    ["\\theta F \\tilde F", "theta F^2"],
    ["\\epsilon^{\\mu\\nu\\rho\\sigma} F_{\\mu\\nu} F_{\\rho\\sigma}", "F^2"],
    ["f^{abc} F^a F^b F^c", "F^3"],
    ["\\mathrm{Tr}(F^2)", "F^2"],
    ["\\bar h_v i v\\cdot D h_v", "i hbar_v D h_v"],
    ["hbar_v i v.D h_v", "i hbar_v D h_v"],
    ["hbar_v sigma.F h_v", "hbar_v F h_v"],
    ["lambda (phi_i phi_i)^2", "lambda phi^4"],
    ["\\phi^a\\phi^a", "phi^2"],
    ["M_{\\rm Pl}^{-2} phi^4", "M_Pl^-2 phi^4"],
    ["M_{\\mathrm{Pl}}^{-2} phi^4", "M_Pl^-2 phi^4"],
    ["c6 phi^6", "c_6 phi^6"],
    ["c₆ φ⁶", "c_6 phi^6"],
    ["c_{6} phi^6", "c_6 phi^6"],
    ["\\ddot\\phi \\phi", "d d phi phi"],
  ])("%s = %s", (latex, plain) => {
    expect(readAs(latex)).toBe(readAs(plain));
    expect(readAs(latex)).toContain("|");
  });
});

describe("conjugates", () => {
  it.each([
    ["|Phi|^2", "1 |  | Phi* Phi | 0"],
    ["lambda |Phi|^4", "1 | lambda | Phi*^2 Phi^2 | 0"],
    ["|D_mu Phi|^2", "1 |  | Phi* Phi | 2"],
    ["Phi^\\dagger Phi", "1 |  | Phi* Phi | 0"],
    ["Phi† Phi", "1 |  | Phi* Phi | 0"],
    ["Phi^* Phi", "1 |  | Phi* Phi | 0"],
    ["Phi* Phi", "1 |  | Phi* Phi | 0"],
    ["Phi*Phi", "1 |  | Phi^2 | 0"],
    ["Phidag Phi", "1 |  | Phi* Phi | 0"],
    ["(Phi^2)^\\dagger", "1 |  | Phi*^2 | 0"],
    // A real field is its own conjugate.
    ["phi^\\dagger phi", "1 |  | phi^2 | 0"],
    ["|phi|^4", "1 |  | phi^4 | 0"],
    ["(psibar psi)^2", "1 |  | psi*^2 psi^2 | 0"],
    ["hbar_v h_v", "1 |  | h_v* h_v | 0"],
    // Self-conjugation of a number.
    ["|y|^2 phi^2", "1 | y^2 | phi^2 | 0"],
    ["|phi chi|^2", "1 |  | phi^2 chi^2 | 0"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));
});

describe("phases and roots", () => {
  it.each([
    ["i psibar psi", "1 | i | psi* psi | 0"],
    ["i^2 phi", "-1 |  | phi | 0"],
    ["phi/i", "-1 | i | phi | 0"],
    ["sqrt(4) phi", "2 |  | phi | 0"],
    ["y/sqrt(2) phi", "1 | y 2^-1/2 | phi | 0"],
    ["\\sqrt{m} phi", "1 | m^1/2 | phi | 0"],
    ["(9/4)^(1/2) phi", "3/2 |  | phi | 0"],
    ["(9/4)^(-3/2) phi", "8/27 |  | phi | 0"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));
});

describe("symbols that look alike stay apart", () => {
  it.each([
    ["lambda Lambda^-2 Lambda_b^-1 phi^4", "1 | lambda Lambda^-2 Lambda_b^-1 | phi^4 | 0"],
    ["λ/Λ/Λ_b φ⁴", "1 | lambda Lambda^-1 Lambda_b^-1 | phi^4 | 0"],
    ["\\varphi \\phi", "1 | varphi | phi | 0"],
    ["ϕ φ", "1 |  | phi^2 | 0"],
    ["c_6 c_{6,1} c_{61} c_H phi", "1 | c_6 c_{6,1} c_61 c_H | phi | 0"],
    ["phi' phi", "1 | phi' | phi | 0"],
    ["sigma_1 phi", "1 |  | sigma_1 phi | 0"],
    ["nbar n", "1 |  | n* n | 0"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));
});

describe("anisotropic theories tell time from space", () => {
  it.each([
    ["Phi^\\dagger i d_t Phi", "1 | i | Phi* Phi | 0, 1 in time"],
    ["(\\partial_t phi)^2", "1 |  | phi^2 | 0, 2 in time"],
    ["\\dot\\phi^2", "1 |  | phi^2 | 0, 2 in time"],
    ["phi \\nabla^2 phi", "1 |  | phi^2 | 2"],
    ["(grad phi)^4", "1 |  | phi^4 | 4"],
    ["d_x phi d_x phi", "1 |  | phi^2 | 2"],
    ["\\mathbf{D} Phi", "1 |  | Phi | 1"],
    ["(dphi)^2", "direction-needed at 1"],
    ["phi box phi", "direction-needed at 4"],
    ["\\partial_\\mu phi", "direction-needed at 0"],
  ])("%s", (text, expected) => expect(readAs(text, anisotropic)).toBe(expected));
});
