import { useRef, type KeyboardEvent, type ReactNode } from "react";
import { classes } from "../../ui/classes.ts";
import { TableCopies } from "./table-copies.tsx";
import { ScrollBox } from "./scroll-box.tsx";

export interface ResultColumnSpec<Row> {
  readonly heading: ReactNode;
  readonly show: (row: Row) => ReactNode;
  /** Numbers stand to the right, on their decimal mark (see `Decimal`). */
  readonly numeric?: boolean;
}

interface Props<Row> {
  readonly caption: string;
  /** Draws the caption; it is read aloud in any case. */
  readonly showCaption?: boolean;
  readonly columns: readonly ResultColumnSpec<Row>[];
  readonly rows: readonly Row[];
  readonly keyOf: (row: Row) => string;
  /** "left-out" hatches a row, "chosen" puts it on the highlight. */
  readonly toneOf?: (row: Row) => "left-out" | "chosen" | null;
}

/** A table of results. Arrow keys go from figure to figure, so that the table is one stop of the Tab key. */
export function ResultTable<Row>({ caption, showCaption = false, columns, rows, keyOf, toneOf }: Props<Row>) {
  const table = useRef<HTMLTableElement>(null);
  return (
    <>
      <ScrollBox what="table of results">
        {/* The keys belong to the figures inside, which are buttons. */}
        {/* eslint-disable-next-line jsx-a11y-x/no-noninteractive-element-interactions -- see above */}
        <table
          className="block-table"
          onKeyDown={goByArrows}
          ref={(element) => {
            table.current = element;
            oneTabStop(element);
          }}
        >
          <caption className={showCaption ? "block-caption" : "sr-only"}>{caption}</caption>
          <thead>
            <tr>
              {columns.map(({ heading, numeric }, index) => (
                // Columns are fixed; their place is their identity.
                <th key={index} scope="col" className={classes(numeric && "block-numeric")}>
                  {heading}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => {
              const tone = toneOf?.(row);
              return (
                <tr key={keyOf(row)} className={tone ? `block-row-${tone}` : undefined}>
                  {columns.map(({ show, numeric }, index) => (
                    <td key={index} className={classes(numeric && "block-numeric")}>
                      {show(row)}
                    </td>
                  ))}
                </tr>
              );
            })}
          </tbody>
        </table>
      </ScrollBox>
      <TableCopies table={table} />
    </>
  );
}

function figuresOf(table: HTMLElement): HTMLElement[] {
  return [...table.querySelectorAll<HTMLElement>("[data-figure]")];
}

function oneTabStop(table: HTMLTableElement | null): void {
  if (table) for (const [index, figure] of figuresOf(table).entries()) figure.tabIndex = index === 0 ? 0 : -1;
}

function goByArrows(event: KeyboardEvent<HTMLTableElement>): void {
  const figures = figuresOf(event.currentTarget);
  const at = figures.findIndex((figure) => figure === document.activeElement);
  const current = figures[at];
  if (!current) return;
  const next = neighbour(figures, current, at, event.key);
  if (!next) return;
  event.preventDefault();
  event.stopPropagation();
  for (const figure of figures) figure.tabIndex = figure === next ? 0 : -1;
  next.focus();
}

function neighbour(
  figures: readonly HTMLElement[],
  current: HTMLElement,
  at: number,
  key: string,
): HTMLElement | undefined {
  if (key === "ArrowRight") return figures[at + 1];
  if (key === "ArrowLeft") return figures[at - 1];
  const down = key === "ArrowDown";
  if (!down && key !== "ArrowUp") return undefined;
  const column = columnOf(current);
  const others = down ? figures.slice(at + 1) : figures.slice(0, at).reverse();
  return others.find(
    (figure) => columnOf(figure) === column && figure.closest("tr") !== current.closest("tr"),
  );
}

function columnOf(figure: HTMLElement): number {
  return figure.closest("td")?.cellIndex ?? -1;
}
