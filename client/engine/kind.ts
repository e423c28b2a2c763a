/** What one block kind gives the rest of the house. One folder per kind implements it; `kinds.ts` lists them. */
import type { Evaluation, Scalar } from "./evaluation.ts";
import type { Theory } from "./premises/theory.ts";
import type { InputsOf, Shape } from "./shape.ts";

export const kindNames = [
  "premises",
  "scaling",
  "countingRules",
  "divergence",
  "closure",
  "orderPlan",
  "truncationError",
  "basisCount",
  "data",
  "errorBudget",
  "running",
] as const;
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
  /**
   * Whether it may take seconds, always or with some inputs: it is then computed apart from the others, with progress
   * and a way to stop it.
   */
  readonly long?: true | ((inputs: Readonly<Record<string, unknown>>) => boolean);
}

/** The result of a block that a reference field names. */
export interface Source {
  readonly kind: KindName;
  /** Of the type that its kind gives; never null. */
  readonly value: unknown;
  readonly scalars: readonly Scalar[];
  /** Title of the block, for the working; "" when it has none. */
  readonly title: string;
}

/** How far long work is: "dimension 12, 340 of 812 classes" is { done: 340, of: 812, part: "dimension 12" }. */
export interface Progress {
  readonly done: number;
  /** Null when nobody can tell yet. */
  readonly of: number | null;
  /** A phrase for people, without numbers that `done` and `of` already say. */
  readonly part: string;
}

/** What a kind may use beside its own inputs and the theory. */
export interface EvaluationContext {
  /**
   * The result of the block with this id. Null when there is none to use: why is said already, as a problem beside the
   * reference field, so a kind computes what it can without it and adds no problem of its own.
   */
  source(blockId: string): Source | null;
  /** Long kinds say how far they are, as often as they like; whoever listens thins it out. */
  tell(progress: Progress): void;
}

/** For kinds evaluated on their own: no other block, nobody who listens. */
export const aloneContext: EvaluationContext = { source: () => null, tell: () => undefined };

export interface BlockKind<S extends Shape = Shape, Value = unknown> extends BlockDescription<S> {
  /** Pure and total: bad inputs give problems, never a throw. `theory` is null without premises. */
  evaluate(inputs: InputsOf<S>, theory: Theory | null, context: EvaluationContext): Evaluation<Value>;
}
