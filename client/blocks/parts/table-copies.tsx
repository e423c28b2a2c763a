import { useState, type RefObject } from "react";

interface Props {
  readonly table: RefObject<HTMLTableElement | null>;
}

/** Copies a table of results for a spreadsheet or a paper. */
export function TableCopies({ table }: Props) {
  const [said, setSaid] = useState("");
  async function copy(format: "CSV" | "LaTeX") {
    const { tableAsCsv, tableAsLatex } = await import("./table-text.ts");
    if (!table.current) return;
    const text = format === "CSV" ? tableAsCsv(table.current) : tableAsLatex(table.current);
    try {
      await navigator.clipboard.writeText(text);
      setSaid(`copied as ${format}`);
    } catch {
      // The browser or its user does not let pages write to the clipboard.
      setSaid("the browser did not allow it");
    }
  }
  return (
    <p className="block-table-copies">
      copy as{" "}
      <button type="button" className="block-link" onClick={() => void copy("CSV")}>
        CSV
      </button>{" "}
      <button type="button" className="block-link" onClick={() => void copy("LaTeX")}>
        LaTeX
      </button>{" "}
      <span role="status">{said}</span>
    </p>
  );
}
