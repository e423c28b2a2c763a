/** What is known of an operand while it is written down: enough to refuse what would mean nothing. */
import type { Wrap } from "./explicit.ts";
import type { Tree } from "./tree.ts";

interface Known {
  readonly type: Tree["type"];
  /** Names only, as in ^{\mu\nu} and ^a: marks where something points, no power. */
  readonly isIndices: boolean;
  /** The name a subscript behind the operand belongs to; null when there is none, more than one, or it has one. */
  readonly name: number | null;
  /** The thing that comes first in its text. */
  readonly first: number;
}

/** A piece of explicit text. */
export interface Written extends Known {
  readonly text: string;
}

/** An operand that may still get marks: its arguments, and the wraps around them from the inside out. */
export interface Atom extends Known {
  readonly args: readonly string[];
  readonly wraps: readonly Wrap[];
}

/** A mark behind an atom; a power has the text of its exponent. */
export interface Mark {
  readonly type: "conjugate" | "factorial" | "power";
  readonly exponent?: string;
}

/** Stands for what could not be read, once the failure is noted. */
export const unreadable: Written & Atom = {
  type: "number",
  isIndices: false,
  name: null,
  first: -1,
  text: "",
  args: [],
  wraps: [],
};

/** A bare number, without a unit. */
export function isLiteral({ type }: Known): boolean {
  return type === "number" || type === "measured";
}

/** What stands between brackets, as the arguments of wraps to come. */
export function asArguments(parts: readonly Written[]): Atom {
  const [only, ...others] = parts;
  if (!only) throw new Error("Nothing stands between these brackets.");
  return {
    ...(others.length === 0 ? only : { ...only, isIndices: false, name: null }),
    args: parts.map(({ text }) => text),
    wraps: [],
  };
}

/** A subscript reaches a name through brackets and accents; only brackets leave indices what they are. */
export function wrap(atom: Atom, outermost: Wrap): Atom {
  const { type } = outermost;
  const isOpen = type === "group" || type === "accent";
  return {
    ...atom,
    type,
    isIndices: type === "group" && atom.isIndices,
    name: isOpen ? atom.name : null,
    wraps: [...atom.wraps, outermost],
  };
}
