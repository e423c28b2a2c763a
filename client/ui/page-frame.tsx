import type { ReactNode } from "react";
import { classes } from "./classes.ts";
import { SessionBanner } from "./session-banner.tsx";
import { SiteHeader } from "./site-header.tsx";

interface Props {
  /** Of the document, before "· Subleading". */
  readonly title: string;
  readonly children: ReactNode;
  /** Stands in the header beside the name of the site. */
  readonly heading?: ReactNode;
  /** Stands in the header before the person and the theme. */
  readonly instruments?: ReactNode;
  /** A line's measure, a table's width, or all of the window with the page setting its own margins. */
  readonly width?: "measure" | "page" | "window";
}

const widths = {
  measure: "mx-auto max-w-[46rem] px-4 pt-10 pb-24 sm:px-8",
  page: "mx-auto max-w-(--page) px-4 pt-10 pb-24 sm:px-8",
  window: "",
} as const;

/** What every page has: the way past the header, the header, what to know about the session, the page itself. */
export function PageFrame({ title, children, heading, instruments, width = "page" }: Props) {
  return (
    <>
      <title>{title === "" ? "Subleading" : `${title} · Subleading`}</title>
      <a
        href="#main"
        className="absolute left-4 top-2 z-50 -translate-y-16 border border-ink bg-field px-3 py-2 text-body focus:translate-y-0"
      >
        Skip to the page
      </a>
      <SiteHeader heading={heading} instruments={instruments} />
      <SessionBanner />
      <main id="main" tabIndex={-1} className={classes("outline-none", widths[width])}>
        {children}
      </main>
    </>
  );
}
