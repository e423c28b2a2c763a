import type { KeyboardEvent } from "react";

/** Up and Down go from title to title, Home and End to the first and last; Tab still visits everything. */
export function moveBetweenRows(event: KeyboardEvent<HTMLAnchorElement>): void {
  if (event.altKey || event.ctrlKey || event.metaKey || event.shiftKey) return;
  const table = event.currentTarget.closest("table");
  const links = [...(table?.querySelectorAll<HTMLAnchorElement>("th[scope=row] a") ?? [])];
  const here = links.indexOf(event.currentTarget);
  const next = { ArrowDown: here + 1, ArrowUp: here - 1, Home: 0, End: links.length - 1 }[event.key];
  if (next === undefined) return;
  const link = links[next];
  event.preventDefault();
  link?.focus();
}
