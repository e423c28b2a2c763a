/** What stands behind a term and is no part of it. */

/** "+ h.c." at the end counts as the term itself and is dropped; brackets that close behind it stay. */
const hcMark = "[hH]\\s*\\.\\s*[cC]\\s*\\.?";
const hcStyled = `\\\\(?:text|mathrm|textrm|rm)\\s*\\{\\s*${hcMark}\\s*\\}|\\{\\s*\\\\rm\\s*${hcMark}\\s*\\}`;
const hermitianConjugate = new RegExp(
  `\\+\\s*(?:${hcStyled}|(?:\\\\rm\\s*)?${hcMark})\\s*((?:(?:\\\\right\\s*)?[)\\]}]\\s*)*)$`,
);
/** The full stop or comma of the sentence that a formula was taken from. */
const punctuation = /(?:\s|\\[,;:! ])*(?<!\\)[.,;]\s*$/;

/** The text without "+ h.c." and without the punctuation of the sentence around it. */
export function withoutEnding(text: string): { readonly body: string; readonly hasConjugate: boolean } {
  const term = text.replace(hermitianConjugate, "$1");
  return { body: term.replace(punctuation, ""), hasConjugate: term !== text };
}
