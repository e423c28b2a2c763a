/** Reads exact dimensions: "(d-4)/2", "3/2*d - 3", "(D - z)/2", "(d-2)/2 + 1/40". */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import { constantOf, digitsOf, MOST_DIGITS } from "./constant.ts";
import { failed, FirstFailure, read, type NotationFailure, type Read } from "./failure.ts";
import { canonicalName, nearestSymbol } from "./names.ts";
import { parse } from "./parse.ts";
import type { Tree } from "./tree.ts";

/**
 * `symbols` says what names stand for: a dimension symbol, its number, or an exact constant such as an anomalous
 * dimension. Fails with those of `parse`, and `empty-text`, `unknown-symbol`, `not-linear`, `division-by-zero`, `number-too-large`,
 * `exponent-not-a-number`, `misplaced-mark`; all with `offset`.
 * @example readLinearForm("(d-4)/2", new Map([["d", LinearForm.symbol("d")]])) // 1/2*d - 2
 */
export function readLinearForm(text: string, symbols: ReadonlyMap<string, LinearForm>): Read<LinearForm> {
  if (text.trim() === "") return failed("empty-text", { text, offset: 0 });
  const tree = parse(text, { quantities: false });
  if (!tree.ok) return tree;
  const reader = new FormReader(symbols);
  const form = reader.read(tree.value);
  const failure: NotationFailure | null = reader.trouble.failure;
  return failure ? { ok: false, failure } : read(form);
}

class FormReader {
  readonly trouble = new FirstFailure();

  constructor(private readonly symbols: ReadonlyMap<string, LinearForm>) {}

  private fail(code: string, at: number, facts: NotationFailure["facts"] = {}): LinearForm {
    this.trouble.note(code, { offset: at, ...facts });
    return LinearForm.zero;
  }

  read(tree: Tree): LinearForm {
    const constant = constantOf(tree);
    if (constant) return LinearForm.constant(constant);
    switch (tree.type) {
      case "group":
        return this.read(tree.body);
      case "name": {
        const symbol = canonicalName(tree.name);
        const suggestion = nearestSymbol(symbol, [...this.symbols.keys()]);
        const facts = { symbol, ...(suggestion === null ? {} : { suggestion }) };
        return this.symbols.get(symbol) ?? this.fail("unknown-symbol", tree.at, facts);
      }
      case "sum": {
        const total = (sum: LinearForm, { sign, node }: (typeof tree.parts)[number]) =>
          sign === "-" ? sum.minus(this.read(node)) : sum.plus(this.read(node));
        return tree.parts.reduce(total, LinearForm.zero);
      }
      case "quotient":
        return this.divide(this.read(tree.over), tree.under);
      case "product": {
        let result = LinearForm.constant(1);
        for (const { join, node } of tree.factors)
          result = join === "/" ? this.divide(result, node) : this.multiply(result, this.read(node), node.at);
        return result;
      }
      case "power": {
        // Only the first power of a symbol is linear; numbers to a power were constants above.
        const exponent = constantOf(tree.exponent);
        if (!exponent) return this.fail("exponent-not-a-number", tree.exponent.at);
        return exponent.equals(Rational.one) ? this.read(tree.base) : this.fail("not-linear", tree.at);
      }
      case "number":
      case "factorial":
        return this.fail("division-by-zero", tree.at);
      case "measured":
      case "accent":
      case "conjugate":
      case "modulus":
      case "call":
        return this.fail("misplaced-mark", tree.at, { text: tree.type });
    }
  }

  private multiply(a: LinearForm, b: LinearForm, at: number): LinearForm {
    if (isLong(a) || isLong(b)) return this.fail("number-too-large", at);
    const left = a.asRational();
    const right = b.asRational();
    if (left) return b.times(left);
    return right ? a.times(right) : this.fail("not-linear", at);
  }
  private divide(a: LinearForm, tree: Tree): LinearForm {
    const under = this.read(tree).asRational();
    if (!under) return this.fail("not-linear", tree.at);
    if (isLong(a)) return this.fail("number-too-large", tree.at);
    return under.sign() === 0 ? this.fail("division-by-zero", tree.at) : a.times(Rational.one.over(under));
  }
}

function isLong(form: LinearForm): boolean {
  const parts = [form.constant, ...form.freeSymbols().map((symbol) => form.slope(symbol))];
  return parts.some((part) => digitsOf(part) > MOST_DIGITS);
}
