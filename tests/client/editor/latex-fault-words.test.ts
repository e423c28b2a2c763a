// @vitest-environment node
import katex from "katex";
import { describe, expect, it } from "vitest";
import { latexFaultWords } from "../../../client/ui/latex-fault-words.ts";

/** What KaTeX itself throws for the source, so that a new wording of its own shows up here. */
function wordsFor(source: string) {
  try {
    katex.renderToString(source, { displayMode: false, strict: "ignore" });
  } catch (error) {
    if (!(error instanceof katex.ParseError)) throw error;
    const position: unknown = error.position;
    return latexFaultWords(
      { message: error.rawMessage, position: typeof position === "number" ? position : null },
      source,
    );
  }
  throw new Error(`KaTeX draws ${source}`);
}

describe("what is wrong with a formula", () => {
  it.each([
    ["x + \\lamda", "\\lamda is not a command known here", "at character 5, at “\\lamda”"],
    ["\\frac{a}{b", "something is not closed", "at the end"],
    ["a}", "one } too many", "at character 2, at “}”"],
    ["a^b^c", "Two superscripts", "at character 4, at “^c”"],
    ["a_b_c", "Two subscripts", "at character 4, at “_c”"],
    ["{a", "A brace { is opened and never closed", "at the end"],
    ["a^", "Something must follow ^", "at character 2"],
    ["\\left( x", "\\left has no \\right", "at the end"],
    ["x \\right)", "\\right has no \\left", "at character 3, at “\\right)”"],
    ["a & b", "& aligns columns", "at character 3, at “& b”"],
    ["\\begin{matrx} a \\end{matrx}", "no environment called matrx", "at character 7"],
    ["\\begin{matrix} a \\end{cases}", "\\begin{matrix} is closed by \\end{cases}", "at character"],
    ["x $y$", "this is mathematics already", "at character 3"],
    ["x \\tag{1}", "displayed equations only", ""],
  ])("%s", (source, sentence, place) => {
    const words = wordsFor(source);
    expect(words.sentence).toContain(sentence);
    expect(words.place).toContain(place);
  });

  it("never shows a bare pattern", () => {
    for (const source of ["\\sqrt", "\\frac", "\\text{", "\\rule{1q}{1em}", "\\hat"]) {
      expect(wordsFor(source).sentence).not.toMatch(/\$\d|undefined/);
    }
  });
});
