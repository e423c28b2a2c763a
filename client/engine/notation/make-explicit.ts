/**
 * Tokens to explicit notation. Everything that can be wrong with the shape of a text is refused here: brackets,
 * missing operands, marks out of place, depth. Precedence is left to who reads the explicit text.
 *
 *   expression := [sign] operand (operator operand)*          operator: + - ± * / . or nothing
 *   operand    := atom ("!" | "^" exponent | dagger | subscript)*
 *   atom       := number | name | bracketed expression | |expression| | accent atom | \frac{…}{…} | \sqrt{…}
 *
 * A name before a bracket is a factor; only sqrt, max and min are functions.
 */
import { Rational } from "../exact/rational.ts";
import { operatorOf, origin, type Explicit } from "./explicit.ts";
import { read, type Read } from "./failure.ts";
import { exactLiteral, measuredLiteral } from "./literals.ts";
import { asArguments, isLiteral, unreadable, wrap, type Atom, type Mark, type Written } from "./operand.ts";
import { OperatorCursor } from "./operators.ts";
import { Placeholders } from "./placeholders.ts";
import type { Token } from "./tokens.ts";

const DEEPEST = 40;
const closing = { "(": ")", "[": "]", "{": "}", "⟨": "⟩" } as const;
/** The words that are functions when a bracket follows. */
const functions = ["sqrt", "max", "min"] as const;

export interface ParseOptions {
  /** True for values and expressions in scales: "3.2(4)" and "3.2 ± 0.4" are measured values and `*` multiplies. */
  readonly quantities: boolean;
}

/**
 * Fails with `empty-text`, `unbalanced-bracket`, `missing-operand`, `misplaced-mark`, `double-power`,
 * `nested-too-deep` or `number-too-large`, each with `offset` and `text`.
 */
export function makeExplicit(text: string, tokens: readonly Token[], options: ParseOptions): Read<Explicit> {
  return new ExplicitWriter(text, tokens, options).whole();
}

class ExplicitWriter extends OperatorCursor {
  private readonly placeholders = new Placeholders();
  private depth = 0;
  private fractions = 0;

  constructor(
    text: string,
    tokens: readonly Token[],
    private readonly options: ParseOptions,
  ) {
    super(text, tokens);
  }

  whole(): Read<Explicit> {
    if (this.peek().type === "end") this.fail("empty-text", this.peek());
    const { text } = this.expression();
    const rest = this.peek();
    if (rest.type === "close" || this.isSign(rest, "|")) this.fail("unbalanced-bracket", rest);
    else if (rest.type !== "end") this.fail("misplaced-mark", rest);
    return this.failure ? { ok: false, failure: this.failure } : read(this.placeholders.explicit(text));
  }

  private refuse(code: string, token: Token): typeof unreadable {
    this.fail(code, token);
    return unreadable;
  }

  private expression(): Written {
    if (this.depth >= DEEPEST) return this.refuse("nested-too-deep", this.peek());
    this.depth += 1;
    const sign = this.takeSign();
    const opening = this.operand();
    let isIndices = opening.isIndices && (sign === null || sign.sign === "+");
    let onlyLiterals = isLiteral(opening);
    let rest = "";
    let terms = 1;
    for (let join = this.takeJoin(); join; join = this.takeJoin()) {
      const operand = this.operand();
      const ratio = join.kind === "factor" && join.join === "/" && !onlyLiterals;
      const next = (ratio ? this.withUnit(operand) : null) ?? operand;
      this.placeholders.join(next, join);
      rest += operatorOf(join) + next.text;
      isIndices &&= next.isIndices && join.kind === "factor" && join.join === "juxtaposed";
      if (join.kind === "term") terms += 1;
      onlyLiterals = (onlyLiterals || join.kind === "term") && isLiteral(next);
    }
    this.depth -= 1;
    // A sign that changes nothing is dropped: "+a b" is a product.
    const isSum = terms > 1 || (sign !== null && sign.sign !== "+");
    if (rest === "" && !isSum) return opening;
    const start = isSum && sign ? origin + operatorOf(sign) : "";
    if (sign) this.placeholders.join(opening, sign);
    const text = start + opening.text + rest;
    return { type: isSum ? "sum" : "product", isIndices, name: null, first: opening.first, text };
  }

  /**
   * A number keeps its unit: "350 GeV / 3.2 TeV" is a ratio. Only a fraction of two bare numbers is a number
   * before its unit arrives: "1/2 GeV" is half a GeV.
   */
  private withUnit(number: Written): Written | null {
    if (!this.options.quantities || !isLiteral(number) || !this.unitFollows()) return null;
    const { at } = this.peek();
    const unit = this.operand();
    this.placeholders.join(unit, { kind: "factor", join: "juxtaposed", at });
    return { ...number, type: "product", text: `(${number.text}*${unit.text})` };
  }

  private operand(): Written {
    let atom = this.atom();
    const marks: Mark[] = [];
    let raised = false;
    for (;;) {
      const token = this.peek();
      if (this.isSign(token, "!")) {
        this.take();
        if (!this.placeholders.isCount(atom)) return this.refuse("misplaced-mark", token);
        marks.push({ type: "factorial" });
        atom = { ...atom, type: "factorial" };
      } else if (token.type === "dagger" || (!this.options.quantities && this.starConjugates(atom.type))) {
        this.take();
        marks.push({ type: "conjugate" });
        atom = { ...atom, type: "conjugate", isIndices: false };
      } else if (this.isSign(token, "^")) {
        this.take();
        const exponent = this.exponent();
        const numeric = exponent !== "conjugate" && !exponent.isIndices;
        if (numeric && raised) return this.refuse("double-power", token);
        raised ||= numeric;
        marks.push(
          exponent === "conjugate" ? { type: "conjugate" } : { type: "power", exponent: exponent.text },
        );
        atom = { ...atom, type: exponent === "conjugate" ? "conjugate" : "power", isIndices: false };
      } else if (token.type === "subscript") {
        this.take();
        if (atom.name === null) return this.refuse("misplaced-mark", token);
        this.placeholders.subscribe(atom.name, token.pieces);
        atom = { ...atom, name: null };
      } else return this.placeholders.write(atom, marks);
    }
  }

