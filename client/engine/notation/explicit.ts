/**
 * Typed notation made explicit: one line of ASCII in which every operator is written, and every operand is a
 * placeholder of our own. What the placeholders and the operators stand for is kept beside the text.
 *
 *   x3      thing 3, a literal or a name
 *   f4(…)   thing 4, something wrapped around its arguments: brackets, accents, functions, marks
 *   o       where a sum with a sign in front starts: "-a b" is o-x0*x1, so no sign stands before an operand
 *   (…)     grouping that was meant and not typed: the unit of a number, a sign in an exponent
 */
import type { Bracket, Tree } from "./tree.ts";
import type { Accent } from "./tokens.ts";

export const origin = "o";
export const leafName = (thing: number): string => `x${thing}`;
export const callName = (thing: number): string => `f${thing}`;

/** How an operand is joined to what stands on its left; `at` is the offset of the sign. */
export type Join = { readonly at: number } & (
  | { readonly kind: "term"; readonly sign: "+" | "-" | "±" }
  | { readonly kind: "factor"; readonly join: "juxtaposed" | "*" | "/" | "." }
);

/** Only how it groups: "±" groups as "+", and all that multiplies as "*". */
export function operatorOf(join: Join): "+" | "-" | "*" | "/" {
  if (join.kind === "term") return join.sign === "-" ? "-" : "+";
  return join.join === "/" ? "/" : "*";
}

/** Wraps of one operand go from the inside out; `more` says how many further arguments of the call each one takes. */
export type Wrap = { readonly more: number } & (
  | { readonly type: "group"; readonly bracket: Bracket; readonly at: number }
  | { readonly type: "modulus" | "quotient"; readonly at: number }
  | { readonly type: "accent"; readonly accent: Accent; readonly at: number }
  | { readonly type: "call"; readonly callee: "sqrt" | "max" | "min"; readonly at: number }
  | { readonly type: "conjugate" | "factorial" | "power" }
);

export type Leaf = Tree & { readonly type: "number" | "measured" | "name" };

export type Thing =
  | { readonly type: "leaf"; readonly tree: Leaf }
  | { readonly type: "wrapped"; readonly wraps: readonly Wrap[] };

export interface Explicit {
  readonly text: string;
  readonly things: readonly Thing[];
  /** By the thing that comes first after the operator. */
  readonly joins: ReadonlyMap<number, Join>;
}
