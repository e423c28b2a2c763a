/** Reads values and expressions in scales: "3.2(4) TeV", "1/(16 pi^2)", "m^2/p^2", "max(p, m)/Lambda". */
import { Rational } from "../exact/rational.ts";
import { constantOf } from "./constant.ts";
import { failed, FirstFailure, read, type NotationFailure, type Read } from "./failure.ts";
import { canonicalName, nearestSymbol, type Name } from "./names.ts";
import { parse } from "./parse.ts";
import { blur, float, measured, number, oneOf, plus, power, times, type Quantity } from "./quantity.ts";
import type { Tree } from "./tree.ts";
import { typeset } from "./typeset.ts";

/** What names stand for: a quantity, or why there is none; null when nothing of that name is declared. */
export interface Declared {
  lookUp(symbol: string): Quantity | NotationFailure | null;
  readonly symbols: readonly string[];
}

export interface QuantityReading {
  readonly quantity: Quantity;
  readonly latex: string;
}

/**
 * Evaluates an expression. `source` names the place of the text, so that each measured literal in it is an
 * independent source of uncertainty of its own.
 *
 * Fails with those of `parse`, and `empty-text`, `unknown-symbol` (with `suggestion`), `units-differ`,
 * `division-by-zero`, `root-of-negative`, `number-too-large`, `exponent-not-a-number`, `misplaced-mark`,
 * and whatever `lookUp` says; all with `offset`.
 * @example readQuantity("3.2(4) TeV", nothing, "r1") // value 3200, spread {"r1@0": 400}, in GeV
 */
export function readQuantity(text: string, declared: Declared, source: string): Read<QuantityReading> {
  if (text.trim() === "") return failed("empty-text", { text, offset: 0 });
  const tree = parse(text, { quantities: true });
  if (!tree.ok) return tree;
  return new QuantityReader(declared, source).whole(tree.value);
}

const nought = number(Rational.one);

class QuantityReader {
  private readonly trouble = new FirstFailure();

  constructor(
    private readonly declared: Declared,
    private readonly source: string,
  ) {}

  whole(tree: Tree): Read<QuantityReading> {
    const quantity = this.read(tree);
    if (!Number.isFinite(quantity.value)) this.trouble.note("number-too-large", { offset: tree.at });
    const failure: NotationFailure | null = this.trouble.failure;
    return failure ? { ok: false, failure } : read({ quantity, latex: typeset(tree) });
  }

  private fail(code: string, at: number, facts: NotationFailure["facts"] = {}): Quantity {
    this.trouble.note(code, { offset: at, ...facts });
    return nought;
  }
  private settle(result: Quantity | NotationFailure, at: number): Quantity {
    return "code" in result ? this.fail(result.code, at, result.facts) : result;
  }

  private read(tree: Tree): Quantity {
    if (this.trouble.failure) return nought;
    switch (tree.type) {
      case "number":
        return number(tree.value);
      case "measured":
        return measured(tree.value, tree.sigma, `${this.source}@${tree.at}`);
      case "name":
        return this.name(tree.name, tree.at);
      case "accent":
        return this.accented(tree);
      case "group":
        return this.read(tree.body);
      case "quotient":
        return this.divide(this.read(tree.over), tree.under);
      case "factorial": {
        const value = constantOf(tree);
        return value ? number(value) : this.fail("number-too-large", tree.at);
      }
      case "power": {
        const exponent = constantOf(tree.exponent);
        if (!exponent) return this.fail("exponent-not-a-number", tree.exponent.at);
        return this.settle(power(this.read(tree.base), exponent), tree.at);
      }
      case "product": {
        let result = number(Rational.one);
        for (const { join, node } of tree.factors)
          result = join === "/" ? this.divide(result, node) : times(result, this.read(node));
        return result;
      }
      case "sum":
        return this.sum(tree);
      case "modulus": {
        const inside = this.read(tree.body);
        return inside.value < 0 ? times(number(Rational.of(-1)), inside) : inside;
      }
      case "call":
        return this.call(tree);
      case "conjugate":
        return this.fail("misplaced-mark", tree.at, { text: "†" });
    }
  }

  private divide(over: Quantity, tree: Tree): Quantity {
    return times(over, this.settle(power(this.read(tree), Rational.of(-1)), tree.at));
  }

  private sum(tree: Tree & { type: "sum" }): Quantity {
    let total: Quantity | null = null;
    for (const { sign, at, node } of tree.parts) {
      const value = this.read(node);
      if (!total) total = sign === "-" ? times(number(Rational.of(-1)), value) : value;
      else if (sign === "±") total = this.settle(blur(total, value, `${this.source}@${at}`), at);
      else total = this.settle(plus(total, value, sign === "-" ? -1 : 1), at);
    }
    return total ?? nought;
  }

  private call(tree: Tree & { type: "call" }): Quantity {
    const [first = nought, ...others] = tree.parts.map((part) => this.read(part));
    if (tree.callee === "sqrt") {
      return others.length > 0
        ? this.fail("misplaced-mark", tree.at, { text: "," })
        : this.settle(power(first, Rational.of(1, 2)), tree.at);
    }
    return others.reduce((best, next) => {
      const difference = this.settle(plus(next, best, -1), tree.at);
      return (tree.callee === "max" ? difference.value > 0 : difference.value < 0) ? next : best;
    }, first);
  }

  private accented(tree: Tree & { type: "accent" }): Quantity {
    const { accent, body } = tree;
    if (accent === "plain" || accent === "space") return this.read(body);
    const inside = body.type === "group" ? body.body : body;
    if (inside.type !== "name") return this.fail("misplaced-accent", tree.at);
    return this.name({ ...inside.name, base: inside.name.base + accent }, tree.at);
  }

  private name(name: Name, at: number): Quantity {
    const symbol = canonicalName(name);
    const found = this.declared.lookUp(symbol);
    if (found) return this.settle(found, at);
    if (symbol === "pi") return float(Math.PI);
    const unit = oneOf(symbol);
    if (unit) return unit;
    const suggestion = nearestSymbol(symbol, this.declared.symbols);
    return this.fail("unknown-symbol", at, { symbol, ...(suggestion === null ? {} : { suggestion }) });
  }
}
