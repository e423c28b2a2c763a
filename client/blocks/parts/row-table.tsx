import { useLayoutEffect, useRef, useState, type KeyboardEvent, type ReactNode } from "react";
import type { BlockRow } from "#engine/notebook/block-instance.ts";
import { useBlock, type FieldPlace } from "../block-handle.ts";
import { ChoiceField, type Option } from "./choice-field.tsx";
import { NewRow } from "./new-row.tsx";
import { gridOf } from "./pasted-grid.ts";
import { ProblemList } from "./problem-list.tsx";
import { ReferenceField, ScalarField } from "./reference-field.tsx";
import { RowHandle } from "./row-handle.tsx";
import { TextField } from "./text-field.tsx";
import { useRowDrag } from "./use-row-drag.ts";

export interface ColumnSpec {
  readonly column: string;
  readonly heading: string;
  /** The values of a choice; absent for text. */
  readonly options?: readonly (Option | string)[];
  /** True for a column that names another block. */
  readonly refers?: true;
  /** For a column that names a number of another block: the column that names the block. */
  readonly scalarOf?: string;
  readonly placeholder?: string;
  readonly size?: number;
  /** How the value of a row is understood, drawn while nobody is in the field. */
  readonly reading?: (row: BlockRow) => ReactNode;
  readonly notation?: boolean;
  /** Takes pasted text apart into rows of this column, where it is more than one value; null leaves it as it is. */
  readonly linesOf?: (text: string) => readonly string[] | null;
}
export interface ResultColumn {
  readonly heading: string;
  readonly show: (row: BlockRow) => ReactNode;
}

const noRows: readonly BlockRow[] = [];

interface Props {
  readonly table: string;
  /** What a row is, in the singular: "field". */
  readonly noun: string;
  readonly caption: string;
  readonly columns: readonly ColumnSpec[];
  /** Read-only columns after the typed ones, from the result. */
  readonly results?: readonly ResultColumn[];
  /** What a row is called when it is read aloud: its symbol, its term. */
  readonly nameOf: (row: BlockRow) => string;
  /** Shown while the table is empty. */
  readonly invitation?: string;
}

/**
 * A table of inputs. Enter goes down a column and adds a row at the end; typing in the last line begins a row; lines
 * pasted from a spreadsheet fill rows. The handle before a row moves it (pointer, or arrow keys) and removes it.
 */
