/** Cycle types of the symmetric group: what becomes of a power of one field when identical quanta are exchanged. */

export interface CycleType {
  /** Lengths, longest first: [2, 1, 1]. */
  readonly cycles: readonly number[];
  /** Permutations of this type: n! / z. */
  readonly permutations: bigint;
}

const known = new Map<number, readonly CycleType[]>();

/**
 * All cycle types of n objects with their sizes, which add up to n!.
 * @example cycleTypes(3).length // 3
 */
export function cycleTypes(n: number): readonly CycleType[] {
  const found = known.get(n);
  if (found) return found;
  const types = partitions(n, n).map((cycles) => ({
    cycles,
    permutations: factorial(n) / centralizer(cycles),
  }));
  known.set(n, types);
  return types;
}

function partitions(n: number, largest: number): number[][] {
  if (n === 0) return [[]];
  const found: number[][] = [];
  for (let first = Math.min(n, largest); first >= 1; first--)
    for (const rest of partitions(n - first, first)) found.push([first, ...rest]);
  return found;
}

const partitionNumbers: number[] = [1];

/**
 * How many cycle types n objects have, by Euler's recurrence with pentagonal numbers (1753).
 * @example partitionNumber(5) // 7
 */
export function partitionNumber(n: number): number {
  for (let m = partitionNumbers.length; m <= n; m++) {
    let sum = 0;
    for (let k = 1; (k * (3 * k - 1)) / 2 <= m; k++)
      for (const pentagonal of [(k * (3 * k - 1)) / 2, (k * (3 * k + 1)) / 2])
        sum += (k % 2 === 1 ? 1 : -1) * (partitionNumbers[m - pentagonal] ?? 0);
    partitionNumbers.push(sum);
  }
  return partitionNumbers[n] ?? 0;
}

/** z = Π_j j^{m_j} m_j!, with m_j cycles of length j. */
function centralizer(cycles: readonly number[]): bigint {
  let z = 1n;
  for (const length of new Set(cycles)) {
    const multiplicity = cycles.filter((other) => other === length).length;
    z *= BigInt(length) ** BigInt(multiplicity) * factorial(multiplicity);
  }
  return z;
}

/** @example String(factorial(5)) // "120" */
export function factorial(n: number): bigint {
  let product = 1n;
  for (let factor = 2n; factor <= n; factor++) product *= factor;
  return product;
}
