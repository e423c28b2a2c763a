/** Hands out the placeholders of one explicit text and keeps what they stand for. */
import {
  callName,
  leafName,
  type Explicit,
  type Join,
  type Leaf,
  type Thing,
  type Wrap,
} from "./explicit.ts";
import type { Atom, Mark, Written } from "./operand.ts";

export class Placeholders {
  private readonly things: Thing[] = [];
  private readonly joins = new Map<number, Join>();

  explicit(text: string): Explicit {
    return { text, things: this.things, joins: this.joins };
  }

  leaf(tree: Leaf): Atom {
    const first = this.things.push({ type: "leaf", tree }) - 1;
    const isName = tree.type === "name";
    const name = isName && tree.name.subscript.length === 0 ? first : null;
    return { type: tree.type, isIndices: isName, name, first, args: [leafName(first)], wraps: [] };
  }

  /** Puts a subscript on a name that has none. */
  subscribe(thing: number, pieces: readonly string[]): void {
    const named = this.things[thing];
    if (named?.type !== "leaf" || named.tree.type !== "name") throw new Error("Only names have subscripts.");
    const name = { ...named.tree.name, subscript: pieces };
    this.things[thing] = { type: "leaf", tree: { ...named.tree, name } };
  }

  /** A whole number from 0, which may have a factorial. */
  isCount(atom: Atom): boolean {
    const thing = this.things[atom.first];
    if (atom.type !== "number" || thing?.type !== "leaf" || thing.tree.type !== "number") return false;
    return thing.tree.value.isInteger() && thing.tree.value.sign() >= 0;
  }

  /** Notes how the operand is joined to what stands on its left. */
  join(operand: Written, join: Join): void {
    this.joins.set(operand.first, join);
  }

  /**
   * An operand's text. What mathjs and people group alike stays an operator: a last power, and a factorial before it.
   * Marks further in are wraps, since phi^mu^2 raises from the left.
   */
  write(atom: Atom, marks: readonly Mark[] = []): Written {
    const power = marks.at(-1)?.type === "power" ? marks.at(-1) : undefined;
    const below = power ? marks.slice(0, -1) : marks;
    const factorial = below.at(-1)?.type === "factorial";
    const inner = factorial ? below.slice(0, -1) : below;
    const { text, first } = this.wrapped(atom, inner);
    const end = (factorial ? "!" : "") + (power ? `^${power.exponent ?? ""}` : "");
    const { type, isIndices, name } = atom;
    return { type, isIndices, name, first, text: text + end };
  }

  private wrapped(atom: Atom, marks: readonly Mark[]): { readonly text: string; readonly first: number } {
    const raised = marks.flatMap(({ exponent }) => exponent ?? []);
    const wraps = [
      ...atom.wraps,
      ...marks.map(({ type, exponent }): Wrap => ({ type, more: exponent === undefined ? 0 : 1 })),
    ];
    if (wraps.length === 0) return { text: atom.args.join(), first: atom.first };
    const first = this.things.push({ type: "wrapped", wraps }) - 1;
    return { text: `${callName(first)}(${[...atom.args, ...raised].join()})`, first };
  }
}
