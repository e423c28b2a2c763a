/** Reads the symbol of a declaration: one name, with subscript, primes, tilde or hat. */
import { failed, read, type Read } from "./failure.ts";
import { canonicalName, nameLatex, type Name } from "./names.ts";
import { parse } from "./parse.ts";
import type { Tree } from "./tree.ts";
import { unitNamed } from "./units.ts";
import { reservedSymbols } from "./vocabulary.ts";

export interface Symbol {
  readonly symbol: string;
  readonly latex: string;
}

/**
 * `alsoReserved` are names with a meaning in one theory only, such as z under anisotropic scaling.
 * Fails with those of `parse`, and `symbol-unreadable` or `symbol-reserved`; all with `text` or `symbol`.
 * @example readSymbol("\\Lambda_b") // symbol "Lambda_b", latex "\\Lambda_b"
 */
export function readSymbol(text: string, alsoReserved?: ReadonlyMap<string, unknown>): Read<Symbol> {
  const tree = parse(text, { quantities: false });
  if (!tree.ok) return tree;
  const name = declaredName(tree.value);
  if (!name) return failed("symbol-unreadable", { text, offset: 0 });
  const symbol = canonicalName(name);
  const taken =
    reservedSymbols.has(symbol) || unitNamed(symbol) !== null || alsoReserved?.has(symbol) === true;
  return taken ? failed("symbol-reserved", { symbol, offset: 0 }) : read({ symbol, latex: nameLatex(name) });
}

function declaredName(tree: Tree): Name | null {
  if (tree.type === "name") return tree.name;
  if (tree.type === "group") return declaredName(tree.body);
  if (tree.type !== "accent") return null;
  const name = declaredName(tree.body);
  if (tree.accent === "plain" || tree.accent === "space") return name;
  return name && (tree.accent === "tilde" || tree.accent === "hat")
    ? { ...name, base: name.base + tree.accent }
    : null;
}
