import { describe, expect, it } from "vitest";
import { latexText, plainNumber, tableAsCsv, tableAsLatex } from "../../../client/blocks/parts/table-text.ts";

function tableOf(html: string): HTMLTableElement {
  const box = document.createElement("div");
  box.innerHTML = `<table>${html}</table>`;
  return box.querySelector("table") ?? expect.fail("no table");
}
const drawn = (latex: string) =>
  `<span class="math"><span class="katex"><span class="katex-mathml"><math><semantics><mi>x</mi>` +
  `<annotation encoding="application/x-tex">${latex}</annotation></semantics></math></span>` +
  `<span class="katex-html" aria-hidden="true">x</span></span></span>`;
const table = tableOf(
  `<caption>sizes</caption><thead><tr><th>term</th><th>size, <b>relative</b></th><th>class</th></tr></thead>
   <tbody>
     <tr><td>${drawn("\\lambda\\phi^4")}</td>
         <td><span class="block-decimal"><span>−1</span><span>.2 × 10⁻³</span></span></td>
         <td><button>irrelevant<span class="sr-only">, pin this</span></button></td></tr>
     <tr><td><span class="math">c_6</span></td><td>50 %</td><td>"odd", R&amp;D_1</td></tr>
   </tbody><tfoot><tr><td>a problem</td></tr></tfoot>`,
);

describe("a table of results, copied", () => {
  it("as CSV, RFC 4180", () => {
    expect(tableAsCsv(table)).toBe(
      'term,"size, relative",class\r\n' +
        "\\lambda\\phi^4,-1.2e-3,irrelevant\r\n" +
        'c_6,50 %,"""odd"", R&D_1"\r\n',
    );
  });
  it("as a LaTeX tabular", () => {
    expect(tableAsLatex(table).split("\n")).toEqual([
      "\\begin{tabular}{lll}",
      "  \\hline",
      "  term & size, relative & class \\\\",
      "  \\hline",
      "  $\\lambda\\phi^4$ & $-1.2 \\times 10^{-3}$ & irrelevant \\\\",
      '  $c_6$ & 50 \\% & "odd", R\\&D\\_1 \\\\',
      "  \\hline",
      "\\end{tabular}",
      "",
    ]);
  });
  it.each([
    ["0.109(14)", "0.109(14)", "0.109(14)"],
    ["3.2 × 10¹²", "3.2e12", "$3.2 \\times 10^{12}$"],
    ["−4", "-4", "$-$4"],
    ["1.5 ± 0.2", "1.5 ± 0.2", "1.5 $\\pm$ 0.2"],
    ["GeV⁻²", "GeV⁻²", "GeV$^{-2}$"],
  ])("%s", (text, csv, latex) => {
    expect([plainNumber(text), latexText(text)]).toEqual([csv, latex]);
  });
});
