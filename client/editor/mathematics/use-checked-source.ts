/** The newest state of a source that could be drawn, and what is wrong with the state it is in. */
import { useEffect, useState } from "react";
import { loadKatex, type LatexFault } from "../../ui/katex-loader.ts";

export interface CheckedSource {
  /** Shown while what is typed is not whole: a drawing that stays is easier on the eye than one that comes and goes. */
  readonly good: string;
  readonly fault: LatexFault | null;
}

export function useCheckedSource(source: string, display: boolean): CheckedSource {
  const [checked, setChecked] = useState<CheckedSource>({ good: source, fault: null });
  useEffect(() => {
    let wanted = true;
    const check = (fault: LatexFault | null) => {
      if (wanted) setChecked((before) => ({ good: fault ? before.good : source, fault }));
    };
    if (source === "") {
      check(null);
      return;
    }
    loadKatex().then(
      (katex) => {
        check(katex.draw(source, document.createElement("div"), display));
      },
      // Offline before KaTeX was ever fetched: the source can be written all the same, only not drawn.
      () => {
        check(null);
      },
    );
    return () => {
      wanted = false;
    };
  }, [source, display]);
  return checked;
}
