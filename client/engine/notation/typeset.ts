/** LaTeX of a tree as it is understood: what a person sees beside what they typed. */
import { constantOf } from "./constant.ts";
import { isIndices } from "./tree-shape.ts";
import { nameLatex, subscriptLatex, type Name } from "./names.ts";
import type { Accent } from "./tokens.ts";
import type { Factor, Tree } from "./tree.ts";
import { meaningOf, type Vocabulary } from "./vocabulary.ts";

const nothingDeclared: Vocabulary = { geometry: "isotropic", fields: new Map(), scales: new Set() };
const operatorLatex: Readonly<Record<string, string>> = {
  partial: "\\partial",
  d: "\\partial",
  nabla: "\\nabla",
  grad: "\\nabla",
  del: "\\nabla",
  D: "D",
  Box: "\\Box",
  box: "\\Box",
  dslash: "\\not{\\partial}",
  partialslash: "\\not{\\partial}",
  Dslash: "\\not{D}",
};
const accentLatex: Readonly<Record<Exclude<Accent, "plain">, string>> = {
  bar: "\\bar",
  tilde: "\\tilde",
  hat: "\\hat",
  dot: "\\dot",
  ddot: "\\ddot",
  slash: "\\not",
  space: "\\mathbf",
};

/** Typesets a term with its theory's vocabulary, or an expression in scales without one. */
export function typeset(tree: Tree, vocabulary: Vocabulary = nothingDeclared): string {
  switch (tree.type) {
    case "number":
      return literalLatex(tree.text);
    case "measured":
      return literalLatex(tree.text);
    case "name":
      return nameIn(tree.name, vocabulary);
    case "accent":
      return accented(tree.accent, tree.body, vocabulary);
    case "group":
      return tree.bracket === "{"
        ? typeset(tree.body, vocabulary)
        : bracketed(tree.bracket, typeset(tree.body, vocabulary));
    case "modulus":
      return `\\lvert ${typeset(tree.body, vocabulary)}\\rvert`;
    case "factorial":
      return `${typeset(tree.body, vocabulary)}!`;
    case "conjugate":
      return `${asBase(tree.body, vocabulary)}^\\dagger`;
    case "power":
      return `${asBase(tree.base, vocabulary)}^{${isIndices(tree.exponent) ? indices(tree.exponent) : inner(tree.exponent, vocabulary)}}`;
    case "quotient":
      return `\\frac{${inner(tree.over, vocabulary)}}{${inner(tree.under, vocabulary)}}`;
    case "call":
      return tree.callee === "sqrt"
        ? `\\sqrt{${tree.parts.map((part) => inner(part, vocabulary)).join(", ")}}`
        : `\\${tree.callee}(${tree.parts.map((part) => typeset(part, vocabulary)).join(", ")})`;
    case "sum":
      return tree.parts
        .map((part, index) => {
          const sign =
            part.sign === "±" ? "\\pm " : index === 0 ? (part.sign === "-" ? "-" : "") : ` ${part.sign} `;
          return sign + typeset(part.node, vocabulary);
        })
        .join("");
    case "product":
      return product(tree.factors, vocabulary);
  }
}

/** A division takes everything on its left into its numerator: that is how terms are read. */
function product(factors: readonly Factor[], vocabulary: Vocabulary): string {
  let text = "";
  let pieces = 0;
  let endsInNumber = false;
  let endsInDerivative = false;
  for (const { join, node } of factors) {
    const number = constantOf(node) !== null;
    if (join === "/") {
      const over = pieces === 1 && factors[0] ? inner(factors[0].node, vocabulary) : text;
      text = `\\frac{${over}}{${inner(node, vocabulary)}}`;
      endsInNumber = endsInDerivative = false;
    } else {
      const between =
        text === ""
          ? ""
          : join === "." || (endsInNumber && number)
            ? " \\cdot "
            : endsInDerivative
              ? " "
              : "\\,";
      text +=
        between +
        (node.type === "sum" ? bracketed("(", typeset(node, vocabulary)) : typeset(node, vocabulary));
      endsInNumber = number;
      endsInDerivative = isDerivative(node, vocabulary);
    }
    pieces += 1;
  }
  return text;
}

/** The accent goes on the letter, the subscript outside: \bar{h}_v. */
function accented(accent: Accent, body: Tree, vocabulary: Vocabulary): string {
  if (body.type === "group" && body.bracket === "{") return accented(accent, body.body, vocabulary);
  if (accent === "plain") return inner(body, vocabulary);
  const sign = accentLatex[accent];
  if (body.type !== "name") return `${sign}{${inner(body, vocabulary)}}`;
  const bare = { ...body.name, subscript: [], primes: 0 };
  return `${sign}{${nameIn(bare, vocabulary)}}${subscriptLatex(body.name.subscript)}${"'".repeat(body.name.primes)}`;
}
function indices(tree: Tree): string {
  if (tree.type === "name") return nameLatex(tree.name);
  if (tree.type === "group") return indices(tree.body);
  return tree.type === "product" ? tree.factors.map((factor) => indices(factor.node)).join(" ") : "";
}

function isDerivative(tree: Tree, vocabulary: Vocabulary): boolean {
  if (tree.type === "name") return meaningOf(tree.name, [], vocabulary).means === "derivative";
  return tree.type === "accent"
    ? isDerivative(tree.body, vocabulary)
    : tree.type === "power" && isDerivative(tree.base, vocabulary);
}

function bracketed(bracket: "(" | "[" | "{" | "⟨", body: string): string {
  if (bracket === "⟨") return `\\langle ${body}\\rangle`;
  return bracket === "[" ? `[${body}]` : `(${body})`;
}
/** Without the brackets that a fraction bar or an exponent makes needless. */
function inner(tree: Tree, vocabulary: Vocabulary): string {
  return tree.type === "group" ? inner(tree.body, vocabulary) : typeset(tree, vocabulary);
}
/** What may carry an exponent without being misread. */
function asBase(tree: Tree, vocabulary: Vocabulary): string {
  const body = typeset(tree, vocabulary);
  const safe =
    tree.type === "name"
      ? !body.includes("^") && !body.startsWith("\\partial ")
      : tree.type === "number" || tree.type === "accent" || tree.type === "modulus";
  return safe || (tree.type === "group" && tree.bracket !== "{") ? body : bracketed("(", body);
}

function nameIn(name: Name, vocabulary: Vocabulary): string {
  const meaning = meaningOf(name, [], vocabulary);
  if (meaning.means === "field" && meaning.derivatives > 0) {
    const sign = name.base.startsWith("D") ? "D " : "\\partial ";
    return (
      sign.repeat(meaning.derivatives) +
      nameIn({ ...name, base: name.base.slice(meaning.derivatives) }, vocabulary)
    );
  }
  const operator = Object.hasOwn(operatorLatex, name.base) ? operatorLatex[name.base] : undefined;
  if (meaning.means === "derivative" && operator !== undefined)
    return operator + subscriptLatex(name.subscript);
  const dagger = /^(.+?)(?:dagger|dag)$/.exec(name.base)?.[1];
  if (meaning.means === "field" && dagger !== undefined && meaning.symbol !== name.base)
    return `${nameLatex({ ...name, base: dagger })}^\\dagger`;
  return nameLatex(name);
}

function literalLatex(text: string): string {
  return text.replace(/^(\d)\/(\d)$/, "\\frac{$1}{$2}").replace(/[eE]\+?(-?\d+)$/, "\\times 10^{$1}");
}
