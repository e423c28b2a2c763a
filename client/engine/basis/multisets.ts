/**
 * Multisets of small integers, numbered. The same elements in any order are the same number, and adding one element is
 * one look-up once it has been done before: integrals are remembered by these numbers.
 */

export class Multisets {
  readonly #elements: (readonly number[])[] = [[]];
  readonly #numbers = new Map<string, number>([["", 0]]);
  readonly #added = new Map<number, number>();
  readonly #unions = new Map<number, number>();

  /** Number of the empty multiset. */
  readonly empty = 0;

  /** @param most every element is below this */
  constructor(private readonly most: number) {}

  add(multiset: number, element: number): number {
    const step = multiset * this.most + element;
    const known = this.#added.get(step);
    if (known !== undefined) return known;
    const elements = [...this.elementsOf(multiset), element].sort((a, b) => a - b);
    const text = elements.join(",");
    let number = this.#numbers.get(text);
    if (number === undefined) {
      number = this.#elements.length;
      this.#elements.push(elements);
      this.#numbers.set(text, number);
    }
    this.#added.set(step, number);
    return number;
  }

  /** Both together. */
  union(first: number, second: number): number {
    if (first === this.empty) return second;
    if (second === this.empty) return first;
    const key = first * 2 ** 26 + second;
    const known = this.#unions.get(key);
    if (known !== undefined) return known;
    const number = this.elementsOf(second).reduce((sum, element) => this.add(sum, element), first);
    this.#unions.set(key, number);
    return number;
  }

  /** In rising order. */
  elementsOf(multiset: number): readonly number[] {
    return this.#elements[multiset] ?? [];
  }
}
