/** The nodes of mathjs to our own tree: placeholders become what was typed, operators get back their sign and place. */
import { origin, type Explicit, type Join, type Thing, type Wrap } from "./explicit.ts";
import type { ParsedNode } from "./mathjs-parser.ts";
import type { Factor, Term, Tree } from "./tree.ts";

/** Throws when a node is none of the few that explicit notation leads to: a mistake of ours. */
export function growTree(node: ParsedNode, explicit: Explicit): Tree {
  return new Grower(explicit).tree(node);
}

type OperatorNode = ParsedNode & { readonly type: "OperatorNode" };

class Grower {
  constructor(private readonly explicit: Explicit) {}

  tree(node: ParsedNode): Tree {
    switch (node.type) {
      case "ParenthesisNode":
        return this.tree(node.content);
      case "SymbolNode":
        return this.leaf(node.name);
      case "FunctionNode":
        return this.wrapped(node.fn.name, node.args);
      case "OperatorNode":
        return this.operation(node);
      default:
        return unexpected(node satisfies never);
    }
  }

  private operation(node: OperatorNode): Tree {
    const [left, right] = node.args;
    if (node.op === "!" && left && !right) return raise("factorial", this.tree(left), []);
    if (node.op === "^" && left && right) return raise("power", this.tree(left), [this.tree(right)]);
    if (isChain(node, "+", "-")) return this.sum(node);
    if (isChain(node, "*", "/")) return this.product(node);
    return unexpected(node);
  }

  private sum(node: ParsedNode): Tree {
    const { first, rest } = unchain(node, "+", "-");
    const signed = rest.map((operand): Term => {
      const join = this.joinOf(operand);
      return join.kind === "term"
        ? { sign: join.sign, at: join.at, node: this.tree(operand) }
        : unexpected(operand);
    });
    if (first.type === "SymbolNode" && first.name === origin) return sumOf(signed);
    const opening = this.tree(first);
    return sumOf([{ sign: "+", at: opening.at, node: opening }, ...signed]);
  }

  private product(node: ParsedNode): Tree {
    const { first, rest } = unchain(node, "*", "/");
    const opening = this.tree(first);
    const joined = rest.map((operand): Factor => {
      const join = this.joinOf(operand);
      return join.kind === "factor" ? { join: join.join, node: this.tree(operand) } : unexpected(operand);
    });
    return { type: "product", factors: [{ join: "juxtaposed", node: opening }, ...joined], at: opening.at };
  }

  private leaf(name: string): Tree {
    const thing = this.thing(name);
    return thing.type === "leaf" ? thing.tree : unexpected(thing);
  }

  private wrapped(name: string, args: readonly ParsedNode[]): Tree {
    const thing = this.thing(name);
    if (thing.type !== "wrapped") return unexpected(thing);
    const [first, ...others] = args.map((argument) => this.tree(argument));
    if (!first) return unexpected(args);
    let taken = 0;
    return thing.wraps.reduce((inner, wrap) => {
      const more = others.slice(taken, taken + wrap.more);
      taken += wrap.more;
      return wrapIn(wrap, inner, more);
    }, first);
  }

  private thing(name: string): Thing {
    return this.explicit.things[numberOf(name)] ?? unexpected(name);
  }

  private joinOf(operand: ParsedNode): Join {
    return this.explicit.joins.get(numberOf(firstName(operand))) ?? unexpected(operand);
  }
}

function sumOf(parts: readonly Term[]): Tree {
  const [first] = parts;
  return first ? { type: "sum", parts, at: first.at } : unexpected(parts);
}

function raise(type: "conjugate" | "factorial" | "power", inner: Tree, [exponent]: readonly Tree[]): Tree {
  if (type !== "power") return { type, body: inner, at: inner.at };
  return exponent ? { type, base: inner, exponent, at: inner.at } : unexpected(inner);
}

function wrapIn(wrap: Wrap, inner: Tree, more: readonly Tree[]): Tree {
  const [second] = more;
  switch (wrap.type) {
    case "group":
      return { type: "group", bracket: wrap.bracket, body: inner, at: wrap.at };
    case "modulus":
      return { type: "modulus", body: inner, at: wrap.at };
    case "accent":
      return { type: "accent", accent: wrap.accent, body: inner, at: wrap.at };
    case "call":
      return { type: "call", callee: wrap.callee, parts: [inner, ...more], at: wrap.at };
    case "quotient":
      return second ? { type: "quotient", over: inner, under: second, at: wrap.at } : unexpected(wrap);
    case "conjugate":
    case "factorial":
    case "power":
      return raise(wrap.type, inner, more);
  }
}

function isChain(node: ParsedNode, ...operators: readonly string[]): node is OperatorNode {
  return node.type === "OperatorNode" && node.args.length === 2 && operators.includes(node.op);
}

/** a*b/c is ((a*b)/c): the operands of a chain that groups from the left. A loop, for it may be a thousand long. */
function unchain(node: ParsedNode, ...operators: readonly string[]) {
  const rest: ParsedNode[] = [];
  let first = node;
  while (isChain(first, ...operators)) {
    const [left, right] = first.args;
    if (!left || !right) return unexpected(first);
    rest.push(right);
    first = left;
  }
  return { first, rest: rest.reverse() };
}

function firstName(node: ParsedNode): string {
  let first = node;
  for (;;) {
    if (first.type === "SymbolNode") return first.name;
    if (first.type === "FunctionNode") return first.fn.name;
    first = first.type === "ParenthesisNode" ? first.content : (first.args[0] ?? unexpected(first));
  }
}

function numberOf(name: string): number {
  return Number(name.slice(1));
}

function unexpected(what: unknown): never {
  throw new Error(`The grouped notation has an unexpected part: ${JSON.stringify(what).slice(0, 200)}`);
}
