/** The tree of typed notation: syntax only, nothing resolved. `at` is the offset of a node's first character. */
import type { Rational } from "../exact/rational.ts";
import type { Name } from "./names.ts";
import type { Accent } from "./tokens.ts";

export interface Factor {
  /** How it is joined to what stands on its left: "/" divides, "." is a contraction, the rest multiply. */
  readonly join: "juxtaposed" | "*" | "/" | ".";
  readonly node: Tree;
}

/** One part of a sum; `at` is the offset of its sign, or of its first character where it has none. */
export interface Term {
  readonly sign: "+" | "-" | "±";
  readonly at: number;
  readonly node: Tree;
}

export type Bracket = "(" | "[" | "{" | "⟨";

export type Tree = { readonly at: number } & (
  | { readonly type: "number"; readonly value: Rational; readonly text: string }
  | { readonly type: "measured"; readonly value: Rational; readonly sigma: Rational; readonly text: string }
  | { readonly type: "name"; readonly name: Name }
  | { readonly type: "accent"; readonly accent: Accent; readonly body: Tree }
  | { readonly type: "product"; readonly factors: readonly Factor[] }
  | { readonly type: "quotient"; readonly over: Tree; readonly under: Tree }
  | { readonly type: "sum"; readonly parts: readonly Term[] }
  | { readonly type: "power"; readonly base: Tree; readonly exponent: Tree }
  | { readonly type: "conjugate"; readonly body: Tree }
  | { readonly type: "factorial"; readonly body: Tree }
  | { readonly type: "group"; readonly bracket: Bracket; readonly body: Tree }
  | { readonly type: "modulus"; readonly body: Tree }
  | { readonly type: "call"; readonly callee: "sqrt" | "max" | "min"; readonly parts: readonly Tree[] }
);
