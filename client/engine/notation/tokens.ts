/**
 * Typed text to tokens. Literals stay exact text; a name carries its subscript and primes; LaTeX spacing and
 * sizing commands vanish. Which names are fields or derivatives is decided later, by whoever knows the theory.
 */
import { FirstFailure, failed, read, type Read } from "./failure.ts";
import { hasCommand, subscriptDigit, superscriptDigit, unicodeName } from "./letters.ts";
import type { Name } from "./names.ts";
import { readSubscript } from "./subscript.ts";

export type Accent = "bar" | "tilde" | "hat" | "dot" | "ddot" | "slash" | "space" | "plain";

export type TokenBody =
  | { readonly type: "number"; readonly text: string }
  /** A measured literal, 1.3(2)e3: digits, uncertainty as typed, power of ten. */
  | {
      readonly type: "measured";
      readonly digits: string;
      readonly uncertainty: string;
      readonly exponent: string;
    }
  | { readonly type: "name"; readonly name: Name }
  | { readonly type: "accent"; readonly accent: Accent }
  /** A subscript that does not directly follow a name: \bar{\psi}_L. */
  | { readonly type: "subscript"; readonly pieces: readonly string[] }
  | { readonly type: "open"; readonly bracket: "(" | "[" | "{" | "⟨" }
  | { readonly type: "close"; readonly bracket: ")" | "]" | "}" | "⟩" }
  | { readonly type: "fraction" }
  | { readonly type: "root" }
  /** A conjugation mark: \dagger, †. */
  | { readonly type: "dagger" }
  | { readonly type: "sign"; readonly sign: "+" | "-" | "±" | "*" | "/" | "." | "^" | "!" | "|" | "," }
  | { readonly type: "end" };
/** `at` and `to` are offsets into the typed text; the gap between tokens tells "phi* chi" from "phi*chi". */
export type Token = TokenBody & { readonly at: number; readonly to: number };

/** Longest text that is read at all. */
const LONGEST_TEXT = 1000;

const accents: Readonly<Record<string, Accent>> = {
  bar: "bar",
  overline: "bar",
  tilde: "tilde",
  widetilde: "tilde",
  hat: "hat",
  widehat: "hat",
  dot: "dot",
  ddot: "ddot",
  slashed: "slash",
  not: "slash",
  vec: "space",
  mathbf: "space",
  boldsymbol: "space",
  bm: "space",
  mathcal: "plain",
  mathrm: "plain",
  mathit: "plain",
  mathsf: "plain",
  mathbb: "plain",
  mathfrak: "plain",
  text: "plain",
  textrm: "plain",
  operatorname: "plain",
};
const skipped = new Set([
  ..."left right big Big bigg Bigg bigl bigr Bigl Bigr quad qquad rm displaystyle limits".split(" "),
]);
const namedOperators: Readonly<Record<string, string>> = {
  partial: "partial",
  nabla: "nabla",
  Box: "Box",
  square: "Box",
  Tr: "Tr",
  tr: "tr",
};
type Sign = Extract<TokenBody, { type: "sign" }>["sign"];
const commandSigns: Readonly<Record<string, Sign>> = {
  cdot: ".",
  times: "*",
  ast: "*",
  pm: "±",
  lvert: "|",
  rvert: "|",
  vert: "|",
};
const characterSigns: Readonly<Record<string, Sign>> = {
  "+": "+",
  "-": "-",
  "−": "-",
  "±": "±",
  "*": "*",
  "×": "*",
  "/": "/",
  ".": ".",
  "·": ".",
  "⋅": ".",
  "^": "^",
  "!": "!",
  "|": "|",
  ",": ",",
};

const vulgarFractions: Readonly<Record<string, string>> = {
  "½": "1/2",
  "⅓": "1/3",
  "⅔": "2/3",
  "¼": "1/4",
  "¾": "3/4",
  "⅙": "1/6",
  "⅛": "1/8",
};

