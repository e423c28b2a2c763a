/** The exact symmetry factor of a finished graph. */
import { canonicalForm, type Coloured } from "./canonical.ts";
import { tally } from "./line-codes.ts";
import type { PartialGraph, Setting } from "./partial-graph.ts";

function factorial(n: number): bigint {
  return n < 2 ? 1n : BigInt(n) * factorial(n - 1);
}

/** Permutations of equal lines between the same vertices; a closed line without direction can also be turned over. */
function permutationsOfLines({ codes: joined }: PartialGraph, setting: Setting): bigint {
  const { size, codes, partner } = setting;
  let ways = 1n;
  for (let u = 0; u < size; u += 1) {
    for (let v = u; v < size; v += 1) {
      for (const [type, count] of tally(codes.itemsOf(joined[u * size + v] ?? 0))) {
        ways *= factorial(count);
        if (u === v && partner(type) === type) ways *= 2n ** BigInt(count);
      }
    }
  }
  return ways;
}

/**
 * S is the number of permutations of vertices and lines that leave a graph as it is and its external legs where they
 * are; the labellings are the ways of telling interchangeable legs apart, so that the sum of 1/S over all labelled
 * graphs is `labellings`/S.
 * Conventions: a vertex carries 1/n! for each of its n equal legs. Source: Kleinert, Pelster, Kastening, Bachmann 2000,
 * Phys. Rev. E 62, 1537.
 */
export function symmetryOf(
  graph: PartialGraph,
  coloured: Coloured,
  automorphisms: bigint,
  setting: Setting,
): { readonly symmetry: bigint; readonly labellings: bigint } {
  const lines = permutationsOfLines(graph, setting);
  if (graph.legs.every((code) => code === 0)) return { symmetry: automorphisms * lines, labellings: 1n };
  const most = Math.max(0, ...coloured.colours) + 1;
  const held = canonicalForm({
    ...coloured,
    colours: coloured.colours.map((colour, v) => ((graph.legs[v] ?? 0) === 0 ? colour : most + v)),
  }).automorphisms;
  const all = new Map<number, number>();
  let sameVertex = 1n;
  for (const code of graph.legs) {
    for (const [group, count] of tally(setting.codes.itemsOf(code))) {
      sameVertex *= factorial(count);
      all.set(group, (all.get(group) ?? 0) + count);
    }
  }
  const permutations = [...all.values()].reduce((product, count) => product * factorial(count), 1n);
  return { symmetry: held * lines, labellings: (permutations * held) / (automorphisms * sameVertex) };
}
