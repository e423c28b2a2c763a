import type { ReactNode } from "react";
import { useBlock } from "../block-handle.ts";

/** A number of the result. Where there is prose to pin into, it can be pinned: a click, or Enter on it. */
export function Figure({ scalar, children }: { readonly scalar: string; readonly children: ReactNode }) {
  const { evaluation, pin, readOnly } = useBlock();
  const known = evaluation?.scalars.find(({ id }) => id === scalar);
  if (!known || !pin || readOnly) return <span className="block-figure">{children}</span>;
  return (
    <button
      type="button"
      className="block-figure block-figure-pin"
      data-figure={scalar}
      title="pin this into the prose"
      onClick={() => pin(scalar)}
    >
      {children}
      <span className="sr-only">, pin this</span>
    </button>
  );
}
