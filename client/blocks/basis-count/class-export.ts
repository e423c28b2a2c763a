/** Every field content of a count as a file: CSV (RFC 4180), or a LaTeX longtable. */
import type { BasisValue, ClassCount } from "#engine/basis/value.ts";

export function classesAsCsv({ classes, symbolic, flavours }: BasisValue): string {
  const head = [
    "dimension",
    "fields",
    "derivatives",
    symbolic ? `operators at n_f = ${flavours}` : "operators",
  ];
  const lines = [
    [...head, ...(symbolic ? ["operators"] : []), "with Hermitian conjugate"],
    ...classes.map((row) => [
      row.dimension,
      row.fieldsLatex,
      String(row.derivatives),
      row.number.at,
      ...(symbolic ? [row.number.text] : []),
      row.withConjugate ? "yes" : "no",
    ]),
  ];
  return lines.map((line) => `${line.map(quoted).join(",")}\r\n`).join("");
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

export function classesAsLatex({ classes, symbolic, flavours }: BasisValue): string {
  const columns = symbolic ? 4 : 3;
  const lines = classes.map((row) =>
    [
      row.dimension,
      `$${contentLatex(row)}$`,
      row.number.at,
      ...(symbolic ? [`$${row.number.latex}$`] : []),
    ].join(" & "),
  );
  const head = [
    "dimension",
    "content",
    symbolic ? `$n_f = ${flavours}$` : "operators",
    ...(symbolic ? ["operators"] : []),
  ];
  return [
    "% needs \\usepackage{longtable}",
    `\\begin{longtable}{${"l".repeat(columns)}}`,
    `  ${head.join(" & ")} \\\\ \\hline`,
    ...lines.map((line) => `  ${line} \\\\`),
    "\\end{longtable}",
    "",
  ].join("\n");
}

export function contentLatex({ fieldsLatex, derivatives, withConjugate }: ClassCount): string {
  const derivative = derivatives === 0 ? "" : derivatives === 1 ? "\\,D" : `\\,D^{${derivatives}}`;
  return `${fieldsLatex}${derivative}${withConjugate ? "\\;+\\;\\text{h.c.}" : ""}`;
}
