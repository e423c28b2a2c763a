import { useId, useState } from "react";
import { Button } from "../../ui/button.tsx";
import { useBlock } from "../block-handle.ts";
import type { BlockRow } from "#engine/notebook/block-instance.ts";
import { LONGEST_VALUE } from "./read-file.ts";

/** Where a line of the table stands: in which row of the document, and the how-manieth there. */
export function placeOfLine(
  rows: readonly BlockRow[],
  number: number,
): { readonly row: BlockRow; readonly lines: readonly string[]; readonly index: number } | null {
  let before = 0;
  for (const row of rows) {
    const lines = (row["values"] ?? "").split("\n");
    // Empty lines are not counted where the table is read.
    for (const [index, line] of lines.entries()) {
      if (line.trim() === "") continue;
      before += 1;
      if (before === number) return { row, lines, index };
    }
  }
  return null;
}

/** A line of a large import, changed by hand: its number, then its values. */
export function LineEditor() {
  const { tables, setValue, readOnly } = useBlock();
  const id = useId();
  const [number, setNumber] = useState("");
  const [draft, setDraft] = useState<string | null>(null);
  const place = /^\d+$/.test(number.trim()) ? placeOfLine(tables["lines"] ?? [], Number(number)) : null;
  const stored = place?.lines[place.index] ?? "";
  const text = draft ?? stored;
  const changed = place && [...place.lines.slice(0, place.index), ...(text.trim() === "" ? [] : [text]), ...place.lines.slice(place.index + 1)].join("\n"); // prettier-ignore
  const isTooLong = (changed ?? "").length > LONGEST_VALUE;
  if (readOnly) return null;
  return (
    <form
      className="block-settings"
      onSubmit={(event) => {
        event.preventDefault();
        if (!place || changed === null || isTooLong) return;
        setValue({ table: "lines", rowId: place.row.id, column: "values" }, changed);
        setDraft(null);
      }}
    >
      <label htmlFor={`${id}-number`}>change line</label>
      <input
        id={`${id}-number`}
        className="block-input block-notation"
        inputMode="numeric"
        size={5}
        value={number}
        placeholder="1"
        onChange={(event) => {
          setNumber(event.target.value);
          setDraft(null);
        }}
      />
      {place && (
        <>
          <label htmlFor={`${id}-values`} className="sr-only">
            values of line {number}
          </label>
          <input
            id={`${id}-values`}
            className="block-input block-notation"
            size={40}
            value={text}
            onChange={(event) => setDraft(event.target.value)}
          />
          <Button type="submit" disabled={text === stored || isTooLong}>
            {text.trim() === "" ? "Take the line out" : "Put it in place"}
          </Button>
        </>
      )}
      <span role="status">
        {number.trim() !== "" && !place && "There is no such line."}
        {isTooLong && "The line has become too long to be stored."}
      </span>
    </form>
  );
}
