/** Looks among sets of insertions for graphs that demand operators with given legs, or demand them at a lower order. */
import type { Frame } from "./frame.ts";
import { placeOf, type InsertionSet, type Need, type SetIndex } from "./insertion-sets.ts";
import { remainderOf } from "./made-up.ts";
import type { Candidate, Target } from "./targets.ts";
import { WitnessSearch, type Witness } from "./witness.ts";

export interface Demand {
  readonly target: Target;
  readonly candidate: Candidate;
  /** Order in 1/Λ, in units of the frame. */
  readonly order: number;
  readonly set: InsertionSet;
  readonly loops: number;
  readonly omega: number;
  readonly witness: Witness;
}
type Demands = ReadonlyMap<string, Demand>;

/** Whether an operator is demanded at the lowest order that its dimension allows. */
export function isSettled({ key, coefficient }: Candidate, demands: Demands): boolean {
  return demands.get(key)?.order === Math.max(0, -coefficient);
}

/** By loops: where the sets stand that make graphs with the target's legs. */
function placesOf({ total, counts }: Target, { settings }: Frame): number[] {
  return Array.from({ length: settings.loops }, (_, n) => placeOf(2 * n + total, counts));
}

/** What sets must offer to be of use for operators that are not settled, by place. */
export function needsOf(
  targets: readonly Target[],
  demands: Demands,
  frame: Frame,
): ReadonlyMap<number, readonly Need[]> {
  const needs = new Map<number, Need[]>();
  for (const target of targets) {
    for (const candidate of target.candidates) {
      if (isSettled(candidate, demands)) continue;
      const below = demands.get(candidate.key)?.order ?? Infinity;
      for (const place of placesOf(target, frame)) {
        const before = needs.get(place) ?? [];
        const isKnown = before.some(
          (need) => need.coefficient === candidate.coefficient && need.below >= below,
        );
        if (!isKnown) needs.set(place, [...before, { coefficient: candidate.coefficient, below }]);
      }
    }
  }
  return needs;
}

/**
 * Lowest rank first, then fewest loops, then plainest sets; what is found is put into `demands`.
 *
 * @param oddMass order of the masses that break chirality; null where there are none
 * @returns for how many sets the search for a graph was given up
 */
export function lookFor(
  target: Target,
  index: SetIndex,
  demands: Map<string, Demand>,
  oddMass: number | null,
  frame: Frame,
): number {
  let undecided = 0;
  const byLoops = placesOf(target, frame).map((place) => index.find(place));
  const ranks = [...new Set(byLoops.flatMap((ranked) => ranked.map(({ rank }) => rank)))];
  for (const rank of ranks.sort((a, b) => a - b)) {
    for (const [n, ranked] of byLoops.entries()) {
      for (const set of ranked.find((one) => one.rank === rank)?.sets ?? [])
        undecided += lookInto(set, rank, n + 1, target, demands, oddMass, frame);
    }
  }
  return undecided;
}

function lookInto(
  set: InsertionSet,
  rank: number,
  loops: number,
  target: Target,
  demands: Map<string, Demand>,
  oddMass: number | null,
  frame: Frame,
): number {
  const omega = target.bound - set.coefficient;
  if (omega < 0 || set.counts.some((count, f) => count < (target.counts[f] ?? 0))) return 0;
  const searches = new Map<boolean, WitnessSearch>();
  let undecided = 0;
  for (const candidate of target.candidates) {
    if (candidate.weight > omega) continue;
    const orderFor = (total: number) =>
      frame.settings.cutoff ? Math.max(0, total - candidate.coefficient) : total;
    const limit = demands.get(candidate.key)?.order ?? Infinity;
    if (orderFor(rank) >= limit) continue;
    const remainder = remainderOf(omega - candidate.weight, set, target, loops, oddMass, frame);
    if (!remainder) continue;
    const order = orderFor(rank + remainder.order);
    if (order > frame.mostOrder || order >= limit) continue;
    const { evenLoops } = remainder;
    const search = searches.get(evenLoops) ?? new WitnessSearch(set, target.legs, loops, evenLoops, frame);
    searches.set(evenLoops, search);
    const witness = search.find(candidate.weight > set.derivatives);
    if (witness === "undecided") undecided += 1;
    else if (witness !== "none")
      demands.set(candidate.key, { target, candidate, order, set, loops, omega, witness });
  }
  return undecided;
}
