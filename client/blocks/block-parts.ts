/** What one block kind gives the page. One folder per kind makes it; `registry.tsx` lists them. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { ComponentType } from "react";
import type { BlockHandle } from "./block-handle.ts";

/** `stale`: the value is the last good one, since the inputs are in error now. */
export interface ResultProps<Value> {
  readonly value: Value;
  readonly stale: boolean;
}

export interface BlockParts {
  /** The single field that names the block, shown in italics after its kind. */
  readonly titleField: string;
  /** What the title is a name of, for the empty field: "name of the theory". */
  readonly titleHint: string;
  readonly Form: ComponentType;
  readonly Result?: ComponentType<ResultProps<unknown>>;
  /** Loaded when the first one is drawn, with the axes it needs. */
  readonly Plot?: ComponentType<ResultProps<unknown>>;
  /** A few words after the title: "d = 4 · 2 fields · 11 terms". */
  readonly summary?: (block: BlockHandle) => string;
}

/** The registry holds kinds of different values side by side; each drawer is only ever given its own kind's value. */
export function forKind<Value>(
  drawer: ComponentType<ResultProps<Value>>,
): ComponentType<ResultProps<unknown>> {
  return drawer as ComponentType<ResultProps<unknown>>; // paired with its kind in registry.tsx
}

/** The value to draw: of the inputs as they are, or the last good one. */
export function shownEvaluation(block: BlockHandle): {
  readonly evaluation: Evaluation | null;
  readonly stale: boolean;
} {
  if (block.evaluation?.value != null) return { evaluation: block.evaluation, stale: false };
  return { evaluation: block.lastGood, stale: block.lastGood !== null };
}
