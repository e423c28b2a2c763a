/** Reads one typed term of a Lagrangian into a monomial. */
import { Rational } from "../exact/rational.ts";
import { constantOf } from "./constant.ts";
import { failed, FirstFailure, read, type NotationFailure, type Read } from "./failure.ts";
import type { Monomial } from "./monomial.ts";
import { hasCommand } from "./letters.ts";
import { canonicalName, type Name } from "./names.ts";
import { couplingsLikeDerivatives } from "./leading-coupling.ts";
import { parse } from "./parse.ts";
import { withoutEnding } from "./term-ending.ts";
import { isIndices, nameInside } from "./tree-shape.ts";
import {
  conjugate,
  hasLegs,
  multiply,
  raise,
  toMonomial,
  unit,
  type Reading,
  type Refusal,
} from "./reading.ts";
import type { Accent } from "./tokens.ts";
import type { Tree } from "./tree.ts";
import { typeset } from "./typeset.ts";
import {
  areRaisedIndices,
  isIndex,
  meaningOf,
  suggestionFor,
  type Direction,
  type Meaning,
  type Vocabulary,
} from "./vocabulary.ts";

export interface TermReading {
  readonly monomial: Monomial;
  /** The term typeset as it is understood, in the order it was typed. */
  readonly latex: string;
}

/** A name before a bracket is a factor, but nobody calls a coupling by one of these. */
const functionNames = /^(?:sin|cos|tan|sinh|cosh|tanh|exp|log|ln)$/;

/**
 * Reads a term such as `lambda/4! phi^4`, `\frac{c}{\Lambda^2} (\partial\phi)^2 \phi^2` or `y (psibar psi) phi`.
 * Couplings may be any symbol, but only before the first field or derivative; declared scales, numbers, i and pi anywhere.
 *
 * Fails as a value with `offset` (UTF-16 units) and `text` or `symbol` in its facts: the failures of `parse`, and
 * `empty-term`, `sum-in-term`, `function-in-term`, `unknown-symbol` (with `suggestion`), `no-field`, `field-in-error`,
 * `negative-field-power`, `fractional-field-power`, `field-power-too-large`, `power-too-large`, `number-too-large`,
 * `exponent-not-a-number`, `division-by-zero`, `root-of-negative`, `odd-modulus-power`, `direction-needed`, `bad-index`,
 * `misplaced-accent`, `zero-term`.
 * @example readTerm("g/2 phi^2 chi", vocabulary) // prefactor 1/2, coefficients g, fields phi² chi
 */
export function readTerm(text: string, vocabulary: Vocabulary): Read<TermReading> {
  const { body, hasConjugate } = withoutEnding(text);
  if (body.trim() === "") return failed("empty-term", { text, offset: 0 });
  const tree = parse(body, { quantities: false });
  if (!tree.ok) return tree;
  const reading = new TermReader(vocabulary).whole(tree.value);
  if (!reading.ok || !hasConjugate) return reading;
  return read({ ...reading.value, latex: `${reading.value.latex} + \\text{h.c.}` });
}

class TermReader {
  private readonly trouble = new FirstFailure();
  /** True once a field or derivative was read: from there on only declared symbols may stand. */
  private opened = false;
  /** D_0 and the like, where they are couplings. */
  private couplings: ReadonlySet<string> = new Set();
  private unknown: { readonly symbol: string; readonly at: number } | null = null;

  constructor(private readonly vocabulary: Vocabulary) {}

  whole(tree: Tree): Read<TermReading> {
    this.couplings = couplingsLikeDerivatives(tree, this.vocabulary);
    const reading = this.read(tree);
    if (!this.trouble.failure && reading.prefactor.sign() === 0)
      this.trouble.note("zero-term", { offset: tree.at });
    if (!this.trouble.failure && reading.fields.size === 0) {
      const { symbol, at } = this.unknown ?? { symbol: "", at: tree.at };
      this.trouble.note("no-field", { symbol, offset: at, ...this.suggestion(symbol) });
    }
    const failure: NotationFailure | null = this.trouble.failure;
    if (failure) return { ok: false, failure };
    return read({ monomial: toMonomial(reading), latex: typeset(tree, this.vocabulary) });
  }

