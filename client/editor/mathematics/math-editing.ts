/** Which formula is open for editing: one at a time per editor. */

/** A formula as its node view knows it. */
export interface DrawnFormula {
  readonly element: HTMLElement;
  readonly display: boolean;
  /** Null once the node is gone. */
  position(): number | null;
  latex(): string;
  label(): string;
}

export interface Opening {
  /** Differs between openings; the draft belongs to one opening. */
  readonly count: number;
  readonly formula: DrawnFormula;
  /** Typed just now: leaving it empty or with Escape removes it again. */
  readonly isNew: boolean;
}

export interface MathEditing {
  current(): Opening | null;
  open(formula: DrawnFormula, isNew: boolean): void;
  close(): void;
  subscribe(listener: () => void): () => void;
  /** Node views come and go: each says so. */
  appeared(formula: DrawnFormula): void;
  vanished(formula: DrawnFormula): void;
}

export function createMathEditing(): MathEditing {
  let opening: Opening | null = null;
  let count = 0;
  const drawn = new Set<DrawnFormula>();
  const listeners = new Set<() => void>();
  const become = (next: Opening | null) => {
    opening = next;
    for (const listener of listeners) listener();
  };
  return {
    current: () => opening,
    open(formula, isNew) {
      count += 1;
      become({ count, formula, isNew });
    },
    close() {
      if (opening !== null) become(null);
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    appeared(formula) {
      drawn.add(formula);
    },
    vanished(formula) {
      drawn.delete(formula);
      if (opening?.formula !== formula) return;
      // A colleague who makes a heading of the paragraph has every formula in it drawn anew: go on with the new one.
      queueMicrotask(() => {
        if (opening?.formula !== formula) return;
        const twins = [...drawn].filter(
          (other) => other.display === formula.display && other.latex() === formula.latex(),
        );
        const [twin] = twins;
        if (twin && twins.length === 1) become({ ...opening, formula: twin });
      });
    },
  };
}
