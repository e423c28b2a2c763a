/** What is wrong with a formula, and where, in words a person can act on. */
import type { LatexFault } from "./katex-loader.ts";

/** KaTeX's sentences (version 0.19.1) and ours for them. `$1` is what the pattern caught. */
const sentences: readonly (readonly [RegExp, string])[] = [
  [/^Undefined control sequence: (.+)$/, "$1 is not a command known here. Check its spelling."],
  [/^Expected '}', got 'EOF'$/, "A brace { is opened and never closed."],
  [/^Unexpected end of input/, "The formula ends inside a brace or an argument: something is not closed."],
  [/^Expected '\\right', got 'EOF'$/, "\\left has no \\right to close it."],
  [/^Expected '\\left'|^\\middle without/, "\\middle stands outside \\left … \\right."],
  [/^Extra }$|^Expected 'EOF', got '}'$/, "There is one } too many."],
  [/^Expected 'EOF', got '\\right'$/, "\\right has no \\left before it."],
  [
    /^Expected 'EOF', got '&'$/,
    "& aligns columns and belongs inside an environment such as aligned or matrix.",
  ],
  [/^Expected 'EOF', got '\\end'$/, "\\end has no \\begin before it."],
  [/^Expected 'EOF', got '#'$/, "# is reserved by TeX. Write \\# to show it."],
  [/^Double superscript$/, "Two superscripts follow each other: group them with braces, as in {a^b}^c."],
  [/^Double subscript$/, "Two subscripts follow each other: group them with braces, as in {a_b}_c."],
  [/^Expected group after '(.+)'$/, "Something must follow $1: a letter, a number or a group in braces."],
  [/^Expected group as argument to '(.+)'/, "$1 needs an argument in braces."],
  [/^Got function '(.+)' with no arguments/, "$1 needs braces around it here."],
  [/^No such environment: (.+)$/, "There is no environment called $1."],
  [
    /^Mismatch: \\begin\{(.+)\} matched by \\end\{(.+)\}$/,
    "\\begin{$1} is closed by \\end{$2}: the names must agree.",
  ],
  [/^Can't use function '\$' in math mode$/, "$ is not needed here: this is mathematics already."],
  [/^Can't use function '(.+)' in math mode$/, "$1 works in text only: put it inside \\text{…}."],
  [/^Can't use function '(.+)' in text mode$/, "$1 works in mathematics only, not inside \\text{…}."],
  [/^\\tag works only in display equations$/, "\\tag works in displayed equations only."],
  [/^Multiple \\tag$/, "An equation can carry one \\tag only."],
  [/^Invalid delimiter '(.+)' after/, "$1 cannot be used as a bracket here."],
  [/^Limit controls must follow/, "\\limits must follow an operator such as \\sum or \\int."],
  [/^Too many tab characters/, "There are more & in this row than the environment has columns."],
  [
    /^Invalid size: '(.*)'|^Invalid unit: '(.*)'/,
    "That is not a length TeX knows: write a number and a unit, as in 2em.",
  ],
  [/^Invalid color: '(.+)'$/, "$1 is not a colour."],
  [
    /^Unexpected character: '(.+)'$/,
    "The character $1 cannot be drawn. Use a command for it, or put it inside \\text{…}.",
  ],
  [/^Too long$/, "The formula is too long to be drawn: divide it into several."],
  [/^Too deep$/, "The formula nests too deeply to be drawn."],
  [/^Too many expansions/, "The formula keeps expanding its own macros and was stopped."],
  [/^Expected '(.+)', got 'EOF'$/, "The formula ends where $1 was expected."],
  [/^Expected '(.+)', got '(.+)'$/, "$1 was expected, but here is $2."],
];

export interface FaultWords {
  readonly sentence: string;
  /** "at character 7, before “…”", or "at the end", or "". */
  readonly place: string;
}

export function latexFaultWords(fault: LatexFault, source: string): FaultWords {
  return { sentence: sentenceFor(fault.message), place: placeWords(fault.position, source) };
}

function sentenceFor(message: string): string {
  for (const [pattern, words] of sentences) {
    const found = pattern.exec(message);
    if (found) return words.replace("$1", () => found[1] ?? "").replace("$2", () => found[2] ?? "");
  }
  return `The formula cannot be read: ${message}.`;
}

function placeWords(position: number | null, source: string): string {
  if (position === null) return "";
  if (position >= source.trimEnd().length) return "at the end";
  const ahead = source.slice(position, position + 12);
  return `at character ${String(position + 1)}, at “${ahead}${position + 12 < source.length ? "…" : ""}”`;
}
