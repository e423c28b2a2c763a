/** Canonical form of a small coloured multigraph, by colour refinement and individualisation. */

export interface Coloured {
  /** One colour for each vertex, and the code of what joins u to v at `u * size + v`; 0 is nothing. */
  readonly colours: readonly number[];
  readonly codes: readonly number[];
}

export interface Canonical {
  /** Equal for two graphs exactly when they are isomorphic. */
  readonly certificate: string;
  /** Vertices in canonical order. */
  readonly order: readonly number[];
  /** How many permutations of vertices keep colours and codes. */
  readonly automorphisms: bigint;
}

/**
 * @returns the least certificate over all discrete refinements. The number of those that reach it is the order of
 *   the automorphism group; where vertices are interchangeable as twins, one stands for all.
 */
export function canonicalForm({ colours, codes }: Coloured): Canonical {
  const size = colours.length;
  const best = { certificate: "", order: [] as readonly number[], automorphisms: 0n };

  const visit = (start: readonly number[], weight: bigint): void => {
    const cells = refine(start, codes);
    const cell = firstCell(cells);
    if (!cell) {
      const order = Array.from({ length: size }, () => 0);
      cells.forEach((place, vertex) => (order[place] = vertex));
      const certificate = certificateOf(order, colours, codes);
      if (best.automorphisms === 0n || certificate < best.certificate)
        Object.assign(best, { certificate, order, automorphisms: weight });
      else if (certificate === best.certificate) best.automorphisms += weight;
      return;
    }
    const twins = cell.every((vertex) => areTwins(cell[0] ?? 0, vertex, codes, size));
    const tried = twins ? cell.slice(0, 1) : cell;
    const factor = twins ? weight * BigInt(cell.length) : weight;
    for (const vertex of tried) {
      // The chosen vertex keeps the place of its cell, the others move up by one.
      const place = cells[vertex] ?? 0;
      visit(
        cells.map((other, v) => (other === place && v !== vertex ? place + 1 : other)),
        factor,
      );
    }
  };
  visit(ranked(colours), 1n);
  return best;
}

/** Places of cells: each vertex gets the number of vertices with smaller keys. */
function ranked(keys: readonly number[]): number[] {
  return keys.map((key) => keys.reduce((below, other) => below + (other < key ? 1 : 0), 0));
}

/** A fixed mixing of two whole numbers; equal inputs give equal outputs, which is all that refinement asks. */
function mix(a: number, b: number): number {
  let h = Math.imul(a + 0x9e37, 0x85ebca6b) ^ Math.imul(b + 0x79b9, 0xc2b2ae35);
  h = Math.imul(h ^ (h >>> 15), 0x27d4eb2f);
  return (h ^ (h >>> 13)) >>> 0;
}

/** Splits cells by what their vertices are joined to, until nothing splits. A collision only splits less. */
function refine(start: readonly number[], codes: readonly number[]): number[] {
  const size = start.length;
  let cells = [...start];
  let count = new Set(cells).size;
  while (count < size) {
    const sums = cells.map((_, u) => {
      let sum = 0;
      for (let v = 0; v < size; v += 1) {
        const code = codes[u * size + v] ?? 0;
        if (code !== 0 && v !== u) sum = (sum + mix(cells[v] ?? 0, code)) >>> 0;
      }
      return sum;
    });
    const next = cells.map((cell, u) => {
      let place = 0;
      for (let v = 0; v < size; v += 1) {
        const other = cells[v] ?? 0;
        if (other < cell || (other === cell && (sums[v] ?? 0) < (sums[u] ?? 0))) place += 1;
      }
      return place;
    });
    const parts = new Set(next).size;
    cells = next;
    if (parts === count) break;
    count = parts;
  }
  return cells;
}

function firstCell(cells: readonly number[]): number[] | null {
  const members = new Map<number, number[]>();
  for (const [vertex, place] of cells.entries()) {
    const cell = members.get(place);
    if (cell) cell.push(vertex);
    else members.set(place, [vertex]);
  }
  let found: number[] | null = null;
  let foundPlace = Infinity;
  for (const [place, cell] of members) {
    if (cell.length > 1 && place < foundPlace) [found, foundPlace] = [cell, place];
  }
  return found;
}

/** Whether swapping two vertices of one cell changes nothing. */
function areTwins(a: number, b: number, codes: readonly number[], size: number): boolean {
  if (a === b) return true;
  if (codes[a * size + b] !== codes[b * size + a]) return false;
  for (let v = 0; v < size; v += 1) {
    if (v !== a && v !== b && codes[a * size + v] !== codes[b * size + v]) return false;
  }
  return true;
}

function certificateOf(
  order: readonly number[],
  colours: readonly number[],
  codes: readonly number[],
): string {
  const size = order.length;
  const parts: number[] = [size];
  for (const u of order) parts.push(colours[u] ?? 0);
  for (let i = 0; i < size; i += 1) {
    for (let j = i + 1; j < size; j += 1) parts.push(codes[(order[i] ?? 0) * size + (order[j] ?? 0)] ?? 0);
  }
  return String.fromCharCode(...parts);
}
