/* eslint-disable jsx-a11y-x/no-redundant-roles, jsx-a11y-x/no-interactive-element-to-noninteractive-role --
   see ShelfTable: the roles are not redundant where the style sheet lays the table out anew */
import type { NotebookRow } from "#contract/api.ts";
import { Link } from "react-router-dom";
import { classes } from "../../ui/classes.ts";
import { Moment } from "../../ui/moment.tsx";
import { NotebookActions } from "./notebook-actions.tsx";
import { moveBetweenRows } from "./row-keys.ts";
import "./shelf-table.css";

interface Props {
  readonly notebooks: readonly NotebookRow[];
  readonly labelledBy: string;
  /** The rows are those of the view before, until the new ones arrive. */
  readonly stale: boolean;
}

/**
 * A table on a wide page; on a narrow one each row becomes a short entry. Changing how a table is laid out takes its
 * meaning from some screen readers, so the roles are written out.
 */
export function ShelfTable({ notebooks, labelledBy, stale }: Props) {
  return (
    <table role="table" aria-labelledby={labelledBy} aria-busy={stale || undefined} className="shelf-table">
      <thead role="rowgroup">
        <tr role="row">
          <th role="columnheader">Notebook</th>
          <th role="columnheader">Last change</th>
          <th role="columnheader">People</th>
          <th role="columnheader">Pins</th>
          <th role="columnheader">Role</th>
          <th role="columnheader">
            <span className="sr-only">Actions</span>
          </th>
        </tr>
      </thead>
      <tbody role="rowgroup">
        {notebooks.map((notebook) => (
          <ShelfRow key={notebook.id} notebook={notebook} />
        ))}
      </tbody>
    </table>
  );
}

function ShelfRow({ notebook }: { readonly notebook: NotebookRow }) {
  return (
    <tr role="row">
      <th role="rowheader" scope="row" className="shelf-title">
        {notebook.deletedAt === null ? (
          <Link to={`/notebooks/${notebook.id}`} className="shelf-link" onKeyDown={moveBetweenRows}>
            {notebook.title}
          </Link>
        ) : (
          <span>{notebook.title}</span>
        )}
        <span className="shelf-premises">
          {notebook.premisesLine === "" ? "no premises yet" : notebook.premisesLine}
        </span>
        {notebook.excerpt !== null && <span className="shelf-excerpt">… {notebook.excerpt} …</span>}
      </th>
      <td role="cell" className="shelf-change">
        <Moment at={notebook.lastChangedAt} />
        {notebook.lastChangedBy && <span className="shelf-by"> by {notebook.lastChangedBy}</span>}
      </td>
      <td role="cell" className="shelf-people">
        {sayPeople(notebook.people)}
      </td>
      <td role="cell" className="shelf-pins">
        <Pins moved={notebook.pinsMoved} loose={notebook.pinsLoose} />
      </td>
      <td role="cell" className="shelf-role text-ink-2">
        {notebook.role}
      </td>
      <td role="cell" className="shelf-actions">
        <NotebookActions notebook={notebook} />
      </td>
    </tr>
  );
}

/** Moved and loose pins in words; the red hairline stands only where a number has moved. */
function Pins({ moved, loose }: { readonly moved: number; readonly loose: number }) {
  if (moved === 0 && loose === 0) return <span className="text-ink-2">none moved</span>;
  return (
    <span
      className={classes(
        "inline-block border-l-2 pl-2",
        moved > 0 ? "border-hairline text-hairline" : "border-tick",
      )}
    >
      {[moved > 0 ? `${moved} moved` : null, loose > 0 ? `${loose} loose` : null].filter(Boolean).join(", ")}
    </span>
  );
}

/** Three names, then how many more. */
export function sayPeople(people: readonly string[]): string {
  const shown = people.slice(0, 3).join(", ");
  return people.length > 3 ? `${shown} and ${people.length - 3} more` : shown;
}
