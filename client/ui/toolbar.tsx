/** A bar of buttons that is one stop of the Tab key; the arrow keys move within it. */
import { useLayoutEffect, useRef, type FocusEvent, type KeyboardEvent, type ReactNode } from "react";

interface Props {
  readonly label: string;
  readonly className?: string;
  readonly children: ReactNode;
}

export function Toolbar({ label, className, children }: Props) {
  const bar = useRef<HTMLDivElement>(null);
  // Buttons come and go, and are disabled: after each drawing exactly one of those that can be pressed is the stop.
  useLayoutEffect(() => {
    const buttons = buttonsOf(bar.current);
    makeStop(
      buttons,
      buttons.find(({ tabIndex, dataset }) => tabIndex === 0 && "stop" in dataset) ?? buttons[0],
    );
  });
  function onKeyDown(event: KeyboardEvent) {
    const buttons = buttonsOf(bar.current);
    const at = buttons.findIndex((button) => button === event.target);
    const next = at === -1 ? undefined : buttons[goal(event.key, at, buttons.length)];
    if (!next) return;
    event.preventDefault();
    next.focus();
  }
  function onFocus({ target }: FocusEvent) {
    const buttons = buttonsOf(bar.current);
    if (buttons.some((button) => button === target)) makeStop(buttons, target);
  }
  return (
    <div
      ref={bar}
      role="toolbar"
      aria-label={label}
      aria-orientation="horizontal"
      className={className}
      onKeyDown={onKeyDown}
      onFocus={onFocus}
    >
      {children}
    </div>
  );
}

/** Choices (`select`) keep their arrow keys and stay stops of their own. */
function buttonsOf(bar: HTMLElement | null): HTMLButtonElement[] {
  return [...(bar?.querySelectorAll<HTMLButtonElement>("button:not(:disabled)") ?? [])];
}

function makeStop(buttons: readonly HTMLButtonElement[], stop: Element | undefined): void {
  for (const button of buttons) {
    button.tabIndex = button === stop ? 0 : -1;
    if (button === stop) button.dataset["stop"] = "";
    else delete button.dataset["stop"];
  }
}

function goal(key: string, at: number, count: number): number {
  switch (key) {
    case "ArrowRight":
      return (at + 1) % count;
    case "ArrowLeft":
      return (at - 1 + count) % count;
    case "Home":
      return 0;
    case "End":
      return count - 1;
    default:
      return -1;
  }
}
