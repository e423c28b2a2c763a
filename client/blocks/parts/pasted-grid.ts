/** Several lines or tab-separated values, as a spreadsheet or a text gives them. */

const MOST_LINES = 500;

/** Rows of trimmed values; null for a single value, which is pasted as text. Lines without tabs are one value each. */
export function gridOf(text: string): readonly (readonly string[])[] | null {
  if (isLatexTable(text)) return latexGrid(text);
  const lines = text.replace(/\r\n?/g, "\n").replace(/\n+$/, "").split("\n");
  if (lines.length === 1 && !text.includes("\t")) return null;
  return lines
    .slice(0, MOST_LINES)
    .filter((line) => line.trim() !== "")
    .map((line) => line.split("\t").map(unquoted));
}

/** Rows that end in a double backslash, with or without their environment. */
function isLatexTable(text: string): boolean {
  return /\\begin\{(?:tabular|array)/.test(text) || (/\\\\/.test(text) && /(?<!\\)&/.test(text));
}

/** The values of a LaTeX table as typed notation: rules, environments, alignment and dollar signs go. */
function latexGrid(text: string): readonly (readonly string[])[] {
  return text
    .replace(
      /\\begin\{(?:tabular|array)\*?\}(?:\[[^\]]*\])?\{(?:[^{}]|\{[^{}]*\})*\}|\\end\{(?:tabular|array)\*?\}/g,
      "",
    )
    .replace(/\\(?:hline|toprule|midrule|bottomrule)\b|\\(?:cline|cmidrule)(?:\([^)]*\))?\{[^{}]*\}/g, "")
    .split(/\\\\(?:\[[^\]]*\])?/)
    .filter((line) => line.trim() !== "")
    .slice(0, MOST_LINES)
    .map((line) =>
      line.split(/(?<!\\)&/).map((value) =>
        value
          .trim()
          .replace(/^\$(.*)\$$/s, "$1")
          .trim(),
      ),
    );
}

/** A spreadsheet quotes a value that holds a quotation mark or a line break, and doubles the marks inside. */
function unquoted(value: string): string {
  const trimmed = value.trim();
  const quoted = /^"((?:[^"]|"")*)"$/.exec(trimmed);
  return quoted ? (quoted[1] ?? "").replaceAll('""', '"').trim() : trimmed;
}
