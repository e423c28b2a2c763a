/** When each block of a notebook is drawn: a hundred at once would hold up the page for a second. */
import { useEffect, useId, useState } from "react";
import { flushSync } from "react-dom";
import { inTurns } from "../evaluation/in-turns.ts";

export interface DrawingTurns {
  /** True for the first who asks in a task of the event loop: a block that was just placed is drawn at once. */
  takeFirst(): boolean;
  /** Calls back in a task of its own. */
  wait(id: string, draw: () => void): void;
  destroy(): void;
}

export function createDrawingTurns(): DrawingTurns {
  const turns = inTurns<() => void>(
    (draw) => draw(),
    () => undefined,
  );
  let taken = false;
  return {
    takeFirst() {
      if (taken) return false;
      taken = true;
      setTimeout(() => (taken = false), 0);
      return true;
    },
    wait: (id, draw) => turns.add([[id, draw]]),
    destroy: () => turns.destroy(),
  };
}

/** `ready` tells when the code that draws is there; blocks take their turns from then on. */
export function useTurn(turns: DrawingTurns, isReady: () => boolean, ready: () => Promise<unknown>): boolean {
  const [due, setDue] = useState(() => isReady() && turns.takeFirst());
  const id = useId();
  useEffect(() => {
    if (due) return;
    let here = true;
    const draw = () => {
      if (here) flushSync(() => setDue(true));
    };
    void ready().then(() => {
      if (here) turns.wait(id, draw);
    });
    return () => {
      here = false;
    };
  }, [due, id, turns, ready]);
  return due;
}
