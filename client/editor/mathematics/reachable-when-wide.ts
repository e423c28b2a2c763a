/** An equation wider than the page scrolls by itself; the keyboard must then reach it (WCAG 2.1.1). */

function setReachable(element: HTMLElement): void {
  if (element.scrollWidth > element.clientWidth) element.tabIndex = 0;
  else element.removeAttribute("tabindex");
}

// Of the module: a long paper has hundreds of equations, and one observer serves them all.
const widths = new ResizeObserver((entries) => {
  for (const { target } of entries) if (target instanceof HTMLElement) setReachable(target);
});

/** Gives back what ends it. */
export function reachableWhenWide(element: HTMLElement): () => void {
  widths.observe(element);
  return () => widths.unobserve(element);
}

/** Keys that scroll a focused equation, and are not the editor's then. */
export function scrollsWideEquation(event: Event, element: HTMLElement): boolean {
  return (
    event instanceof KeyboardEvent &&
    event.target === element &&
    (event.key === "ArrowLeft" || event.key === "ArrowRight")
  );
}
