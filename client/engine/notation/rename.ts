/** Renames a declared symbol where it is used: in typed notation, and in the LaTeX of prose. */
import { hasCommand, isLowerGreek, unicodeName } from "./letters.ts";
import { canonicalName, nameLatex, type Name } from "./names.ts";
import { tokenise, type Token } from "./tokens.ts";

type NameToken = Extract<Token, { type: "name" }>;

/**
 * A symbol as one types it, when it is one plain name: what carries an accent of its own is renamed by hand.
 * @example readPlainName("\\phi_1") // { base: "phi", subscript: ["1"], primes: 0 }
 * @example readPlainName("phi chi") // null
 */
export function readPlainName(typed: string): Name | null {
  const tokens = tokenise(typed, { measuredLiterals: false });
  if (!tokens.ok) return null;
  const [first, second] = tokens.value;
  return first?.type === "name" && second?.type === "end" ? first.name : null;
}

/**
 * A term with one symbol renamed, in whichever spelling it was written; the same text when it is not used or cannot be
 * read. Conjugates (psibar), derivatives written in one word (dphi) and indices go along.
 * @example renameInTerm("lambda/4! phi^4", readPlainName("phi"), readPlainName("chi")) // "lambda/4! chi^4"
 * @example renameInTerm("\\bar{\\psi}\\psi", readPlainName("psi"), readPlainName("chi")) // "\\bar{\\chi}\\chi"
 */
export function renameInTerm(text: string, from: Name, to: Name): string {
  const tokens = tokenise(text, { measuredLiterals: false });
  if (!tokens.ok) return text;
  let renamed = "";
  let done = 0;
  for (const token of tokens.value) {
    const replacement = token.type === "name" ? replacementFor(token, text, from, to) : null;
    if (replacement === null) continue;
    renamed += text.slice(done, token.at) + spaced(replacement, text.charAt(token.to));
    done = token.to;
  }
  return renamed + text.slice(done);
}

function replacementFor(token: NameToken, text: string, from: Name, to: Name): string | null {
  const written = text.slice(token.at, token.to);
  const { prefix, stem, suffix } = partsOf(token.name.base, from.base);
  if (stem !== from.base || token.name.primes !== from.primes) return null;
  const own = canonicalName({ ...token.name, base: stem }) === canonicalName({ ...from, base: stem });
  const isIndexed = from.subscript.length === 0 && token.name.subscript.every(isIndex);
  if (!own && !isIndexed) return null;
  const tail = own ? "" : written.slice(written.indexOf("_"));
  return spell(prefix, to, suffix, written.startsWith("\\")) + tail;
}

/** "psibar" of psi is psi with a bar; "dphi" of phi is a derivative of phi. */
function partsOf(base: string, stem: string): { prefix: string; stem: string; suffix: string } {
  const suffix = /(?:bar|dagger|dag|tilde)$/.exec(base)?.[0] ?? "";
  if (base === stem) return { prefix: "", stem, suffix: "" };
  if (suffix !== "" && base === stem + suffix) return { prefix: "", stem, suffix };
  if (base === `d${stem}`) return { prefix: "d", stem, suffix: "" };
  return { prefix: "", stem: base, suffix: "" };
}

function isIndex(piece: string): boolean {
  return piece === "," || isLowerGreek(piece) || /^[a-z]$/.test(piece);
}

function spell(prefix: string, name: Name, suffix: string, asLatex: boolean): string {
  const plain = asLatex ? nameLatex(name) : canonicalName(name);
  if (prefix !== "")
    return name.subscript.length === 0 ? `${prefix}${plain}` : `\\partial ${nameLatex(name)}`;
  if (suffix === "") return plain;
  if (name.subscript.length === 0 && name.primes === 0) return name.base + suffix;
  const accent = suffix === "tilde" ? "tilde" : "bar";
  return suffix.startsWith("dag") ? `${nameLatex(name)}^\\dagger` : `\\${accent}{${nameLatex(name)}}`;
}

/** A command must not run into the letters after it, nor a name of letters into others. */
function spaced(replacement: string, next: string): string {
  return /[A-Za-z]$/.test(replacement) && /[A-Za-z0-9]/.test(next) ? `${replacement} ` : replacement;
}

/**
 * The LaTeX of prose with one symbol renamed: wherever its own spelling stands by itself. A name with another subscript
 * is another name; indices go along.
 * @example renameInLatex("\\phi^4 + \\phi_0 + \\varphi", readPlainName("phi"), readPlainName("chi")) // "\\chi^4 + \\phi_0 + \\varphi"
 */
export function renameInLatex(latex: string, from: Name, to: Name): string {
  const spellings = [nameLatex(from), ...lettersOf(from)].map((text) => {
    const literal = text.replace(/[.*+?^${}()|[\]\\]/g, "\\$&");
    // A letter must stand alone; a command begins with its backslash whatever comes before it.
    return text.startsWith("\\") ? `(?<!\\\\)${literal}` : `(?<![A-Za-z\\\\])${literal}`;
  });
  const own = new RegExp(`(?:${spellings.join("|")})(?![A-Za-z'])`, "gu");
  return latex.replace(own, (found, at: number) => {
    const rest = latex.slice(at + found.length);
    if (
      from.subscript.length === 0 &&
      /^_/.test(rest) &&
      !/^_(?:\{[^{}]*\\[a-z]|\{?[a-z]\b|\\[a-z])/.test(rest)
    )
      return found;
    return spaced(nameLatex(to), rest.charAt(0));
  });
}

/** The same symbol as a Unicode letter, which KaTeX draws as well. */
function lettersOf(name: Name): readonly string[] {
  if (name.subscript.length > 0 || name.primes > 0 || !hasCommand(name.base)) return [];
  return greek.filter((letter) => unicodeName(letter) === name.base);
}
const greek = Array.from({ length: 0x3f6 - 0x391 }, (_, index) => String.fromCodePoint(0x391 + index));
