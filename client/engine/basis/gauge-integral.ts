/**
 * Singlets of SU(N) in a product of characters, each taken at a power of the group element:
 * ∫ dμ(g) Π χ_r(g^k). The Weyl numerator times characters is kept on strictly dominant weights only.
 */
import { Multisets } from "./multisets.ts";
import type { Representation } from "./representations.ts";

/** Cycles longer than this do not occur in any count that ends. */
export const LONGEST_CYCLE = 64;

/** Decreasing weights as text, with how often each occurs. */
type Dominant<Coefficient> = ReadonlyMap<string, Coefficient>;

export class GaugeIntegral {
  readonly multisets: Multisets;
  readonly #values = new Map<number, number>();
  readonly #products = new Map<number, Dominant<number> | null>();
  readonly #exactProducts = new Map<number, Dominant<bigint>>();
  readonly #start: string;

  /**
   * @param representations those that occur
   * @param exactBelow what certifies a float
   */
  constructor(
    private readonly n: number,
    private readonly representations: readonly Representation[],
    private readonly exactBelow = 2 ** 53,
  ) {
    this.multisets = new Multisets(representations.length * LONGEST_CYCLE);
    this.#start = Array.from({ length: n }, (_, index) => n - 1 - index).join(",");
  }

  /** The element of a multiset that stands for a representation at the k-th power. */
  element(representation: number, k: number): number {
    return representation * LONGEST_CYCLE + k;
  }

  /** An integer; NaN when what was added up on the way does not certify it: then ask for the exact value. */
  value(multiset: number): number {
    const known = this.#values.get(multiset);
    if (known !== undefined) return known;
    const [left, right] = this.#halves(multiset).map((half) => this.#product(half));
    let value = left && right ? 0 : NaN;
    let size = 0;
    for (const [weight, coefficient] of left ?? []) {
      const term = coefficient * (right?.get(conjugateWeight(weight)) ?? 0);
      value += term;
      size += Math.abs(term);
    }
    if (size >= this.exactBelow) value = NaN;
    this.#values.set(multiset, value);
    return value;
  }

  /** The same in big integers throughout. */
  exactValue(multiset: number): bigint {
    const [left, right] = this.#halves(multiset).map((half) => this.#exactProduct(half));
    let value = 0n;
    for (const [weight, coefficient] of left ?? [])
      value += coefficient * (right?.get(conjugateWeight(weight)) ?? 0n);
    return value;
  }

  /** A singlet of a product is a representation in one half that is conjugate to one in the other. */
  #halves(multiset: number): readonly number[] {
    const elements = this.multisets.elementsOf(multiset);
    const middle = Math.ceil(elements.length / 2);
    return [elements.slice(0, middle), elements.slice(middle)].map((half) =>
      half.reduce((sum, element) => this.multisets.add(sum, element), this.multisets.empty),
    );
  }

  /** The product without its last factor, which many share, and that factor; null for the empty one. */
  #lastFactor(multiset: number) {
    const elements = this.multisets.elementsOf(multiset);
    const last = elements.at(-1);
    if (last === undefined) return null;
    const representation = this.representations[Math.floor(last / LONGEST_CYCLE)];
    if (!representation) throw new Error(`no representation for ${last}`);
    const before = elements
      .slice(0, -1)
      .reduce((sum, element) => this.multisets.add(sum, element), this.multisets.empty);
    return { before, representation, k: last % LONGEST_CYCLE };
  }

  #product(multiset: number): Dominant<number> | null {
    const known = this.#products.get(multiset);
    if (known !== undefined) return known;
    const factor = this.#lastFactor(multiset);
    const before = factor && this.#product(factor.before);
    let product: Map<string, number> | null = null;
    if (!factor) product = new Map([[this.#start, 1]]);
    else if (before) {
      let size = 0;
      for (const coefficient of before.values()) size += Math.abs(coefficient);
      if (size * factor.representation.dimension < this.exactBelow) {
        product = new Map();
        for (const { key, from, times } of this.#steps(before.keys(), factor.representation, factor.k))
          product.set(key, (product.get(key) ?? 0) + times * (before.get(from) ?? 0));
        for (const [key, coefficient] of product) if (coefficient === 0) product.delete(key);
      }
    }
    this.#products.set(multiset, product);
    return product;
  }

  #exactProduct(multiset: number): Dominant<bigint> {
    const known = this.#exactProducts.get(multiset);
    if (known) return known;
    const factor = this.#lastFactor(multiset);
    const product = new Map<string, bigint>(factor ? [] : [[this.#start, 1n]]);
    if (factor) {
      const before = this.#exactProduct(factor.before);
      for (const { key, from, times } of this.#steps(before.keys(), factor.representation, factor.k))
        product.set(key, (product.get(key) ?? 0n) + BigInt(times) * (before.get(from) ?? 0n));
    }
    this.#exactProducts.set(multiset, product);
    return product;
  }

  /** Where each weight goes under a character at the k-th power, and with which sign and multiplicity. */
  *#steps(from: Iterable<string>, { weights }: Representation, k: number) {
    const { n } = this;
    for (const text of from) {
      const start = text.split(",").map(Number);
      for (const { entries, multiplicity } of weights) {
        const sum = start.map((entry, index) => entry + k * (entries[index] ?? 0));
        const sign = sortWithSign(sum);
        if (sign === 0) continue;
        const last = sum[n - 1] ?? 0;
        yield { key: sum.map((entry) => entry - last).join(","), from: text, times: sign * multiplicity };
      }
    }
  }
}

/** Of the conjugate representation. */
function conjugateWeight(weight: string): string {
  const entries = weight.split(",").map(Number);
  const first = entries[0] ?? 0;
  return entries
    .reverse()
    .map((entry) => first - entry)
    .join(",");
}

/** Sorts in place, largest first; the sign of the permutation, or 0 when two entries are equal. */
function sortWithSign(entries: number[]): -1 | 0 | 1 {
  let sign: -1 | 1 = 1;
  for (let i = 1; i < entries.length; i++) {
    for (let j = i; j > 0; j--) {
      const [left, right] = [entries[j - 1] ?? 0, entries[j] ?? 0];
      if (left === right) return 0;
      if (left > right) break;
      entries[j - 1] = right;
      entries[j] = left;
      sign = sign === 1 ? -1 : 1;
    }
  }
  return sign;
}
