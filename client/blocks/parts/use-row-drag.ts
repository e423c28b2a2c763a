/** Moving a row with the pointer: a line shows where it would go; letting go writes one order key. */
import { useState, type PointerEvent, type RefObject } from "react";

interface Drag {
  readonly rowId: string;
  /** The row it would go before; null: after the last. */
  readonly before: string | null;
}

export function useRowDrag(
  body: RefObject<HTMLElement | null>,
  move: (rowId: string, beforeRowId: string | null) => void,
) {
  const [drag, setDrag] = useState<Drag | null>(null);

  function start(event: PointerEvent<HTMLElement>, rowId: string) {
    if (event.button !== 0) return;
    const handle = event.currentTarget;
    const { pointerId, clientY: startY } = event;
    let target: Drag | null = null;
    handle.setPointerCapture(pointerId);
    const onMove = (moved: globalThis.PointerEvent) => {
      // A click that trembles is no drag.
      if (target === null && Math.abs(moved.clientY - startY) < 4) return;
      target = { rowId, before: rowBelow(body.current, moved.clientY) };
      setDrag(target);
    };
    const end = (ended: globalThis.PointerEvent) => {
      handle.removeEventListener("pointermove", onMove);
      handle.removeEventListener("pointerup", end);
      handle.removeEventListener("pointercancel", end);
      setDrag(null);
      if (ended.type === "pointerup" && target && target.before !== rowId) move(rowId, target.before);
    };
    handle.addEventListener("pointermove", onMove);
    handle.addEventListener("pointerup", end);
    handle.addEventListener("pointercancel", end);
  }

  return {
    start,
    classOf(rowId: string): string | undefined {
      if (!drag) return undefined;
      if (drag.rowId === rowId) return "block-row-dragged";
      return drag.before === rowId ? "block-row-target" : undefined;
    },
  };
}

/** The first row whose middle lies below a height of the screen. */
function rowBelow(body: HTMLElement | null, y: number): string | null {
  for (const row of body?.querySelectorAll<HTMLElement>("[data-row]") ?? []) {
    const { top, height } = row.getBoundingClientRect();
    if (y < top + height / 2) return row.dataset["row"] ?? null;
  }
  return null;
}
