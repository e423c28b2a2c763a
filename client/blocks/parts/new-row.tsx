import { useState } from "react";
import type { ColumnSpec } from "./row-table.tsx";
import { sizeStyle } from "./size-style.ts";

interface Props {
  readonly noun: string;
  readonly columns: readonly ColumnSpec[];
  readonly resultCount: number;
  readonly invitation: string | undefined;
  /** The first letters have been typed: the row is made and takes the focus over. */
  readonly onBegin: (column: string, text: string) => void;
  readonly onPasteText: (column: string, text: string) => boolean;
}

/** The line after the last row: typing in it begins a row. It is no part of the document until then. */
export function NewRow({ noun, columns, resultCount, invitation, onBegin, onPasteText }: Props) {
  // Letters of an input method that are not yet composed stay here; the row begins with the finished ones.
  const [composing, setComposing] = useState("");
  return (
    <tr className="block-new-row">
      <td className="block-handle-column" />
      {columns.map(({ column, heading, options, refers, scalarOf, size }, index) => (
        <td key={column} data-heading={options ? undefined : heading}>
          {!options && !refers && !scalarOf && (
            <input
              type="text"
              className="block-input block-notation"
              aria-label={`${heading} of a new ${noun}`}
              placeholder={
                index === 0
                  ? invitation === undefined
                    ? `new ${noun}`
                    : `first ${noun}: ${invitation}`
                  : undefined
              }
              autoComplete="off"
              autoCapitalize="off"
              spellCheck={false}
              style={sizeStyle(size)}
              value={composing}
              onChange={(event) => {
                const { isComposing } = event.nativeEvent as InputEvent; // React types it as an Event
                if (isComposing) setComposing(event.target.value);
                else if (event.target.value !== "") onBegin(column, event.target.value);
              }}
              onCompositionEnd={(event) => {
                setComposing("");
                if (event.currentTarget.value !== "") onBegin(column, event.currentTarget.value);
              }}
              onPaste={(event) => {
                if (onPasteText(column, event.clipboardData.getData("text/plain"))) event.preventDefault();
              }}
            />
          )}
        </td>
      ))}
      {resultCount > 0 && <td colSpan={resultCount} />}
    </tr>
  );
}
