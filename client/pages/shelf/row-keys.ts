import type { KeyboardEvent } from "react";

/** Up and Down go from title to title, Home and End to the first and last; Tab still visits everything. */
export function moveBetweenRows(event: KeyboardEvent<HTMLTableElement>): void {
  if (event.altKey || event.ctrlKey || event.metaKey || event.shiftKey) return;
  const links = [...event.currentTarget.querySelectorAll<HTMLAnchorElement>("th[role=rowheader] a")];
  const here = links.findIndex((link) => link === document.activeElement);
  if (here < 0) return;
  const next = { ArrowDown: here + 1, ArrowUp: here - 1, Home: 0, End: links.length - 1 }[event.key];
  if (next === undefined) return;
  const link = links[next];
  event.preventDefault();
  link?.focus();
}
