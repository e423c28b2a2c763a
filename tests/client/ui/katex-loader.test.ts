// @vitest-environment happy-dom
/** Formulas that colleagues may put into a document must not take a reader's page along. */
import { beforeAll, describe, expect, it } from "vitest";
import { loadKatex, LONGEST_FORMULA } from "../../../client/ui/katex-loader.ts";
import { latexFaultWords } from "../../../client/ui/latex-fault-words.ts";

// KaTeX looks once, when it is fetched; a real page has its doctype.
beforeAll(() => Object.defineProperty(document, "compatMode", { value: "CSS1Compat" }));

const draw = async (latex: string) => {
  const element = document.createElement("div");
  const fault = (await loadKatex()).draw(latex, element, true);
  return { element, words: fault === null ? null : latexFaultWords(fault, latex).sentence };
};

describe("a hostile formula", () => {
  it.each([
    ["braces", `${"{".repeat(5_000)}x${"}".repeat(5_000)}`, /nests too deeply/],
    ["roots", `${"\\sqrt{".repeat(1_500)}x${"}".repeat(1_500)}`, /nests too deeply/],
    ["a megabyte", "x+".repeat(500_000), /too long/],
    ["one letter more than is drawn", "x".repeat(LONGEST_FORMULA + 1), /too long/],
    ["macros that grow", "\\def\\a{\\a\\a}\\a", /expanding its own macros/],
  ])("of %s is refused in words", async (_name, latex, words) => {
    const start = performance.now();
    const drawn = await draw(latex);
    expect(drawn.words).toMatch(words);
    expect(drawn.element.childNodes).toHaveLength(0);
    expect(performance.now() - start).toBeLessThan(5_000);
  });

  it.each([
    "\\href{javascript:alert(1)}{x}",
    "\\url{javascript:alert(1)}",
    "\\includegraphics{https://elsewhere.example/x.png}",
    "\\htmlClass{page}{x}",
    "\\htmlId{main}{x}",
    "\\htmlStyle{position:fixed}{x}",
    "\\htmlData{a=b}{x}",
  ])("%s makes no link, picture or markup", async (latex) => {
    const { element, words } = await draw(latex);
    expect(words).toBeNull();
    expect(element.querySelector(".katex")).not.toBeNull();
    expect(element.querySelectorAll("a, img, [id], [href], [src], [data-a], .page")).toHaveLength(0);
    expect(element.querySelectorAll("[style*=fixed]")).toHaveLength(0);
  });
});
