/** KaTeX, fetched once when the first formula is to be drawn. */
import type katexModule from "katex";
import type { ParseError } from "katex";

export interface Katex {
  /** Draws into the element and returns null, or leaves it alone and says what is wrong. */
  draw(latex: string, element: HTMLElement, display: boolean): LatexFault | null;
}

export interface LatexFault {
  /** KaTeX's own sentence, without its context; see latex-fault-words.ts. */
  readonly message: string;
  /** Character offset into the source, or null. */
  readonly position: number | null;
}

let loading: Promise<Katex> | null = null;
let loaded: Katex | null = null;

export function loadKatex(): Promise<Katex> {
  loading ??= Promise.all([import("katex"), import("katex/dist/katex.min.css")]).then(
    ([{ default: katex }]) => {
      loaded = { draw: (latex, element, display) => drawWith(katex, latex, element, display) };
      return loaded;
    },
    (error: unknown) => {
      // A page that was offline may ask again.
      loading = null;
      throw error;
    },
  );
  return loading;
}

/** KaTeX if it has already arrived. */
export function katexNow(): Katex | null {
  return loaded;
}

/** Formulas come from colleagues too: one of a megabyte would hold every reader's page for minutes. */
export const LONGEST_FORMULA = 12_000;

function drawWith(
  katex: typeof katexModule,
  latex: string,
  element: HTMLElement,
  display: boolean,
): LatexFault | null {
  if (latex.length > LONGEST_FORMULA) return { message: "Too long", position: LONGEST_FORMULA };
  try {
    // Drawn as nodes, not as a string: a strict Content-Security-Policy refuses style attributes in markup.
    katex.render(latex, element, {
      displayMode: display,
      throwOnError: true,
      strict: "ignore",
      // No links, images or raw HTML from a formula, and bounds on what one may cost.
      trust: false,
      maxSize: 40,
      maxExpand: 500,
      // A formula's own \gdef must not reach the next one.
      macros: {},
    });
    return null;
  } catch (error) {
    // KaTeX reads and builds by recursion, and gives up in no other way. Thrown on, it would take the page along.
    if (error instanceof RangeError) return { message: "Too deep", position: null };
    if (!(error instanceof katex.ParseError)) throw error;
    return faultOf(error);
  }
}

function faultOf({ rawMessage, position }: ParseError): LatexFault {
  // Typed as a number, yet undefined when the fault has no place.
  const place: unknown = position;
  return { message: rawMessage, position: typeof place === "number" ? place : null };
}
