/**
 * Singlets of SU(N) in a product of characters, each taken at a power of the group element:
 * ∫ dμ(g) Π χ_r(g^k). The Weyl numerator times characters is kept on strictly dominant weights only.
 */
import { Multisets } from "./multisets.ts";
import type { Representation } from "./representations.ts";

/** Cycles longer than this do not occur in any count that ends. */
export const LONGEST_CYCLE = 64;

type Dominant = ReadonlyMap<string, number>;

export class GaugeIntegral {
  readonly multisets: Multisets;
  readonly #values = new Map<number, number>();
  readonly #products = new Map<number, Dominant>();
  readonly #start: string;

  /** @param representations those that occur, conjugates included */
  constructor(
    private readonly n: number,
    private readonly representations: readonly Representation[],
  ) {
    this.multisets = new Multisets(representations.length * LONGEST_CYCLE);
    const rho = Array.from({ length: n }, (_, index) => n - 1 - index);
    this.#start = rho.join(",");
    this.#products.set(this.multisets.empty, new Map([[this.#start, 1]]));
  }

  /** The element of a multiset that stands for a representation at the k-th power. */
  element(representation: number, k: number): number {
    return representation * LONGEST_CYCLE + k;
  }

  /** Exact: an integer, below 2⁵³ for every product that a count can reach. */
  value(multiset: number): number {
    const known = this.#values.get(multiset);
    if (known !== undefined) return known;
    const value = this.#product(multiset).get(this.#start) ?? 0;
    this.#values.set(multiset, value);
    return value;
  }

  #product(multiset: number): Dominant {
    const known = this.#products.get(multiset);
    if (known) return known;
    const elements = this.multisets.elementsOf(multiset);
    // The product without its last factor is shared by many.
    let before = this.multisets.empty;
    for (const element of elements.slice(0, -1)) before = this.multisets.add(before, element);
    const last = elements.at(-1) ?? 0;
    const representation = this.representations[Math.floor(last / LONGEST_CYCLE)];
    const product = representation
      ? multiply(this.#product(before), representation, last % LONGEST_CYCLE, this.n)
      : new Map<string, number>();
    this.#products.set(multiset, product);
    return product;
  }
}

function multiply(product: Dominant, { weights }: Representation, k: number, n: number): Dominant {
  const result = new Map<string, number>();
  for (const [text, coefficient] of product) {
    const start = text.split(",").map(Number);
    for (const { entries, multiplicity } of weights) {
      const sum = start.map((entry, index) => entry + k * (entries[index] ?? 0));
      const sign = sortWithSign(sum);
      if (sign === 0) continue;
      const last = sum[n - 1] ?? 0;
      const key = sum.map((entry) => entry - last).join(",");
      result.set(key, (result.get(key) ?? 0) + sign * multiplicity * coefficient);
    }
  }
  for (const [key, coefficient] of result) if (coefficient === 0) result.delete(key);
  return result;
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
