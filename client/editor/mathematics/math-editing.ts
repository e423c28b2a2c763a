/** Which formula is open for editing: one at a time per editor. */

/** The node view of a formula: it lives as long as its node, wherever colleagues' edits move it. */
export interface OpenFormula {
  readonly element: HTMLElement;
  readonly display: boolean;
  /** Typed just now: leaving it empty or with Escape removes it again. */
  readonly isNew: boolean;
  /** Null once the node is gone. */
  position(): number | null;
  latex(): string;
  label(): string;
}

export interface MathEditing {
  current(): OpenFormula | null;
  open(formula: OpenFormula): void;
  close(): void;
  subscribe(listener: () => void): () => void;
}

export function createMathEditing(): MathEditing {
  let open: OpenFormula | null = null;
  const listeners = new Set<() => void>();
  const tell = () => {
    for (const listener of listeners) listener();
  };
  return {
    current: () => open,
    open(formula) {
      open = formula;
      tell();
    },
    close() {
      if (open === null) return;
      open = null;
      tell();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
