import { describe, expect, it } from "vitest";
import { gridOf } from "../../../client/blocks/parts/pasted-grid.ts";
import { termsOf } from "../../../client/blocks/premises/lagrangian-terms.ts";

describe("a Lagrangian pasted as one expression", () => {
  it.each([
    [
      "\\mathcal{L} = \\tfrac12(\\partial\\phi)^2 - \\frac{\\lambda}{4!}\\phi^4",
      ["\\tfrac12(\\partial\\phi)^2", "-\\frac{\\lambda}{4!}\\phi^4"],
    ],
    [
      "L = m^2/2 phi^2 + lambda/4! phi^4 + c/Lambda^2 phi^6.",
      ["m^2/2 phi^2", "lambda/4! phi^4", "c/Lambda^2 phi^6"],
    ],
    ["-m^2 phi^2 - g phi^3", ["-m^2 phi^2", "-g phi^3"]],
    [
      "\\begin{align}\\mathcal{L}_{\\rm int} &= y\\bar\\psi\\psi\\phi \\label{eq:y}\\\\ &\\quad + (a-b)\\phi^4\\end{align}",
      ["y\\bar\\psi\\psi\\phi \\quad", "(a-b)\\phi^4"],
    ],
    ["$a \\phi^2 + 1e-3 \\phi^{-1+2}$", ["a \\phi^2", "1e-3 \\phi^{-1+2}"]],
    ["\\mathcal{L}(\\phi) = g\\phi^3 − h\\phi^4", ["g\\phi^3", "-h\\phi^4"]],
    ["a phi^-1 + b", ["a phi^-1", "b"]],
    ["lambda/4! phi^4", null],
    ["-lambda/4! phi^4", null],
    ["(a + b) phi^2", null],
    ["", null],
  ])("%s", (text, terms) => {
    expect(termsOf(text)).toEqual(terms);
  });
});

describe("a table pasted from LaTeX", () => {
  it.each([
    [
      "\\begin{tabular}{l|c}\n\\hline\n$\\phi$ & real scalar \\\\\n$\\psi$ & Dirac spinor \\\\ \\hline\n\\end{tabular}",
      [
        ["\\phi", "real scalar"],
        ["\\psi", "Dirac spinor"],
      ],
    ],
    [
      "a & 1.2(3) \\\\[2pt]\nb & R\\&D",
      [
        ["a", "1.2(3)"],
        ["b", "R\\&D"],
      ],
    ],
    ["R&D", null],
    ["a\\\\b", null],
  ])("%s", (text, grid) => {
    expect(gridOf(text)).toEqual(grid);
  });
});