export function RowTable({ table, noun, caption, columns, results = [], nameOf, invitation }: Props) {
  const block = useBlock();
  const rows = block.tables[table] ?? noRows;
  const body = useRef<HTMLTableSectionElement>(null);
  const [wanted, setWanted] = useState<{ rowId: string; column: string; caretAtEnd: boolean } | null>(null);
  /** The row that typing in the last line has made, while the focus is still where it began. */
  const [begun, setBegun] = useState<{ rowId: string; column: string } | null>(null);
  const drag = useRowDrag(body, (rowId, beforeRowId) => block.moveRow(table, rowId, beforeRowId));

  // The row asked for exists in the page only after this drawing.
  useLayoutEffect(() => {
    if (!wanted) return;
    const field = findField(body.current, wanted.rowId, wanted.column);
    if (!field) return;
    field.focus();
    if (wanted.caretAtEnd && field instanceof HTMLInputElement)
      field.setSelectionRange(field.value.length, field.value.length);
    setWanted(null);
  }, [wanted, rows]);

  const firstColumn = columns[0]?.column ?? "";
  function goDown(index: number, column: string) {
    const next = rows[index + 1];
    if (next) findField(body.current, next.id, column)?.focus();
    else if (!block.readOnly)
      setWanted({ rowId: block.addRow(table), column: firstColumn, caretAtEnd: false });
  }
  function pasteAt(rowId: string | null, column: string, text: string): boolean {
    const from = columns.findIndex((spec) => spec.column === column);
    const lines = columns[from]?.linesOf?.(text)?.map((line) => [line]) ?? gridOf(text);
    if (!lines || block.readOnly) return false;
    block.paste({ table, rowId, columns: columns.slice(from).map((spec) => spec.column), lines });
    return true;
  }
  function moveByKey(event: KeyboardEvent, index: number) {
    if (!event.altKey || (event.key !== "ArrowUp" && event.key !== "ArrowDown")) return;
    event.preventDefault();
    event.stopPropagation();
    moveBy(index, event.key === "ArrowUp" ? -1 : 1);
  }
  function moveBy(index: number, step: -1 | 1) {
    const row = rows[index];
    if (!row || block.readOnly || !rows[index + step]) return;
    block.moveRow(table, row.id, rows[step === -1 ? index - 1 : index + 2]?.id ?? null);
  }
  /** What stood there when the typing began was the empty line. */
  function takeBack({ rowId, column }: { rowId: string; column: string }) {
    setBegun(null);
    block.removeRow(table, rowId);
    const index = columns.findIndex((spec) => spec.column === column);
    const fields = body.current?.querySelectorAll<HTMLElement>(".block-new-row td");
    fields
      ?.item(index + 1)
      .querySelector("input")
      ?.focus();
  }
  function remove(index: number) {
    const [row, neighbour] = [rows[index], rows[index + 1] ?? rows[index - 1]];
    if (!row) return;
    block.removeRow(table, row.id);
    if (neighbour)
      body.current
        ?.querySelector<HTMLElement>(`[data-row="${CSS.escape(neighbour.id)}"] .block-row-handle`)
        ?.focus();
  }

  return (
    <div className="block-scroll">
      <table className="block-table block-rows" data-table={table}>
        <caption className="block-caption">{caption}</caption>
        <thead>
          <tr>
            {!block.readOnly && (
              <th className="block-handle-column">
                <span className="sr-only">row</span>
              </th>
            )}
            {columns.map(({ column, heading }) => (
              <th key={column} scope="col">
                {heading}
              </th>
            ))}
            {results.map(({ heading }) => (
              <th key={heading} scope="col">
                {heading}
              </th>
            ))}
          </tr>
        </thead>
        <tbody ref={body}>
          {rows.map((row, index) => (
            <tr
              key={row.id}
              data-row={row.id}
              className={drag.classOf(row.id)}
              onKeyDown={(event) => moveByKey(event, index)}
            >
              {!block.readOnly && (
                <td className="block-handle-column">
                  <RowHandle
                    name={`${noun} ${index + 1}${nameOf(row) === "" ? "" : `, ${nameOf(row)}`}`}
                    onMove={(step) => moveBy(index, step)}
                    onRemove={() => remove(index)}
                    onPointerDown={(event) => drag.start(event, row.id)}
                  />
                </td>
              )}
              {columns.map((spec) => (
                <td key={spec.column} data-heading={spec.heading} onBlur={() => setBegun(null)}>
                  <Value
                    spec={spec}
                    row={row}
                    place={{ table, rowId: row.id, column: spec.column }}
                    label={`${spec.heading} of ${noun} ${index + 1}`}
                    onEnter={() => goDown(index, spec.column)}
                    onPasteText={(text) => pasteAt(row.id, spec.column, text)}
                    {...(begun?.rowId === row.id && begun.column === spec.column
                      ? { onEscape: () => takeBack(begun) }
                      : {})}
                  />
                </td>
              ))}
              {results.map(({ heading, show }) => (
                <td key={heading} className="block-result-value" data-heading={heading}>
                  {show(row)}
                </td>
              ))}
            </tr>
          ))}
          {!block.readOnly && (
            <NewRow
              noun={noun}
              columns={columns}
              resultCount={results.length}
              invitation={rows.length === 0 ? invitation : undefined}
              onBegin={(column, text) => {
                const rowId = block.addRow(table, { [column]: text });
                setWanted({ rowId, column, caretAtEnd: true });
                setBegun({ rowId, column });
              }}
              onPasteText={(column, text) => pasteAt(null, column, text)}
            />
          )}
        </tbody>
        <tfoot>
          <TableProblems table={table} span={columns.length + results.length + 1} />
        </tfoot>
      </table>
    </div>
  );
}

interface ValueProps {
  readonly spec: ColumnSpec;
  readonly row: BlockRow;
  readonly place: FieldPlace;
  readonly label: string;
  readonly onEnter: () => void;
  readonly onPasteText: (text: string) => boolean;
  readonly onEscape?: () => void;
}

function Value({ spec, row, place, label, onEnter, onPasteText, onEscape }: ValueProps) {
  const { options, reading, placeholder, size, notation } = spec;
  if (spec.refers) return <ReferenceField place={place} label={label} />;
  if (spec.scalarOf) return <ScalarField place={place} label={label} blockId={row[spec.scalarOf] ?? ""} />;
  if (options) return <ChoiceField place={place} label={label} options={options} />;
  const drawn = reading?.(row);
  return (
    <TextField
      place={place}
      label={label}
      onEnter={onEnter}
      onPasteText={onPasteText}
      {...(onEscape === undefined ? {} : { onEscape })}
      {...(drawn === undefined || drawn === null ? {} : { reading: drawn })}
      {...(placeholder === undefined ? {} : { placeholder })}
      {...(size === undefined ? {} : { size })}
      {...(notation === undefined ? {} : { notation })}
    />
  );
}

/** Problems of the table or of a whole row, below it. */
function TableProblems({ table, span }: { readonly table: string; readonly span: number }) {
  const block = useBlock();
  const ids = new Set((block.tables[table] ?? []).map(({ id }) => id));
  const problems = (block.evaluation?.problems ?? []).filter(({ path: [first, rowId, column] }) => {
    if (first !== table) return false;
    return rowId === undefined || (column === undefined && ids.has(rowId));
  });
  if (problems.length === 0) return null;
  return (
    <tr>
      <td colSpan={span}>
        <ProblemList problems={problems} />
      </td>
    </tr>
  );
}

function findField(body: HTMLElement | null, rowId: string, column: string): HTMLElement | null {
  const row = body?.querySelector(`[data-row="${CSS.escape(rowId)}"]`);
  const place =
    row &&
    [...row.querySelectorAll<HTMLElement>("[data-place]")].find((field) =>
      field.dataset["place"]?.endsWith(`/${column}`),
    );
  return place?.querySelector<HTMLElement>("input, select") ?? null;
}
