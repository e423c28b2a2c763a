import type { PointerEvent } from "react";

interface Props {
  /** "field 2, chi". */
  readonly name: string;
  readonly onMove: (step: -1 | 1) => void;
  readonly onRemove: () => void;
  readonly onPointerDown: (event: PointerEvent<HTMLElement>) => void;
}

/** Moves and removes a row: drag it, or use the arrow keys and Delete on it. */
export function RowHandle({ name, onMove, onRemove, onPointerDown }: Props) {
  return (
    <span className="block-row-tools">
      <button
        type="button"
        className="block-row-handle"
        aria-label={`${name}: arrow keys move it, Delete removes it`}
        aria-keyshortcuts="ArrowUp ArrowDown Delete"
        onPointerDown={onPointerDown}
        onKeyDown={(event) => {
          const act = keys[event.key];
          if (!act || event.altKey || event.ctrlKey || event.metaKey) return;
          event.preventDefault();
          event.stopPropagation();
          if (act === "remove") onRemove();
          else onMove(act);
        }}
      >
        <svg width="10" height="14" viewBox="0 0 10 14" aria-hidden="true" focusable="false">
          <path d="M1 3.5h8M1 7h5M1 10.5h8" stroke="currentColor" fill="none" />
        </svg>
      </button>
      <button
        type="button"
        className="block-row-remove"
        tabIndex={-1}
        aria-label={`remove ${name}`}
        onClick={onRemove}
      >
        <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true" focusable="false">
          <path d="M1.5 1.5l7 7M8.5 1.5l-7 7" stroke="currentColor" fill="none" />
        </svg>
      </button>
    </span>
  );
}

const keys: Readonly<Record<string, -1 | 1 | "remove">> = {
  ArrowUp: -1,
  ArrowDown: 1,
  Delete: "remove",
  Backspace: "remove",
};
