/** What of the shelf is shown. Its place is the address, so that a view can be kept, sent and gone back to. */
import { useCallback, useMemo } from "react";
import { useSearchParams } from "react-router-dom";
import type { ShelfView } from "../../api/notebooks.ts";

export const wholeShelf: ShelfView = { search: "", show: "current", attention: "any", sort: "changed" };

const shows = ["current", "archived", "deleted"] as const satisfies readonly ShelfView["show"][];

export function readShelfView(parameters: URLSearchParams): ShelfView {
  return {
    search: (parameters.get("search") ?? "").slice(0, 200),
    show: shows.find((show) => show === parameters.get("show")) ?? "current",
    attention: parameters.get("attention") === "moved" ? "moved" : "any",
    sort: parameters.get("sort") === "title" ? "title" : "changed",
  };
}

/** Only what differs from the whole shelf is written into the address. */
export function writeShelfView(view: ShelfView): Record<string, string> {
  return Object.fromEntries(
    Object.entries(view).filter(([name, value]) => value !== wholeShelf[name as keyof ShelfView]), // Its own keys.
  );
}

export function useShelfView(): readonly [ShelfView, (change: Partial<ShelfView>) => void] {
  const [parameters, setParameters] = useSearchParams();
  const view = useMemo(() => readShelfView(parameters), [parameters]);
  const change = useCallback(
    (part: Partial<ShelfView>) => {
      setParameters((now) => writeShelfView({ ...readShelfView(now), ...part }), { replace: true });
    },
    [setParameters],
  );
  return [view, change];
}
