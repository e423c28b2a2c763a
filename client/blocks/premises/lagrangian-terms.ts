/** A Lagrangian pasted as one expression, taken apart into the terms of its sum. */

const environments = /\\(?:begin|end)\{(?:equation|align|aligned|gather|multline|split)\*?\}/g;
const leftSide =
  /^\s*(?:\\(?:mathcal|mathscr|mathfrak|mathrm)\s*\{?\s*)?\\?[A-Za-z]+\}?\s*(?:_\{[^{}]*\}|_\w+|\^\{[^{}]*\})?\s*(?:\([^()]*\))?\s*=/;
const closing = new Set([")", "]", "}"]);

/**
 * The terms with their signs, or null when it is no sum: then it is pasted as it is. What stands before the equals sign,
 * line breaks, alignment marks and labels go.
 *
 * @example termsOf("\\mathcal{L} = \\tfrac12(\\partial\\phi)^2 - \\frac{\\lambda}{4!}\\phi^4")
 * // ["\\tfrac12(\\partial\\phi)^2", "-\\frac{\\lambda}{4!}\\phi^4"]
 */
export function termsOf(text: string): readonly string[] | null {
  const sum = text
    .replace(environments, " ")
    .replace(/\\(?:label|tag)\{[^{}]*\}|\\(?:nonumber|notag)\b|\\\\|(?<!\\)[&$]|\\[[\]]/g, " ")
    .replace(leftSide, "")
    .trim()
    .replace(/[.,;]+$/, "");
  const terms = splitSum(sum);
  return terms.length > 1 ? terms : null;
}

function splitSum(sum: string): string[] {
  const terms: string[] = [];
  let depth = 0;
  let start = 0;
  for (let at = 0; at < sum.length; at++) {
    const sign = sum.charAt(at);
    if (sign === "(" || sign === "[" || sign === "{") depth += 1;
    else if (closing.has(sign)) depth -= 1;
    else if (depth === 0 && /[+\-−]/.test(sign) && beginsTerm(sum, at)) {
      terms.push(sum.slice(start, at));
      start = at;
    }
  }
  terms.push(sum.slice(start));
  return terms.map(tidy).filter((term) => term !== "");
}

/** A sign after a power, a product or another sign belongs to what follows it, and 1e-3 is one number. */
function beginsTerm(sum: string, at: number): boolean {
  const before = sum.slice(0, at).trimEnd();
  return before !== "" && !/[\^_*/=(,+\-−·×]$/.test(before) && !/\d[eE]$/.test(before);
}

/** One plus sign less, one space at a time. */
function tidy(term: string): string {
  return term
    .trim()
    .replace(/^\+\s*/, "")
    .replace(/^[-−]\s*/, "-")
    .replace(/\s+/g, " ");
}
