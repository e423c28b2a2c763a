/** Several lines or tab-separated values, as a spreadsheet or a text gives them. */

const MOST_LINES = 500;

/** Rows of trimmed values; null for a single value, which is pasted as text. Lines without tabs are one value each. */
export function gridOf(text: string): readonly (readonly string[])[] | null {
  const lines = text.replace(/\r\n?/g, "\n").replace(/\n+$/, "").split("\n");
  if (lines.length === 1 && !text.includes("\t")) return null;
  return lines
    .slice(0, MOST_LINES)
    .filter((line) => line.trim() !== "")
    .map((line) => line.split("\t").map(unquoted));
}

/** A spreadsheet quotes a value that holds a quotation mark or a line break, and doubles the marks inside. */
function unquoted(value: string): string {
  const trimmed = value.trim();
  const quoted = /^"((?:[^"]|"")*)"$/.exec(trimmed);
  return quoted ? (quoted[1] ?? "").replaceAll('""', '"').trim() : trimmed;
}
