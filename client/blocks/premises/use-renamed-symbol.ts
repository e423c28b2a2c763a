/** Notices that this person has changed the symbol of a field or scale: from what it was when they came to it. */
import { useRef, useState, type FocusEvent } from "react";
import { useBlock } from "../block-handle.ts";

interface Renaming {
  readonly table: string;
  readonly rowId: string;
  readonly from: string;
}

export function useRenamedSymbol() {
  const { tables } = useBlock();
  /** Rows that were there before, or have been left once: what a new row is called on the way is no name yet. */
  const settled = useRef<Set<string> | null>(null);
  const entered = useRef<Renaming | null>(null);
  const [renaming, setRenaming] = useState<Renaming | null>(null);
  const symbolOf = ({ table, rowId }: Pick<Renaming, "table" | "rowId">) =>
    tables[table]?.find(({ id }) => id === rowId)?.["symbol"]?.trim() ?? "";

  function onFocus({ target }: FocusEvent) {
    settled.current ??= new Set(
      ["fields", "scales"].flatMap((table) => (tables[table] ?? []).map(({ id }) => id)),
    );
    const place = symbolPlace(target);
    if (!place || entered.current) return;
    const from = symbolOf(place);
    if (from !== "" && settled.current.has(place.rowId)) entered.current = { ...place, from };
  }
  function onBlur({ target }: FocusEvent) {
    const place = symbolPlace(target);
    if (place) settled.current?.add(place.rowId);
    const left = entered.current;
    entered.current = null;
    if (left) setRenaming((before) => (before?.rowId === left.rowId ? before : left));
  }
  const to = renaming ? symbolOf(renaming) : "";
  return {
    watching: { onFocus, onBlur },
    renamed: renaming && to !== "" && to !== renaming.from ? { from: renaming.from, to } : null,
    forget: () => setRenaming(null),
  };
}

/** The row of a symbol's field: its place is "fields/row/symbol". */
function symbolPlace(target: Element): { table: string; rowId: string } | null {
  const place = target.closest<HTMLElement>("[data-place]")?.dataset["place"]?.split("/") ?? [];
  const [table, rowId, column] = place;
  if (place.length !== 3 || column !== "symbol" || !rowId) return null;
  return table === "fields" || table === "scales" ? { table, rowId } : null;
}
