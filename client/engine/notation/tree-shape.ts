/** Questions about the shape of a tree, before anything is resolved. */
import type { Name } from "./names.ts";
import type { Factor, Tree } from "./tree.ts";

/** A bare number, without a unit. */
export function isLiteral({ node }: Factor): boolean {
  return node.type === "number" || node.type === "measured";
}

/** Names only, as in ^{\mu\nu} and ^a: marks where something points, no power. */
export function isIndices(tree: Tree): boolean {
  if (tree.type === "name") return true;
  if (tree.type === "group") return isIndices(tree.body);
  return (
    tree.type === "product" &&
    tree.factors.every((factor) => factor.join === "juxtaposed" && isIndices(factor.node))
  );
}

/** Puts a subscript on the name inside accents and indices; null when there is none, or it has one already. */
export function withSubscript(tree: Tree, pieces: readonly string[]): Tree | null {
  if (tree.type === "name") {
    return tree.name.subscript.length > 0 ? null : { ...tree, name: { ...tree.name, subscript: pieces } };
  }
  if (tree.type === "accent" || tree.type === "group" || tree.type === "conjugate") {
    const body = withSubscript(tree.body, pieces);
    return body && { ...tree, body };
  }
  if (tree.type === "power") {
    const base = withSubscript(tree.base, pieces);
    return base && { ...tree, base };
  }
  return null;
}

/** The name under groups, styles and accents; null when there is none or more than one. */
export function nameInside(tree: Tree): Name | null {
  if (tree.type === "name") return tree.name;
  if (tree.type === "group") return nameInside(tree.body);
  return tree.type === "accent" ? nameInside(tree.body) : null;
}
