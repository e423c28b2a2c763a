import type { ReactNode } from "react";

/** Room for something wider than a narrow page: scrolled by touch, wheel, and by arrow keys once it has the focus. */
export function ScrollBox({ what, children }: { readonly what: string; readonly children: ReactNode }) {
  return (
    // A region that scrolls must be reachable by keyboard (WCAG 2.1.1), though nothing in it is pressed.
    // eslint-disable-next-line jsx-a11y-x/no-noninteractive-tabindex
    <div className="block-scroll" role="group" aria-label={what} tabIndex={0}>
      {children}
    </div>
  );
}
