/** What a formula's panel stands beside. */
import { useMemo, useRef } from "react";

/** The formula's box, or where it last was: the panel does not jump when a colleague removes what it is about. */
export function useSteadyAnchor(element: HTMLElement) {
  const last = useRef<DOMRect | null>(null);
  return useMemo(
    () => ({
      current: {
        getBoundingClientRect() {
          if (element.isConnected || last.current === null) last.current = element.getBoundingClientRect();
          return last.current;
        },
      },
    }),
    [element],
  );
}
