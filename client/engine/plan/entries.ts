/** What an amplitude or a rate consists of: terms and their products, each with an order and a size. */
import { Rational } from "../exact/rational.ts";
import { sizeOf, type PlanTerm } from "./terms.ts";
import type { PlanEntry } from "./value.ts";

export interface Insertion {
  readonly term: PlanTerm;
  readonly count: number;
}

export interface Entry {
  readonly id: string;
  readonly order: Rational;
  readonly role: PlanEntry["role"];
  readonly insertions: readonly Insertion[];
  /** 2 for interference and cross terms of a rate, else 1. */
  readonly factor: 1 | 2;
  /** The two amplitudes a rate's entry is made of; the leading one is empty. */
  readonly sides: readonly (readonly Insertion[])[];
}

/** At the working point, relative to the leading amplitude or rate. */
export function sizeOfEntry(entry: Entry, Q: number): number {
  return entry.insertions.reduce<number>(
    (size, { term, count }) => size * sizeOf(term, Q) ** count,
    entry.factor,
  );
}

function idOf(insertions: readonly Insertion[]): string {
  return insertions.flatMap(({ term, count }) => Array.from({ length: count }, () => term.rowId)).join("*");
}

function single(insertions: readonly Insertion[], order: Rational): Entry {
  return {
    id: idOf(insertions),
    order,
    role: "insertion",
    insertions,
    factor: 1,
    sides: [insertions],
  };
}

interface Product {
  readonly insertions: readonly Insertion[];
  /** Σ count · order, kept along: most products are made by adding one term to a smaller one. */
  readonly order: Rational;
  /** The place of each factor among the suppressed terms. */
  readonly places: readonly number[];
}

/**
 * Corrections to an amplitude: every product of up to `most` suppressed terms whose order is within the cap.
 * Orders add: a product of insertions is of order Σ (Δ − d). Null when there are more than `limit`.
 */
export function corrections(
  terms: readonly PlanTerm[],
  most: number,
  cap: Rational,
  limit: number,
): Entry[] | null {
  const suppressed = terms.filter(({ order }) => order.sign() > 0);
  let products: Product[] = [{ insertions: [], order: Rational.zero, places: [] }];
  for (const [place, term] of suppressed.entries()) {
    const grown: Product[] = [];
    for (const product of products) {
      grown.push(product);
      let { order, places } = product;
      for (let count = 1; product.places.length + count <= most; count += 1) {
        order = order.plus(term.order);
        if (order.compare(cap) > 0) break;
        places = [...places, place];
        grown.push({ insertions: [...product.insertions, { term, count }], order, places });
      }
      if (grown.length > limit) return null;
    }
    products = grown;
  }
  return products
    .filter(({ places }) => places.length > 0)
    .sort((a, b) => inOrderOf(a.places, b.places))
    .map(({ insertions, order }) => single(insertions, order));
}

/** Fewer insertions first, then in the order of the premises. */
function inOrderOf(a: readonly number[], b: readonly number[]): number {
  const differing = a.findIndex((place, n) => place !== b[n]);
  return a.length - b.length || (a[differing] ?? 0) - (b[differing] ?? 0);
}

/** Terms of order 0: they come with the leading amplitude and are never what is left out. */
export function leading(terms: readonly PlanTerm[]): Entry[] {
  return terms
    .filter(({ order }) => order.sign() === 0)
    .map((term) => single([{ term, count: 1 }], term.order));
}

/**
 * |1 + Σ a|² expanded by total order: 2a for the interference with the leading amplitude (unless it vanishes), a² and
 * 2ab for the squares and cross terms. Null when there are more than `limit`.
 */
export function rateEntries(
  amplitude: readonly Entry[],
  interferes: boolean,
  cap: Rational,
  limit: number,
): Entry[] | null {
  const found: Entry[] = [];
  if (interferes) {
    for (const entry of amplitude)
      found.push({
        ...entry,
        id: `${entry.id}|`,
        role: "interference",
        factor: 2,
        sides: [[], entry.insertions],
      });
  }
  for (const [index, one] of amplitude.entries()) {
    for (const other of amplitude.slice(index)) {
      const order = one.order.plus(other.order);
      if (order.compare(cap) > 0) continue;
      found.push({
        id: `${one.id}|${other.id}`,
        order,
        role: "square",
        insertions: [...one.insertions, ...other.insertions],
        factor: one === other ? 1 : 2,
        sides: [one.insertions, other.insertions],
      });
      if (found.length > limit) return null;
    }
  }
  return found;
}

/** "(\mathcal{O})^{2}": the product, and for a rate the two amplitudes. */
export function entryLatex(entry: Entry): string {
  const product = (insertions: readonly Insertion[]) =>
    insertions.length === 0
      ? "1"
      : insertions
          .map(({ term, count }) =>
            count === 1 ? `\\left(${term.latex}\\right)` : `\\left(${term.latex}\\right)^{${count}}`,
          )
          .join("\\,");
  const [one = [], other = []] = entry.sides;
  if (entry.role === "insertion")
    return one.length === 1 && one[0]?.count === 1 ? one[0].term.latex : product(one);
  if (entry.role === "interference") return `2\\,\\mathrm{Re}\\;${product(other)}`;
  return entry.factor === 1
    ? `\\bigl|${product(one)}\\bigr|^2`
    : `2\\,\\mathrm{Re}\\;${product(one)}\\,\\bigl[${product(other)}\\bigr]^{*}`;
}
