/**
 * The grammar of typed notation. Juxtaposition, `*` and `/` have one precedence and group from the left:
 * `lambda/4! phi^4` is (λ/4!)φ⁴. A name before a bracket is a factor; only sqrt, max and min are functions.
 *
 *   sum      := [sign] product (sign product)*
 *   product  := factor (["*" | "/" | "."] factor)*
 *   factor   := atom ("!" | "^" exponent | dagger | subscript)*
 *   atom     := number | name | bracketed sum | |sum| | accent atom | \frac{sum}{sum} | \sqrt{sum}
 */
import { Rational } from "../exact/rational.ts";
import { canonicalName } from "./names.ts";
import { exactLiteral, measuredLiteral } from "./literals.ts";
import { unitNamed } from "./units.ts";
import { Cursor } from "./cursor.ts";
import { read, type Read } from "./failure.ts";
import type { Factor, Tree } from "./tree.ts";
import { isIndices, isLiteral, withSubscript } from "./tree-shape.ts";
import { tokenise, type Token } from "./tokens.ts";

const DEEPEST = 40;
const closing = { "(": ")", "[": "]", "{": "}", "⟨": "⟩" } as const;
/** The words that are functions when a bracket follows. */
const functions = new Set(["sqrt", "max", "min"]);

export interface ParseOptions {
  /** True for values and expressions in scales: "3.2(4)" and "3.2 ± 0.4" are measured values and `*` multiplies. */
  readonly quantities: boolean;
}

/**
 * Reads text into a tree. Failures: those of the tokeniser, `empty-text`, `unbalanced-bracket`, `missing-operand`,
 * `misplaced-mark`, `double-power`, `nested-too-deep`, `number-too-large`; each with `offset` and `text`.
 */
export function parse(text: string, options: ParseOptions): Read<Tree> {
  const tokens = tokenise(text, { measuredLiterals: options.quantities });
  if (!tokens.ok) return tokens;
  return new Parser(text, tokens.value, options).whole();
}

type SumSign = "+" | "-" | "±";
function isSumSign(sign: string): sign is SumSign {
  return sign === "+" || sign === "-" || sign === "±";
}

class Parser extends Cursor {
  private depth = 0;
  private insideBars = false;

  constructor(
    text: string,
    tokens: readonly Token[],
    private readonly options: ParseOptions,
  ) {
    super(text, tokens);
  }

  whole(): Read<Tree> {
    if (this.peek().type === "end") this.fail("empty-text", this.peek());
    const tree = this.sum();
    const rest = this.peek();
    if (rest.type === "close" || this.isSign(rest, "|")) this.fail("unbalanced-bracket", rest);
    else if (rest.type !== "end") this.fail("misplaced-mark", rest);
    return this.failure ? { ok: false, failure: this.failure } : read(tree);
  }

  private sum(): Tree {
    const start = this.peek();
    if (this.depth >= DEEPEST) return this.fail("nested-too-deep", start);
    this.depth += 1;
    const parts: { sign: SumSign; at: number; node: Tree }[] = [];
    do {
      const token = this.peek();
      const sign = token.type === "sign" && isSumSign(token.sign) ? token.sign : null;
      if (sign) this.take();
      parts.push({ sign: sign ?? "+", at: token.at, node: this.product() });
    } while (this.isSign(this.peek(), "+", "-", "±"));
    this.depth -= 1;
    const [only] = parts;
    return parts.length === 1 && only?.sign === "+" ? only.node : { type: "sum", parts, at: start.at };
  }

  private startsFactor(token: Token): boolean {
    if (token.type === "sign") return token.sign === "|" && !this.insideBars;
    return (
      token.type !== "close" && token.type !== "end" && token.type !== "subscript" && token.type !== "dagger"
    );
  }

