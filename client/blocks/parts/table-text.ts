/** A table of the page as text for elsewhere: CSV (RFC 4180), or a LaTeX tabular. What does something is left out. */

interface Piece {
  readonly kind: "text" | "formula";
  readonly source: string;
}

/** What stands in each place of the table, row by row, headings first; what is there for hearing only is left out. */
export function piecesOf(table: HTMLTableElement): readonly (readonly (readonly Piece[])[])[] {
  return [...table.rows]
    .filter((row) => row.closest("tfoot") === null)
    .map((row) => [...row.cells].map((cell) => merged(piecesIn(cell))));
}

function piecesIn(node: Node): Piece[] {
  if (node.nodeType === Node.TEXT_NODE) return [{ kind: "text", source: node.textContent ?? "" }];
  if (!(node instanceof Element) || node.classList.contains("sr-only")) return [];
  if (node instanceof HTMLElement && node.dataset["copied"] === "no") return [];
  if (node.classList.contains("math")) {
    // Until KaTeX has drawn it, a formula shows its source.
    const drawn = node.querySelector('annotation[encoding="application/x-tex"]');
    return [{ kind: "formula", source: (drawn ?? node).textContent.trim() }];
  }
  if (node instanceof SVGElement) return [];
  return [...node.childNodes].flatMap(piecesIn);
}

function merged(pieces: readonly Piece[]): readonly Piece[] {
  const result: Piece[] = [];
  for (const piece of pieces) {
    const last = result.at(-1);
    if (piece.kind === "text" && last?.kind === "text")
      result[result.length - 1] = { kind: "text", source: last.source + piece.source };
    else result.push(piece);
  }
  return result
    .map(({ kind, source }) => ({ kind, source: source.replace(/\s+/g, " ") }))
    .filter(({ source }) => source.trim() !== "");
}

/** Numbers as a spreadsheet reads them, formulas by their source. */
export function tableAsCsv(table: HTMLTableElement): string {
  return piecesOf(table)
    .map((row) =>
      row.map((pieces) =>
        quoted(
          plainNumber(
            pieces
              .map(({ source }) => source)
              .join("")
              .trim(),
          ),
        ),
      ),
    )
    .map((row) => `${row.join(",")}\r\n`)
    .join("");
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** @example plainNumber("−1.2 × 10⁻³") // "-1.2e-3" */
export function plainNumber(text: string): string {
  return text
    .replace(/−/g, "-")
    .replace(/\s*[×·]\s*10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/g, (_, power: string) => `e${lowered(power)}`);
}

function lowered(power: string): string {
  return Array.from(power, (digit) => (digit === "⁻" ? "-" : String("⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(digit)))).join("");
}

/** A tabular with one column for each of the table's; needs no package. */
export function tableAsLatex(table: HTMLTableElement): string {
  const [head = [], ...body] = piecesOf(table).map((row) => row.map(latexOf));
  const columns = Math.max(head.length, ...body.map((row) => row.length));
  const line = (row: readonly string[]) => `  ${row.join(" & ")} \\\\`;
  return [
    `\\begin{tabular}{${"l".repeat(columns)}}`,
    "  \\hline",
    line(head),
    "  \\hline",
    ...body.map(line),
    "  \\hline",
    "\\end{tabular}",
    "",
  ].join("\n");
}

function latexOf(pieces: readonly Piece[]): string {
  return pieces
    .map(({ kind, source }) => (kind === "formula" ? `$${source}$` : latexText(source)))
    .join("")
    .trim();
}

/** @example latexText("−1.2 × 10⁻³ 50 %") // "$-1.2 \\times 10^{-3}$ 50 \\%" */
export function latexText(text: string): string {
  const escaped = text.replace(/[\\&%$#_{}~^]/g, (sign) => escapes[sign] ?? `\\${sign}`);
  return escaped
    .replace(
      /(−?)(\d[\d.]*(?:\(\d+\))?)\s*×\s*10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/g,
      (_, sign: string, size: string, power: string) => {
        return `$${sign === "" ? "" : "-"}${size} \\times 10^{${lowered(power)}}$`;
      },
    )
    .replace(/−(?=[\d.])/g, "$-$")
    .replace(/±/g, "$\\pm$")
    .replace(/([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/g, (power: string) => `$^{${lowered(power)}}$`);
}
const escapes: Readonly<Record<string, string>> = {
  "\\": "\\textbackslash{}",
  "~": "\\textasciitilde{}",
  "^": "\\textasciicircum{}",
};
