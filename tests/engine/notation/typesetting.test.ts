import katex from "katex";
import { describe, expect, it } from "vitest";
import { Rational } from "#engine/exact/rational.ts";
import { coefficientLatex, operatorLatex } from "#engine/notation/operator-latex.ts";
import { readTerm } from "#engine/notation/read-term.ts";
import { vocabulary } from "./reading.ts";

function latexOf(text: string): string {
  const reading = readTerm(text, vocabulary);
  if (!reading.ok) throw new Error(`${text}: ${reading.failure.code}`);
  return reading.value.latex;
}

describe("a term is typeset as it is understood", () => {
  it.each([
    ["lambda/4! phi^4", "\\frac{\\lambda}{4!}\\,\\phi^{4}"],
    ["lambda phi^4/4!", "\\frac{\\lambda\\,\\phi^{4}}{4!}"],
    ["c/Lambda^2 (dphi)^2 phi^2", "\\frac{c}{\\Lambda^{2}}\\,(\\partial \\phi)^{2}\\,\\phi^{2}"],
    ["1/(16 pi^2) phi^4", "\\frac{1}{16\\,\\pi^{2}}\\,\\phi^{4}"],
    ["y psibar psi phi", "y\\,\\bar{\\psi}\\,\\psi\\,\\phi"],
    ["|Phi|^2", "\\lvert \\Phi\\rvert^{2}"],
    ["hbar_v i v.D h_v", "\\bar{h}_v\\,i\\,v \\cdot D h_v"],
    ["\\bar h_v h_v", "\\bar{h}_v\\,h_v"],
    ["2 3 phi", "2 \\cdot 3\\,\\phi"],
    ["-1/4 F_{mu nu} F^{mu nu}", "-\\frac{1}{4}\\,F_{\\mu\\nu}\\,F^{\\mu \\nu}"],
    ["y psibar psi + h.c.", "y\\,\\bar{\\psi}\\,\\psi + \\text{h.c.}"],
  ])("%s", (text, latex) => expect(latexOf(text)).toBe(latex));

  it.each([
    "lambda/4! phi^4",
    "sqrt(2)/M_Pl^2 (dphi)^2 (dchi)^2",
    "|D_mu Phi|^2",
    "hbar_v i v.D h_v",
    "c psibar sigma^{mu nu} psi F_{mu nu}",
    "psibar dslash psi",
    "\\dot\\phi^2 \\ddot\\chi",
    "Phi^\\dagger grad^2 Phi",
    "phi box^2 phi",
    "theta F Ftilde",
    "phi_i^2 \\phi_a",
    "\\langle\\phi\\rangle \\phi",
    "c_{H\\Box} phi^2",
    "g' phi^2 + h.c.",
    "(Phi^\\dagger)^2 Phi^2",
  ])("KaTeX accepts what %s is typeset as", (text) => {
    expect(() => katex.renderToString(latexOf(text), { throwOnError: true, strict: "error" })).not.toThrow();
  });

  it("reads back as the same term", () => {
    for (const text of [
      "lambda/4! phi^4",
      "c/Lambda^2 (dphi)^2 phi^2",
      "y psibar psi phi",
      "|Phi|^4",
      "hbar_v i v.D h_v",
      "phi^4/3 Lambda",
    ]) {
      const [first, again] = [text, latexOf(text)].map((typed) => readTerm(typed, vocabulary));
      expect(again?.ok && again.value.monomial).toEqual(first?.ok && first.value.monomial);
    }
  });
});

describe("operators and coefficients", () => {
  const fields = [
    { symbol: "phi", latex: "\\phi", kind: "real scalar" },
    { symbol: "Phi", latex: "\\Phi", kind: "complex scalar" },
    { symbol: "psi", latex: "\\psi", kind: "Dirac spinor" },
  ];
  const legs = (symbol: string, conjugated: boolean, count: number) => ({ symbol, conjugated, count });
  it.each([
    [{ fields: [legs("phi", false, 4)], derivatives: 2, timeDerivatives: 0 }, "\\partial^{2} \\phi^{4}"],
    [
      {
        fields: [legs("psi", true, 1), legs("psi", false, 1), legs("phi", false, 1)],
        derivatives: 0,
        timeDerivatives: 0,
      },
      "\\phi \\bar{\\psi} \\psi",
    ],
    [
      { fields: [legs("Phi", true, 2), legs("Phi", false, 2)], derivatives: 0, timeDerivatives: 1 },
      "\\partial_t (\\Phi^\\dagger)^{2} \\Phi^{2}",
    ],
  ])("%#", (operator, latex) => expect(operatorLatex(operator, fields, "isotropic")).toBe(latex));
  it("show couplings over scales", () => {
    const coefficients = [
      { symbol: "c_6", power: Rational.one },
      { symbol: "Lambda", power: Rational.of(-2) },
    ];
    expect(coefficientLatex({ coefficients })).toBe("\\frac{c_6}{\\Lambda^{2}}");
    expect(coefficientLatex({ coefficients: [] })).toBe("1");
  });
});