  private product(): Tree {
    const start = this.peek();
    const factors: Factor[] = [{ join: "juxtaposed", node: this.factor() }];
    for (;;) {
      const token = this.peek();
      if (token.type === "sign" && (token.sign === "*" || token.sign === "/" || token.sign === ".")) {
        this.take();
        const node = this.factor();
        const unit = token.sign === "/" && !factors.every(isLiteral) ? this.unitOf(node) : null;
        factors.push({ join: token.sign, node: unit ?? node });
      } else if (this.startsFactor(token)) factors.push({ join: "juxtaposed", node: this.factor() });
      else break;
    }
    const [only] = factors;
    return factors.length === 1 && only ? only.node : { type: "product", factors, at: start.at };
  }

  /**
   * A number keeps its unit: "350 GeV / 3.2 TeV" is a ratio. Only a fraction of two bare numbers is a number
   * before its unit arrives: "1/2 GeV" is half a GeV.
   */
  private unitOf(node: Tree): Tree | null {
    const token = this.peek();
    const styled = token.type === "accent" && token.accent === "plain" && this.peek(1).type === "open";
    const word = styled ? this.peek(2) : token;
    const isUnit = word.type === "name" && unitNamed(canonicalName(word.name)) !== null;
    if (!this.options.quantities || (node.type !== "number" && node.type !== "measured") || !isUnit)
      return null;
    const factors: Factor[] = [
      { join: "juxtaposed", node },
      { join: "juxtaposed", node: this.factor() },
    ];
    return { type: "product", factors, at: node.at };
  }

  private factor(): Tree {
    let node = this.atom();
    let raised = false;
    for (;;) {
      const token = this.peek();
      if (this.isSign(token, "!")) {
        this.take();
        if (node.type !== "number" || !node.value.isInteger() || node.value.sign() < 0)
          return this.fail("misplaced-mark", token);
        node = { type: "factorial", body: node, at: node.at };
      } else if (token.type === "dagger") {
        this.take();
        node = { type: "conjugate", body: node, at: node.at };
      } else if (this.isConjugatingStar(token, node)) {
        this.take();
        node = { type: "conjugate", body: node, at: node.at };
      } else if (this.isSign(token, "^")) {
        this.take();
        const exponent = this.exponent();
        const numeric = exponent !== "conjugate" && !isIndices(exponent);
        if (numeric && raised) return this.fail("double-power", token);
        raised ||= numeric;
        node =
          exponent === "conjugate"
            ? { type: "conjugate", body: node, at: node.at }
            : { type: "power", base: node, exponent, at: node.at };
      } else if (token.type === "subscript") {
        this.take();
        const subscripted = withSubscript(node, token.pieces);
        if (!subscripted) return this.fail("misplaced-mark", token);
        node = subscripted;
      } else return node;
    }
  }

  /** "phi* chi" conjugates, "phi*chi" and "phi * chi" multiply. */
  private isConjugatingStar(token: Token, node: Tree): boolean {
    if (this.options.quantities || !this.isSign(token, "*") || this.text.charAt(token.at) !== "*")
      return false;
    const named = node.type === "name" || node.type === "group" || node.type === "accent";
    const before = this.peek(-1);
    const after = this.peek(1);
    return (
      named &&
      before.to === token.at &&
      (after.at > token.to || after.type === "end" || after.type === "close" || this.isSign(after, "^"))
    );
  }

  /** One number, name or bracket after "^"; signs only before a number, or inside a bracket. */
  private exponent(): Tree | "conjugate" {
    const token = this.peek();
    const inner = token.type === "open" ? this.peek(1) : token;
    const mark =
      inner.type === "dagger" ||
      this.isSign(inner, "*") ||
      (inner.type === "name" && /^dag(ger)?$/.test(inner.name.base));
    const closes = token.type === "open" ? this.peek(2).type === "close" : true;
    if (mark && closes) {
      for (let passed = 0; passed < (token.type === "open" ? 3 : 1); passed++) this.take();
      return "conjugate";
    }
    if (this.isSign(token, "-", "+")) {
      this.take();
      const size = this.peek();
      if (size.type !== "number") return this.fail("missing-operand", size);
      const node = this.atom();
      return token.type === "sign" && token.sign === "-"
        ? { type: "sum", parts: [{ sign: "-", at: token.at, node }], at: token.at }
        : node;
    }
    return this.atom();
  }

