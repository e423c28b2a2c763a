/** Which legs can be left over at all, whatever the number of insertions. */
import { netOf, type HalfEdges } from "../divergence/half-edges.ts";
import type { Theory } from "../premises/theory.ts";

/**
 * Internal lines take two legs of a real field each, and a leg and its conjugate of another. So the external legs, as
 * numbers of real fields modulo 2 and surpluses over conjugates, are a sum of the insertions': they lie in the lattice
 * that these span. That finds symmetries which nobody declared, such as the number of a fermion. (Own derivation.)
 *
 * @example legs φ³ with φ⁴ vertices alone are not in the lattice; nor are ψψ with ψ̄ψφ
 */
export class ReachableLegs {
  /** Rows in echelon form: the first entry that is not zero of row c is at c. */
  readonly #rows: (number[] | undefined)[] = [];

  constructor(
    private readonly theory: Theory,
    insertions: readonly { readonly edges: HalfEdges }[],
  ) {
    for (const [f, { selfConjugate }] of theory.fields.entries())
      if (selfConjugate) this.#add(theory.fields.map((_, g) => (g === f ? 2 : 0)));
    for (const { edges } of insertions) this.#add(this.#vector(edges));
  }

  has(legs: HalfEdges): boolean {
    let rest = this.#vector(legs);
    for (const [c, value] of rest.entries()) {
      const left = rest[c] ?? value;
      if (left === 0) continue;
      const row = this.#rows[c];
      if (!row || left % (row[c] ?? 1) !== 0) return false;
      rest = minus(rest, row, left / (row[c] ?? 1));
    }
    return true;
  }

  #vector(edges: HalfEdges): number[] {
    const net = netOf(edges, this.theory);
    return this.theory.fields.map(({ selfConjugate }, f) =>
      selfConjugate ? (edges.plain[f] ?? 0) : (net[f] ?? 0),
    );
  }

  /** Euclid's algorithm between the vector and the row of each place. */
  #add(vector: readonly number[]): void {
    let left = [...vector];
    for (let c = 0; c < left.length; c += 1) {
      let row = this.#rows[c];
      while (left[c] !== 0) {
        if (!row) {
          this.#rows[c] = left;
          return;
        }
        const quotient = Math.trunc((row[c] ?? 0) / (left[c] ?? 1));
        [row, left] = [left, minus(row, left, quotient)];
        this.#rows[c] = row;
      }
    }
  }
}

function minus(a: readonly number[], b: readonly number[], times: number): number[] {
  return a.map((value, c) => value - times * (b[c] ?? 0));
}
