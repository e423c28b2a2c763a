/**
 * Invariants of O(N) in a product of traces of powers of its vector: ∫ dμ Π_j tr(g^{μ_j}) is the sum over diagrams λ of
 * |μ| boxes whose rows are all even and at most N, of the character χ_λ(μ) of the symmetric group (Rains 1998).
 */
import { LONGEST_CYCLE } from "./gauge-integral.ts";
import { Multisets } from "./multisets.ts";

export class OrthogonalIntegral {
  readonly multisets = new Multisets(LONGEST_CYCLE);
  readonly #values = new Map<number, number>();

  constructor(private readonly n: number) {}

  value(multiset: number): number {
    const known = this.#values.get(multiset);
    if (known !== undefined) return known;
    const cycles = [...this.multisets.elementsOf(multiset)].reverse();
    const boxes = cycles.reduce((a, b) => a + b, 0);
    let value = 0;
    for (const half of boxes % 2 === 0 ? diagramsOf(boxes / 2, this.n, boxes) : [])
      value += symmetricCharacter(
        half.map((row) => 2 * row),
        cycles,
      );
    this.#values.set(multiset, value);
    return value;
  }
}

function diagramsOf(boxes: number, rows: number, widest: number): number[][] {
  if (boxes === 0) return [[]];
  if (rows === 0) return [];
  const found: number[][] = [];
  for (let first = Math.min(boxes, widest); first >= 1; first--)
    for (const rest of diagramsOf(boxes - first, rows - 1, first)) found.push([first, ...rest]);
  return found;
}

/**
 * Character of the symmetric group by removing border strips (Murnaghan 1937, Nakayama 1940).
 * @example symmetricCharacter([2, 1], [3]) // -1
 * @example symmetricCharacter([2, 2], [2, 2]) // 2
 */
export function symmetricCharacter(diagram: readonly number[], cycles: readonly number[]): number {
  const [length, ...rest] = cycles;
  if (length === undefined) return 1;
  // Beta numbers: removing a strip of this length lowers one of them past the others.
  const beta = diagram.map((row, index) => row + diagram.length - 1 - index);
  let sum = 0;
  for (const [index, number] of beta.entries()) {
    const lowered = number - length;
    if (lowered < 0 || beta.includes(lowered)) continue;
    const passed = beta.filter((other) => other < number && other > lowered).length;
    const next = beta.map((other, at) => (at === index ? lowered : other)).sort((a, b) => b - a);
    const rows = next.map((other, at) => other - (next.length - 1 - at));
    sum += (passed % 2 === 0 ? 1 : -1) * symmetricCharacter(rows, rest);
  }
  return sum;
}
