/**
 * D_0 is a derivative in `(D_0 phi)^2` and a coupling in `D_0 (psi^\dagger psi)^3`, as three-body forces are written.
 */
import { canonicalName, type Name } from "./names.ts";
import type { Tree } from "./tree.ts";
import { meaningOf, type Vocabulary } from "./vocabulary.ts";

/** Every name in a tree, with the innermost brackets or bars around it. */
function namesIn(tree: Tree, inside: Tree | null): { readonly name: Name; readonly inside: Tree | null }[] {
  switch (tree.type) {
    case "name":
      return [{ name: tree.name, inside }];
    case "group":
    case "modulus":
      return namesIn(tree.body, tree);
    case "accent":
    case "conjugate":
    case "factorial":
      return namesIn(tree.body, inside);
    case "power":
      return namesIn(tree.base, inside);
    case "quotient":
      return [...namesIn(tree.over, inside), ...namesIn(tree.under, inside)];
    case "product":
      return tree.factors.flatMap(({ node }) => namesIn(node, inside));
    case "sum":
      return tree.parts.flatMap(({ node }) => namesIn(node, inside));
    case "call":
      return tree.parts.flatMap((part) => namesIn(part, inside));
    case "number":
    case "measured":
      return [];
  }
}

/**
 * The symbols d_n and D_n, n a digit, that a term has once and outside the brackets of any field. Before the first field
 * such a one is read as a coupling: as a derivative it would make the whole term a total one, which counts for nothing.
 */
export function couplingsLikeDerivatives(tree: Tree, vocabulary: Vocabulary): ReadonlySet<string> {
  const names = namesIn(tree, null);
  const isField = (name: Name) => meaningOf(name, [], vocabulary).means === "field";
  const alone = names.filter(({ name, inside }) => {
    const isNumbered =
      /^[dD]$/.test(name.base) && name.subscript.length === 1 && /^\d$/.test(name.subscript[0] ?? "");
    if (!isNumbered || names.filter((other) => other.name.base === name.base).length > 1) return false;
    return inside === null || !namesIn(inside, null).some((other) => isField(other.name));
  });
  return new Set(alone.map(({ name }) => canonicalName(name)));
}
