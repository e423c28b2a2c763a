/** Mathematics in the page: drawn by KaTeX when it has arrived, shown as its source until then. */
import { Fragment, useLayoutEffect, useRef } from "react";
import { katexNow, loadKatex, type LatexFault } from "./katex-loader.ts";
import { latexFaultWords } from "./latex-fault-words.ts";
import "./math.css";

export interface FormulaProps {
  readonly latex: string;
  /** On a line of its own, in the large style. */
  readonly display?: boolean;
  /** Told what is wrong, or null; without it a formula in error shows its source, marked. */
  readonly onFault?: (fault: LatexFault | null) => void;
}

export function Formula({ latex, display = false, onFault }: FormulaProps) {
  const element = useRef<HTMLSpanElement>(null);
  const tell = useRef(onFault);
  useLayoutEffect(() => {
    tell.current = onFault;
  });
  useLayoutEffect(() => {
    const target = element.current;
    if (!target) return;
    let wanted = true;
    drawMath(target, latex, display, (fault) => {
      if (wanted) tell.current?.(fault);
    });
    return () => {
      wanted = false;
    };
  }, [latex, display]);
  return <span ref={element} className={display ? "math math-display" : "math"} />;
}

/**
 * Draws into an element, also outside React. While KaTeX is on its way, or when the formula is wrong, the element
 * holds the source; a fault is marked with the class `math-fault` and explained in its title.
 */
export function drawMath(
  element: HTMLElement,
  latex: string,
  display: boolean,
  onDrawn?: (fault: LatexFault | null) => void,
): void {
  element.dataset["latex"] = latex;
  const draw = (katex: NonNullable<ReturnType<typeof katexNow>>) => {
    // A newer formula may have taken this element meanwhile.
    if (element.dataset["latex"] !== latex) return;
    const fault = katex.draw(latex, element, display);
    element.classList.toggle("math-fault", fault !== null);
    if (fault) {
      element.textContent = latex;
      const { sentence, place } = latexFaultWords(fault, latex);
      element.title = [sentence, place].filter(Boolean).join(" ");
    } else {
      element.removeAttribute("title");
    }
    onDrawn?.(fault);
  };
  const katex = katexNow();
  if (katex) {
    draw(katex);
    return;
  }
  element.textContent = latex;
  loadKatex().then(draw, () => {
    // Offline before KaTeX was ever fetched: the source stays, which is readable.
    element.title = "The formula is shown as typed: what draws it could not be fetched.";
  });
}

/** A phrase that may hold `$…$`, as labels and working do. `\$` is a dollar sign. */
export function TextWithMath({ text }: { readonly text: string }) {
  return splitMath(text).map((part, index) => (
    // The parts of a phrase have no identity but their place.
    <Fragment key={index}>{part.math ? <Formula latex={part.text} /> : part.text}</Fragment>
  ));
}

export interface PhrasePart {
  readonly math: boolean;
  readonly text: string;
}

export function splitMath(text: string): readonly PhrasePart[] {
  const parts: PhrasePart[] = [];
  let rest = 0;
  for (const found of text.matchAll(/(?<!\\)\$((?:[^$\\]|\\.)+)\$/g)) {
    if (found.index > rest) parts.push({ math: false, text: plain(text.slice(rest, found.index)) });
    parts.push({ math: true, text: found[1] ?? "" });
    rest = found.index + found[0].length;
  }
  if (rest < text.length) parts.push({ math: false, text: plain(text.slice(rest)) });
  return parts;
}

function plain(text: string): string {
  return text.replaceAll("\\$", "$");
}