  /** One number, name or bracket after "^"; signs only before a number, or inside a bracket. */
  private exponent(): Written | "conjugate" {
    if (this.takeConjugation()) return "conjugate";
    if (!this.isSign(this.peek(), "-", "+")) return this.placeholders.write(this.atom());
    const sign = this.takeSign();
    const size = this.peek();
    if (size.type !== "number") return this.refuse("missing-operand", size);
    const number = this.placeholders.write(this.atom());
    if (sign?.sign !== "-") return number;
    this.placeholders.join(number, sign);
    return { ...number, type: "sum", text: `(${origin}-${number.text})` };
  }

  private atom(): Atom {
    const token = this.take();
    const { at } = token;
    switch (token.type) {
      case "number":
        return this.number(token);
      case "measured":
        return this.measured(token);
      case "name": {
        const callee = functions.find((word) => word === token.name.base);
        if (callee && this.peek().type === "open") return this.call(callee, at);
        return this.placeholders.leaf({ type: "name", name: token.name, at });
      }
      case "accent":
        return wrap(this.atom(), { type: "accent", accent: token.accent, more: 0, at });
      case "fraction":
        return this.fraction(token);
      case "root":
        return wrap(this.argument(), { type: "call", callee: "sqrt", more: 0, at });
      case "open": {
        const body = this.bracketed(token);
        return wrap(asArguments([body]), { type: "group", bracket: token.bracket, more: 0, at });
      }
      case "sign":
        if (token.sign === "|" && !this.insideBars) return this.modulus(token);
        return this.refuse("missing-operand", token);
      case "close":
      case "end":
      case "subscript":
      case "dagger":
        return this.refuse(
          token.type === "close" && this.depth === 1 ? "unbalanced-bracket" : "missing-operand",
          token,
        );
    }
  }

  /** Exact value of a literal, and in quantities "± uncertainty" right after it. */
  private number(token: Token & { type: "number" }): Atom {
    const value = exactLiteral(token.text);
    if (!value) return this.refuse("number-too-large", token);
    const { text, at } = token;
    const spread = this.peek(1);
    if (!this.options.quantities || !this.isSign(this.peek(), "±") || spread.type !== "number")
      return this.placeholders.leaf({ type: "number", value, text, at });
    const sigma = exactLiteral(spread.text);
    if (!sigma) return this.refuse("number-too-large", spread);
    this.take();
    this.take();
    return this.placeholders.leaf({
      type: "measured",
      value,
      sigma,
      text: `${text} \\pm ${spread.text}`,
      at,
    });
  }

  private measured(token: Token & { type: "measured" }): Atom {
    const literal = measuredLiteral(token.digits, token.uncertainty, token.exponent);
    if (!literal) return this.refuse("number-too-large", token);
    const text = this.text.slice(token.at, token.to);
    return this.placeholders.leaf({ type: "measured", ...literal, text, at: token.at });
  }

  private bracketed(open: Token & { type: "open" }): Written {
    if (this.peek().type === "close") return this.refuse("missing-operand", this.peek());
    const outer = this.insideBars;
    this.insideBars = false;
    const body = this.expression();
    this.insideBars = outer;
    const end = this.take();
    if (end.type !== "close" || end.bracket !== closing[open.bracket])
      return this.refuse("unbalanced-bracket", open);
    return body;
  }

  private modulus(open: Token): Atom {
    this.insideBars = true;
    const body = this.expression();
    this.insideBars = false;
    if (!this.isSign(this.take(), "|")) return this.refuse("unbalanced-bracket", open);
    return wrap(asArguments([body]), { type: "modulus", more: 0, at: open.at });
  }

  private call(callee: "sqrt" | "max" | "min", at: number): Atom {
    const open = this.take();
    const parts = [this.expression()];
    while (this.isSign(this.peek(), ",")) {
      this.take();
      parts.push(this.expression());
    }
    if (this.take().type !== "close") return this.refuse("unbalanced-bracket", open);
    return wrap(asArguments(parts), { type: "call", callee, more: parts.length - 1, at });
  }

  private fraction(token: Token): Atom {
    if (this.fractions >= DEEPEST) return this.refuse("nested-too-deep", token);
    this.fractions += 1;
    const over = this.placeholders.write(this.argument());
    const under = this.placeholders.write(this.argument());
    this.fractions -= 1;
    return wrap(asArguments([over, under]), { type: "quotient", more: 1, at: token.at });
  }

  /** A LaTeX argument: a brace, or one symbol, where "\frac12" is one half. */
  private argument(): Atom {
    const token = this.peek();
    if (token.type === "open" && token.bracket === "{") {
      this.take();
      return asArguments([this.bracketed(token)]);
    }
    if (token.type !== "number" || token.text.length === 1) return this.atom();
    const [digit = "", ...more] = token.text;
    if (!/^\d+$/.test(token.text)) return this.refuse("missing-operand", token);
    this.replace({ type: "number", text: more.join(""), at: token.at + 1, to: token.to });
    return this.placeholders.leaf({
      type: "number",
      value: Rational.of(BigInt(digit)),
      text: digit,
      at: token.at,
    });
  }
}
