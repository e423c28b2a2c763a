/** Moving a hand along a scale with a pointer: at most one change per frame, kept by the element that was pressed. */
import { useEffect, useRef, type PointerEvent as ReactPointerEvent } from "react";

interface Drag {
  onPointerDown(event: ReactPointerEvent): void;
  onPointerMove(event: ReactPointerEvent): void;
  onPointerUp(event: ReactPointerEvent): void;
  onPointerCancel(event: ReactPointerEvent): void;
}

/**
 * @param at what lies under a place of the window
 * @param onHold told when the hand is taken and let go
 */
export function useDrag(at: (clientX: number) => void, onHold: (held: boolean) => void): Drag {
  const held = useRef(false);
  const frame = useRef(0);
  const newest = useRef(0);
  useEffect(() => () => cancelAnimationFrame(frame.current), []);
  const move = (clientX: number) => {
    newest.current = clientX;
    if (frame.current !== 0) return;
    frame.current = requestAnimationFrame(() => {
      frame.current = 0;
      at(newest.current);
    });
  };
  const letGo = () => {
    if (!held.current) return;
    held.current = false;
    onHold(false);
  };
  return {
    onPointerDown(event) {
      if (event.button !== 0) return;
      held.current = true;
      event.currentTarget.setPointerCapture(event.pointerId);
      onHold(true);
    },
    onPointerMove(event) {
      if (held.current) move(event.clientX);
    },
    onPointerUp: letGo,
    onPointerCancel: letGo,
  };
}