const literal = /^(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?/;
const measured = /^(\d+(?:\.\d*)?|\.\d+)\((\d+(?:\.\d+)?)\)(?:[eE]([+-]?\d+))?/;
const command = /^\\([A-Za-z]+)/;
const letters = /^([A-Za-z]+)(\d*)/;

/**
 * With `measuredLiterals`, "3.2(4)" is one measured value; without, it is a product as everywhere else.
 * Fails with `text-too-long`, `unexpected-character`, `unknown-command` or `bad-subscript`.
 * The last token is always `end`.
 */
export function tokenise(
  text: string,
  options: { readonly measuredLiterals: boolean },
): Read<readonly Token[]> {
  if (text.length > LONGEST_TEXT)
    return failed("text-too-long", { length: text.length, most: LONGEST_TEXT, offset: LONGEST_TEXT });
  const trouble = new FirstFailure();
  const tokens: Token[] = [];
  let at = 0;
  const push = (body: TokenBody, length: number): void => {
    tokens.push({ ...body, at, to: at + length });
    at += length;
  };
  const pushName = (base: string, length: number, digits = ""): void => {
    // A combining macron or overline, as in ψ̄, is a bar.
    const barred = text.charAt(at + length) === "\u0304" || text.charAt(at + length) === "\u0305";
    if (barred) return pushName(`${base}bar`, length + 1, digits);
    // In A^a_\mu the subscript is the base's, for a superscript without braces is one symbol.
    const before = tokens.at(-1);
    const isSuperscript = before?.type === "sign" && before.sign === "^" && digits === "";
    if (isSuperscript) return push({ type: "name", name: { base, subscript: [], primes: 0 } }, length);
    const tail = readNameTail(
      text,
      at + length,
      digits === "" ? [] : [digits],
      trouble,
      !options.measuredLiterals,
    );
    push({ type: "name", name: { base, subscript: tail.subscript, primes: tail.primes } }, tail.to - at);
  };
  while (at < text.length && !trouble.failure) {
    const rest = text.slice(at);
    const first = rest.charAt(0);
    const number = literal.exec(rest)?.[0];
    const value = options.measuredLiterals ? measured.exec(rest) : null;
    const written = command.exec(rest)?.[1];
    const run = letters.exec(rest);
    const unicode = unicodeName(first);
    const raised = superscriptRun(rest);
    if (/^\s/.test(first) || first === "~" || first === "&") at += 1;
    else if (/^\\[,;:! \\]/.test(rest)) at += 2;
    else if (/^\{\s*\}/.test(rest)) at += rest.indexOf("}") + 1;
    else if (value) {
      const [whole, digits = "", uncertainty = "", exponent = "0"] = value;
      push({ type: "measured", digits, uncertainty, exponent }, whole.length);
    } else if (number !== undefined) push({ type: "number", text: number }, number.length);
    else if (written !== undefined) readCommand(written);
    else if (rest.startsWith("\\{")) push({ type: "open", bracket: "{" }, 2);
    else if (rest.startsWith("\\}")) push({ type: "close", bracket: "}" }, 2);
    else if (rest.startsWith("\\|")) push({ type: "sign", sign: "|" }, 2);
    else if (run) pushName(run[1] ?? "", run[0].length, run[2]);
    else if (unicode !== null) pushName(unicode, 1);
    else if (Object.hasOwn(vulgarFractions, first))
      push({ type: "number", text: vulgarFractions[first] ?? "" }, 1);
    else if (raised !== null) {
      const length = raised.length;
      push({ type: "sign", sign: "^" }, 0);
      if (raised.startsWith("-")) push({ type: "sign", sign: "-" }, 1);
      push({ type: "number", text: raised.replace("-", "") }, raised.startsWith("-") ? length - 1 : length);
    } else if (first === "_") {
      const subscript = readSubscript(text, at + 1, trouble);
      push({ type: "subscript", pieces: subscript.pieces }, subscript.to - at);
    } else if (first === "(" || first === "[" || first === "{" || first === "⟨")
      push({ type: "open", bracket: first }, 1);
    else if (first === ")" || first === "]" || first === "}" || first === "⟩")
      push({ type: "close", bracket: first }, 1);
    else if (first === "†") push({ type: "dagger" }, 1);
    else if (rest.startsWith("+-") || rest.startsWith("+/-"))
      push({ type: "sign", sign: "±" }, rest.startsWith("+-") ? 2 : 3);
    else {
      const sign = characterSigns[first];
      if (sign) push({ type: "sign", sign }, 1);
      else
        trouble.note("unexpected-character", {
          text: String.fromCodePoint(rest.codePointAt(0) ?? 0),
          offset: at,
        });
    }
  }
  if (trouble.failure) return { ok: false, failure: trouble.failure };
  tokens.push({ type: "end", at: text.length, to: text.length });
  return read(tokens);

  function readCommand(name: string): void {
    const length = name.length + 1;
    const accent = Object.hasOwn(accents, name) ? accents[name] : undefined;
    const sign = Object.hasOwn(commandSigns, name) ? commandSigns[name] : undefined;
    const operator = Object.hasOwn(namedOperators, name) ? namedOperators[name] : undefined;
    if (skipped.has(name))
      at += length + (/^(left|right)$/.test(name) && text.charAt(at + length) === "." ? 1 : 0);
    else if (accent) push({ type: "accent", accent }, length);
    else if (sign) push({ type: "sign", sign }, length);
    else if (operator) pushName(operator, length);
    else if (hasCommand(name)) pushName(name, length);
    else if (name === "frac" || name === "tfrac" || name === "dfrac") push({ type: "fraction" }, length);
    else if (name === "sqrt") push({ type: "root" }, length);
    else if (name === "dagger" || name === "dag") push({ type: "dagger" }, length);
    else if (name === "langle") push({ type: "open", bracket: "⟨" }, length);
    else if (name === "rangle") push({ type: "close", bracket: "⟩" }, length);
    else trouble.note("unknown-command", { text: `\\${name}`, offset: at });
  }
}

function superscriptRun(text: string): string | null {
  let run = "";
  for (const character of text) {
    const digit = superscriptDigit(character);
    if (digit === null || (digit === "-" && run !== "")) break;
    run += digit;
  }
  return run === "" || run === "-" ? null : run;
}

/** C^{(3)}_{Hq} is C_{Hq,3}: a bracketed superscript tells couplings apart and is no power. */
function withLabel(subscript: readonly string[], label: string | null): readonly string[] {
  if (label === null) return subscript;
  return subscript.length === 0 ? [label] : [...subscript, ",", label];
}

/** Subscripts and primes right after a name; `taken` are digits that were written on to it, "c6". */
function readNameTail(
  text: string,
  start: number,
  taken: readonly string[],
  trouble: FirstFailure,
  mayBeLabelled: boolean,
) {
  let to = start;
  let label: string | null = null;
  let subscript: readonly string[] = taken;
  let primes = 0;
  for (;;) {
    const next = text.charAt(to);
    const lowered = subscriptDigit(next);
    const prime = /^(?:'|′|\^\s*\{?\s*\\prime\s*\}?)/.exec(text.slice(to));
    const underscore = /^\s*_/.exec(text.slice(to));
    const labelled: RegExpExecArray | null =
      mayBeLabelled && label === null ? /^\s*\^\s*\{\s*\((\d{1,2})\)\s*\}/.exec(text.slice(to)) : null;
    if (prime) {
      primes += 1;
      to += prime[0].length;
    } else if (lowered !== null) {
      let digits = "";
      for (
        let digit = subscriptDigit(text.charAt(to));
        digit !== null;
        digit = subscriptDigit(text.charAt(to))
      ) {
        digits += digit;
        to += 1;
      }
      subscript = [...subscript, digits];
    } else if (underscore && !trouble.failure) {
      if (subscript.length > 0) trouble.note("bad-subscript", { text: "_", offset: to });
      const found = readSubscript(text, to + underscore[0].length, trouble);
      subscript = found.pieces;
      to = found.to;
    } else if (labelled) {
      label = labelled[1] ?? "";
      to += labelled[0].length;
    } else return { subscript: withLabel(subscript, label), primes, to };
  }
}