  private fail(code: string, at: number, facts: NotationFailure["facts"] = {}): Reading {
    this.trouble.note(code, { offset: at, ...facts });
    return unit;
  }
  private settle(result: Reading | Refusal, at: number): Reading {
    return "code" in result ? this.fail(result.code, at, result.facts) : result;
  }
  private suggestion(symbol: string): NotationFailure["facts"] {
    const suggestion = suggestionFor(symbol, this.vocabulary);
    return suggestion === null ? {} : { suggestion };
  }
  private selfConjugate = (symbol: string): boolean =>
    this.vocabulary.fields.get(symbol)?.selfConjugate ?? false;

  private read(tree: Tree): Reading {
    if (this.trouble.failure) return unit;
    switch (tree.type) {
      case "number":
        return { ...unit, prefactor: tree.value };
      case "name":
        return this.name(tree.name, [], tree.at);
      case "group":
        return this.read(tree.body);
      case "accent":
        return this.accented(tree.accent, tree.body, [], tree.at);
      case "quotient":
        return this.divide(this.read(tree.over), tree.under);
      case "product":
        return this.product(tree);
      case "sum":
        return this.sum(tree);
      case "power":
        return this.power(tree.base, tree.exponent, tree.at);
      case "conjugate":
        return conjugate(this.read(tree.body), this.selfConjugate);
      case "factorial": {
        const value = constantOf(tree);
        return value ? { ...unit, prefactor: value } : this.fail("number-too-large", tree.at);
      }
      case "modulus": {
        const inside = this.read(tree.body);
        return hasLegs(inside) ? this.fail("odd-modulus-power", tree.at) : inside;
      }
      case "call": {
        const [argument] = tree.parts;
        if (tree.callee !== "sqrt" || !argument || tree.parts.length > 1)
          return this.fail("function-in-term", tree.at, { text: tree.callee });
        return this.settle(raise(this.read(argument), Rational.of(1, 2)), tree.at);
      }
      case "measured":
        // The parser makes these only for quantities, never for terms.
        return this.fail("misplaced-mark", tree.at, { text: tree.text });
    }
  }

  private sum(tree: Tree & { type: "sum" }): Reading {
    const [first, second] = tree.parts;
    if (first && !second)
      return this.settle(
        multiply(this.read(first.node), { ...unit, prefactor: Rational.of(first.sign === "-" ? -1 : 1) }),
        tree.at,
      );
    const value = constantOf(tree);
    return value
      ? { ...unit, prefactor: value }
      : this.fail("sum-in-term", second?.at ?? tree.at, { text: second?.sign ?? "+" });
  }

  private product(tree: Tree & { type: "product" }): Reading {
    let result = unit;
    tree.factors.forEach((factor, index) => {
      const next = tree.factors[index + 1];
      if (next?.join === "." && this.isContracted(factor.node, next.node)) return;
      result =
        factor.join === "/"
          ? this.divide(result, factor.node)
          : this.settle(multiply(result, this.read(factor.node)), factor.node.at);
    });
    return result;
  }

  /** The velocity of v·D and the matrices of σ·B: dimensionless, when nothing declared bears the name. */
  private isContracted(tree: Tree, partner: Tree): boolean {
    const name = nameInside(tree);
    if (!name || this.meaning(name, []).means !== "coefficient") return false;
    const symbol = canonicalName(name);
    if (this.vocabulary.scales.has(symbol)) return false;
    if (symbol === "sigma" || symbol === "gamma" || symbol === "tau") return this.opened;
    const other = nameInside(partner);
    if (symbol !== "v" || !other) return false;
    // Before the fields v·φ³ has a coupling; among them, as in h̄ v·A h, only a velocity can stand.
    const { means } = this.meaning(other, []);
    return means === "derivative" || (means === "field" && this.opened);
  }

  private divide(over: Reading, tree: Tree): Reading {
    const under = this.read(tree);
    return this.settle(multiply(over, this.settle(raise(under, Rational.of(-1)), tree.at)), tree.at);
  }

  private power(base: Tree, exponent: Tree, at: number): Reading {
    const value = constantOf(exponent);
    if (!value) {
      const raised = isIndices(exponent) ? indicesOf(exponent) : [];
      const name = nameInside(base);
      if (name && areRaisedIndices(raised)) return this.indexed(base, name, raised, exponent.at);
      return this.fail("exponent-not-a-number", exponent.at);
    }
    if (this.isMatrix(base, value)) return unit;
    if (base.type !== "modulus") return this.settle(raise(this.read(base), value), at);
    const inside = this.read(base.body);
    if (!hasLegs(inside)) return this.settle(raise(inside, value), at);
    const pairs = value.times(Rational.of(1, 2));
    if (!pairs.isInteger()) return this.fail("odd-modulus-power", at);
    return this.settle(
      raise(this.settle(multiply(conjugate(inside, this.selfConjugate), inside), at), pairs),
      at,
    );
  }

