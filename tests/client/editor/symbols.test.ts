// @vitest-environment node
import katex from "katex";
import { describe, expect, it } from "vitest";
import { commandAt, complete } from "../../../client/editor/mathematics/completion.ts";
import { findSymbols, latexSymbols } from "../../../client/editor/mathematics/latex-symbols.ts";

describe("the symbols that completion offers", () => {
  it("are about 250, each once", () => {
    expect(latexSymbols.length).toBeGreaterThan(240);
    expect(new Set(latexSymbols.map(({ insert }) => insert)).size).toBe(latexSymbols.length);
  });

  it("can all be drawn by KaTeX, as listed and as inserted", () => {
    const draw = (latex: string) => () =>
      katex.renderToString(latex, { displayMode: true, strict: "ignore" });
    for (const { insert, example } of latexSymbols) {
      expect(draw(example), example).not.toThrow();
      expect(draw(insert.replace("▯", "x")), insert).not.toThrow();
    }
  });
});

describe("finding a symbol", () => {
  const names = (typed: string) =>
    findSymbols(typed)
      .slice(0, 4)
      .map(({ insert }) => insert);
  it.each([
    ["alp", "\\alpha"],
    ["Lam", "\\Lambda"],
    ["lam", "\\lambda"],
    ["phi", "\\phi"],
    ["less", "\\lesssim"],
    ["frac", "\\frac{▯}{}"],
    ["aligned", "\\begin{aligned} ▯ \\end{aligned}"],
  ])("%s finds %s first", (typed, first) => expect(names(typed)[0]).toBe(first));

  it("finds nothing for what is no symbol", () => {
    expect(findSymbols("qqqq")).toEqual([]);
  });
});

describe("completing in a formula's source", () => {
  const symbol = (insert: string) => {
    const found = latexSymbols.find((candidate) => candidate.insert === insert);
    if (!found) throw new Error(`no symbol ${insert}`);
    return found;
  };
  it.each([
    ["\\al", 3, { from: 0, typed: "al" }],
    ["x + \\", 5, { from: 4, typed: "" }],
    ["a \\\\", 4, null],
    ["a \\\\\\be", 7, { from: 4, typed: "be" }],
    ["alpha", 5, null],
    ["\\alpha ", 7, null],
  ] as const)("%j at %i", (source, caret, expected) => expect(commandAt(source, caret)).toEqual(expected));

  it("puts the caret where the argument goes", () => {
    expect(complete("1 + \\fr", 7, symbol("\\frac{▯}{}"))).toEqual({ source: "1 + \\frac{}{}", caret: 10 });
  });

  it("keeps a command apart from the letter that follows", () => {
    expect(complete("\\alx", 3, symbol("\\alpha"))).toEqual({ source: "\\alpha x", caret: 7 });
  });
});