  private atom(): Tree {
    const token = this.take();
    const { at } = token;
    switch (token.type) {
      case "number":
        return this.number(token);
      case "measured":
        return this.measured(token);
      case "name":
        return functions.has(token.name.base) && this.peek().type === "open"
          ? this.call(token.name.base as "sqrt" | "max" | "min", at)
          : { type: "name", name: token.name, at };
      case "accent":
        return { type: "accent", accent: token.accent, body: this.atom(), at };
      case "fraction": {
        const over = this.argument();
        return { type: "quotient", over, under: this.argument(), at };
      }
      case "root":
        return { type: "call", callee: "sqrt", parts: [this.argument()], at };
      case "open":
        return { type: "group", bracket: token.bracket, body: this.bracketed(token), at };
      case "sign":
        if (token.sign === "|" && !this.insideBars) return this.modulus(token);
        return this.fail("missing-operand", token);
      case "close":
      case "end":
      case "subscript":
      case "dagger":
        return this.fail(
          token.type === "close" && this.depth === 1 ? "unbalanced-bracket" : "missing-operand",
          token,
        );
    }
  }

  /** Exact value of a literal, and in quantities "± uncertainty" right after it. */
  private number(token: Token & { type: "number" }): Tree {
    const value = exactLiteral(token.text);
    if (!value) return this.fail("number-too-large", token);
    const spread = this.peek(1);
    if (!this.options.quantities || !this.isSign(this.peek(), "±") || spread.type !== "number")
      return { type: "number", value, text: token.text, at: token.at };
    const sigma = exactLiteral(spread.text);
    if (!sigma) return this.fail("number-too-large", spread);
    this.take();
    this.take();
    return { type: "measured", value, sigma, text: `${token.text} \\pm ${spread.text}`, at: token.at };
  }

  private measured(token: Token & { type: "measured" }): Tree {
    const literal = measuredLiteral(token.digits, token.uncertainty, token.exponent);
    if (!literal) return this.fail("number-too-large", token);
    return { type: "measured", ...literal, text: this.text.slice(token.at, token.to), at: token.at };
  }

  private bracketed(open: Token & { type: "open" }): Tree {
    if (this.peek().type === "close") return this.fail("missing-operand", this.peek());
    const outer = this.insideBars;
    this.insideBars = false;
    const body = this.sum();
    this.insideBars = outer;
    const end = this.take();
    if (end.type !== "close" || end.bracket !== closing[open.bracket])
      return this.fail("unbalanced-bracket", open);
    return body;
  }
  private modulus(open: Token): Tree {
    this.insideBars = true;
    const body = this.sum();
    this.insideBars = false;
    if (!this.isSign(this.take(), "|")) return this.fail("unbalanced-bracket", open);
    return { type: "modulus", body, at: open.at };
  }
  private call(callee: "sqrt" | "max" | "min", at: number): Tree {
    const open = this.take();
    const parts = [this.sum()];
    while (this.isSign(this.peek(), ",")) {
      this.take();
      parts.push(this.sum());
    }
    if (this.take().type !== "close") return this.fail("unbalanced-bracket", open);
    return { type: "call", callee, parts, at };
  }

  /** A LaTeX argument: a brace, or one symbol, where "\frac12" is one half. */
  private argument(): Tree {
    const token = this.peek();
    if (token.type === "open" && token.bracket === "{") {
      this.take();
      return this.bracketed(token);
    }
    if (token.type !== "number" || token.text.length === 1) return this.atom();
    const [digit = "", ...more] = token.text;
    const rest: Token = { type: "number", text: more.join(""), at: token.at + 1, to: token.to };
    if (!/^\d+$/.test(token.text)) return this.fail("missing-operand", token);
    this.replace(rest);
    return { type: "number", value: Rational.of(BigInt(digit)), text: digit, at: token.at };
  }
}
