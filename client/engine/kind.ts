/** What one block kind gives the rest of the house. One folder per kind implements it; `kinds.ts` lists them. */
import type { Evaluation } from "./evaluation.ts";
import type { Theory } from "./premises/theory.ts";
import type { InputsOf, Shape } from "./shape.ts";

export const kindNames = ["premises", "scaling", "divergence", "orderPlan", "truncationError"] as const;
export type KindName = (typeof kindNames)[number];

/** What a kind is and takes. Kept apart from its computation, so that a page can draw forms without the parser. */
export interface BlockDescription<S extends Shape = Shape> {
  readonly kind: KindName;
  /** The trade's name, as shown: "Order plan". */
  readonly title: string;
  /** One sentence for the index of what can be placed. */
  readonly purpose: string;
  readonly shape: S;
  /** Whether the block computes from premises: it must, it may, or it never does. */
  readonly premises: "required" | "optional" | "none";
}

export interface BlockKind<S extends Shape = Shape, Value = unknown> extends BlockDescription<S> {
  /** Pure and total: bad inputs give problems, never a throw. `theory` is null without premises. */
  evaluate(inputs: InputsOf<S>, theory: Theory | null): Evaluation<Value>;
}
