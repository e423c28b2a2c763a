import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readPlainName, renameInLatex, renameInTerm } from "#engine/notation/rename.ts";

const name = (typed: string) => readPlainName(typed) ?? expect.fail(`${typed} is no plain name`);

describe("a plain name", () => {
  it.each(["phi", "\\phi", "φ"])("%s is one symbol in every spelling", (typed) => {
    expect(readPlainName(typed)).toEqual({ base: "phi", subscript: [], primes: 0 });
  });
  it.each(["", "phi chi", "\\tilde\\phi", "2", "phi^2", "\\"])("is not what %j says", (typed) => {
    expect(readPlainName(typed)).toBeNull();
  });
});

describe("renaming in a term", () => {
  it.each([
    ["lambda/4! phi^4", "phi", "chi", "lambda/4! chi^4"],
    ["\\frac{\\lambda}{4!}\\phi^4", "phi", "chi", "\\frac{\\lambda}{4!}\\chi^4"],
    ["λ/4! φ^4", "phi", "chi", "λ/4! chi^4"],
    ["\\phi\\sigma", "\\phi", "N", "N\\sigma"],
    ["\\phi x", "\\phi", "\\chi", "\\chi x"],
    ["(dphi)^2 phi^2", "phi", "chi", "(dchi)^2 chi^2"],
    ["y psibar psi phi", "psi", "N", "y Nbar N phi"],
    ["\\bar{\\psi}\\psi", "psi", "chi", "\\bar{\\chi}\\chi"],
    ["g A_\\mu J^\\mu", "A", "B", "g B_\\mu J^\\mu"],
    ["phi_1^2 phi_2^2", "phi_1", "chi", "chi^2 phi_2^2"],
    ["phi_1^2 phi_2^2", "phi", "chi", "phi_1^2 phi_2^2"],
    ["phi^2", "phi", "N_1", "N_1^2"],
    ["psibar psi", "psi", "N_1", "\\bar{N_1} N_1"],
    ["lambda phi^4", "lambda", "g", "g phi^4"],
    ["varphi phi", "phi", "chi", "varphi chi"],
    ["phi^2 + $", "phi", "chi", "phi^2 + $"],
  ])("%s: %s to %s", (text, from, to, expected) => {
    expect(renameInTerm(text, name(from), name(to))).toBe(expected);
  });

  it("leaves a term alone that does not use the symbol, and comes back with the opposite renaming", () => {
    const factor = fc.constantFrom("phi", "phi^2", "sigma", "dphi", "lambda", "phibar", "4!");
    fc.assert(
      fc.property(fc.array(factor, { minLength: 1, maxLength: 6 }), (factors) => {
        const term = factors.join(" ");
        const there = renameInTerm(term, name("phi"), name("omega"));
        expect(/\bd?phi/.test(there)).toBe(false);
        expect(renameInTerm(there, name("omega"), name("phi"))).toBe(term);
        expect(renameInTerm(term, name("eta"), name("omega"))).toBe(term);
      }),
    );
  });
});

describe("renaming in the LaTeX of prose", () => {
  it.each([
    ["\\phi^4 + \\phi_0 + \\varphi", "phi", "chi", "\\chi^4 + \\phi_0 + \\varphi"],
    [
      "A_\\mu A^\\mu + A_{\\mu\\nu} + A_0 + \\mathrm{AB}",
      "A",
      "B",
      "B_\\mu B^\\mu + B_{\\mu\\nu} + A_0 + \\mathrm{AB}",
    ],
    ["\\langle\\phi\\rangle", "phi", "sigma", "\\langle\\sigma\\rangle"],
    ["\\phi x", "phi", "N", "N x"],
    ["\\phi_1\\phi_2", "phi_1", "chi", "\\chi\\phi_2"],
    ["φ^2", "phi", "chi", "\\chi^2"],
    ["\\phi' + \\phi", "phi", "chi", "\\phi' + \\chi"],
    ["\\Phi", "phi", "chi", "\\Phi"],
    ["\\alpha", "a", "b", "\\alpha"],
  ])("%s: %s to %s", (latex, from, to, expected) => {
    expect(renameInLatex(latex, name(from), name(to))).toBe(expected);
  });
});