  /** \gamma^5 and \gamma^0 between fields, where no coupling can stand. */
  private isMatrix(base: Tree, exponent: Rational): boolean {
    const name = nameInside(base);
    if (!this.opened || !name || canonicalName(name) !== "gamma") return false;
    const meaning = this.meaning(name, []);
    return meaning.means === "coefficient" && !meaning.declared && /^[05]$/.test(exponent.toString());
  }

  private indexed(base: Tree, name: Name, raised: readonly string[], exponentAt: number): Reading {
    const reading =
      base.type === "accent"
        ? this.accented(base.accent, base.body, raised, base.at)
        : this.name(name, raised, base.at);
    const bare = this.meaning(name, raised).means === "coefficient" && !hasLegs(reading);
    return bare ? this.fail("exponent-not-a-number", exponentAt) : reading;
  }

  private accented(accent: Accent, body: Tree, raised: readonly string[], at: number): Reading {
    const name = nameInside(body);
    if (accent === "plain") return name ? this.name(name, raised, at) : this.read(body);
    if (!name) return this.fail("misplaced-accent", at);
    if (accent === "slash" || accent === "space")
      return this.name(name, raised, at, accent === "slash" ? "spacetime" : "space");
    if (accent === "dot" || accent === "ddot") {
      const derivative = this.derivative(accent === "dot" ? 1 : 2, "time", at, accent);
      return this.settle(multiply(derivative, this.name(name, raised, at)), at);
    }
    return this.name({ ...name, base: name.base + accent }, raised, at);
  }

  private meaning(name: Name, raised: readonly string[]): Meaning {
    const symbol = canonicalName(name);
    if (!this.opened && this.couplings.has(symbol)) return { means: "coefficient", symbol, declared: false };
    return meaningOf(name, raised, this.vocabulary);
  }

  private name(name: Name, raised: readonly string[], at: number, direction?: Direction): Reading {
    const meaning = this.meaning(name, raised);
    switch (meaning.means) {
      case "field": {
        if (this.vocabulary.fields.get(meaning.symbol)?.inError)
          return this.fail("field-in-error", at, { symbol: meaning.symbol });
        const derivative =
          meaning.derivatives > 0
            ? this.derivative(meaning.derivatives, direction ?? "unsaid", at, canonicalName(name))
            : unit;
        this.opened = true;
        const legs = meaning.conjugated ? { straight: 0, conjugated: 1 } : { straight: 1, conjugated: 0 };
        return this.settle(multiply(derivative, { ...unit, fields: new Map([[meaning.symbol, legs]]) }), at);
      }
      case "derivative":
        return this.derivative(
          meaning.count,
          meaning.direction === "unsaid" ? (direction ?? "unsaid") : meaning.direction,
          at,
          canonicalName(name),
        );
      case "imaginary unit":
        return { ...unit, phase: 1 };
      case "structure":
        return unit;
      case "bad index":
        return this.fail("bad-index", at, { text: meaning.text });
      case "coefficient": {
        const { symbol } = meaning;
        if (!meaning.declared) {
          if (functionNames.test(symbol)) return this.fail("function-in-term", at, { text: symbol });
          if (this.opened) return this.fail("unknown-symbol", at, { symbol, ...this.suggestion(symbol) });
          this.unknown = { symbol, at };
        }
        return { ...unit, coefficients: new Map([[symbol, Rational.one]]) };
      }
    }
  }

  private derivative(count: number, direction: Direction, at: number, text: string): Reading {
    this.opened = true;
    if (this.vocabulary.geometry === "isotropic") return { ...unit, derivatives: count };
    if (direction === "time") return { ...unit, timeDerivatives: count };
    if (direction === "space") return { ...unit, derivatives: count };
    return this.fail("direction-needed", at, { text });
  }
}

function indicesOf(tree: Tree): string[] {
  if (tree.type === "group") return indicesOf(tree.body);
  if (tree.type === "product") return tree.factors.flatMap((factor) => indicesOf(factor.node));
  if (tree.type !== "name") return [];
  const symbol = canonicalName(tree.name);
  // "^{abc}" are three indices, "^{mu nu}" two.
  return isIndex(symbol) || hasCommand(symbol) || !/^[A-Za-z]+$/.test(symbol) ? [symbol] : Array.from(symbol);
}
