/** Sums over all graphs of 1/S against field theory in zero dimensions: exact, at every loop order. */
import { describe, expect, it } from "vitest";
import { Rational } from "#engine/exact/rational.ts";
import { scalarGraphs, weightOf } from "./count-graphs.ts";
import { connectedSums, irreducibleSums } from "./zero-dimensional.ts";

/** Every choice of vertices whose Σ (n − 2) is the order. */
function choices(kinds: readonly number[], order: number): Record<number, number>[] {
  const [kind, ...others] = kinds;
  if (kind === undefined) return order === 0 ? [{}] : [];
  return Array.from({ length: Math.floor(order / (kind - 2)) + 1 }, (_, count) => count).flatMap((count) =>
    choices(others, order - count * (kind - 2)).map((rest) =>
      count > 0 ? { ...rest, [kind]: count } : rest,
    ),
  );
}

const primes: Readonly<Record<number, Rational>> = {
  3: Rational.of(2),
  4: Rational.of(3, 5),
  6: Rational.of(7, 11),
};

/** Σ Π g over graphs, each choice of vertices weighed by its couplings, so that no two can stand in for each other. */
function sumOf(kinds: readonly number[], legs: number, loops: number, irreducible: boolean): Rational {
  return choices(kinds, 2 * loops - 2 + legs).reduce((total, vertices) => {
    const graphs = scalarGraphs(vertices, legs, { onlyOneParticleIrreducible: irreducible });
    const weight = Object.entries(vertices).reduce(
      (product, [n, count]) => product.times((primes[Number(n)] ?? Rational.zero).power(count)),
      Rational.one,
    );
    return total.plus(weightOf(graphs).times(weight));
  }, Rational.zero);
}

describe.each([
  ["φ³", [3], 3],
  ["φ⁴", [4], 4],
  ["φ³, φ⁴ and φ⁶ together", [3, 4, 6], 2],
] as const)("%s", (_, kinds, mostLoops) => {
  const couplings = Object.fromEntries(kinds.map((n) => [n, primes[n] ?? Rational.zero]));
  const length = 2 * mostLoops - 2 + 4 + 1;
  const connected = connectedSums(couplings, length);
  const irreducible = irreducibleSums(couplings, length);
  const cases = [1, 2, 3, 4].flatMap((legs) =>
    Array.from({ length: mostLoops }, (_unused, n) => [legs, n + 1] as const),
  );

  it.each(cases)("%i legs, %i loops", (legs, loops) => {
    const order = 2 * loops - 2 + legs;
    expect(sumOf(kinds, legs, loops, true).toString()).toBe(irreducible[legs - 1]?.[order]?.toString());
    // A connected list also holds the irreducible one; the largest are left to the benchmark.
    if (loops < mostLoops || kinds.length > 1)
      expect(sumOf(kinds, legs, loops, false).toString()).toBe(connected[legs - 1]?.[order]?.toString());
  });
});
