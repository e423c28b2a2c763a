/** The smallest set of operators that contains the premises' terms and all that its own graphs demand. */
import { breaksChirality } from "../divergence/counterterms.ts";
import type { EvaluationContext } from "../kind.ts";
import { canMatter, legsOf, type Frame, type Insertion } from "./frame.ts";
import { insertionSets, placeOf, type InsertionSet, type SetIndex } from "./insertion-sets.ts";
import { remainderOf } from "./made-up.ts";
import { ReachableLegs } from "./reachable.ts";
import { targetsOf, type Candidate, type Target } from "./targets.ts";
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

export interface Closure {
  readonly demands: readonly Demand[];
  readonly rounds: number;
  /** Pairs of insertions and legs for which the search for a graph was given up. */
  readonly undecided: number;
}

/** Past these a closure would take minutes. */
const MOST_SETS = 120_000;
/** Parities of fields are bits of a number. */
const MOST_FIELDS = 30;

/**
 * Rounds of insertions: first the premises' terms, then also what they demand, until a round brings nothing new. An
 * operator that is demanded at order n costs n when it is inserted in turn, so the set at each order is the smallest
 * that is closed. Sets with few vertices come first, and a round ends early when every operator has the lowest order
 * that its dimension allows.
 *
 * @returns null when there are too many sets or operators
 */
export function close(frame: Frame, context: EvaluationContext): Closure | null {
  const all = frame.theory.fields.length > MOST_FIELDS ? null : targetsOf(frame);
  if (!all) return null;
  const demands = new Map<string, Demand>();
  const counts = {
    undecided: 0,
    candidates: all.reduce((sum, { candidates }) => sum + candidates.length, 0),
  };
  let insertions = frame.insertions;
  let fresh = new Set(insertions);
  let rounds = 0;
  let oddMass = breaksChirality(frame.theory) ? 0 : null;
  while (fresh.size > 0) {
    rounds += 1;
    const before = new Map(demands);
    const reachable = new ReachableLegs(frame.theory, insertions);
    const targets = all.filter(({ legs }) => reachable.has(legs));
    for (let vertices = 1; ; vertices += 1) {
      const open = targets.filter((target) => !isSettled(target, demands));
      if (open.length === 0) break;
      const places = new Set(open.flatMap((target) => placesOf(target, frame)));
      const index = insertionSets(insertions, (one) => fresh.has(one), vertices, places, frame, MOST_SETS);
      if (!index) return null;
      if (!index.any) break;
      for (const target of open) {
        context.tell({
          done: demands.size,
          of: counts.candidates,
          part: vertices === 1 ? "operators" : "operators, more insertions",
        });
        counts.undecided += lookFor(target, index, demands, oddMass, frame);
      }
    }
    const found = [...demands.values()].filter(
      (demand) => before.get(demand.candidate.key)?.order !== demand.order,
    );
    const added = found.flatMap((demand) => insertionOf(demand, frame));
    const replaced = new Set(added.map(({ key }) => key));
    insertions = [...insertions.filter(({ key }) => !replaced.has(key)), ...added];
    const lightest = oddMassOf(demands, oddMass);
    // With a mass that breaks chirality, what was looked at before may demand more.
    fresh = new Set(lightest === oddMass ? added : insertions);
    oddMass = lightest;
  }
  return { demands: [...demands.values()], rounds, undecided: counts.undecided };
}

/** Whether every operator with these legs is demanded at the lowest order that its dimension allows. */
function isSettled({ candidates }: Target, demands: ReadonlyMap<string, Demand>): boolean {
  return candidates.every(({ key, coefficient }) => demands.get(key)?.order === Math.max(0, -coefficient));
}

/** The lowest order of a mass term of spinors, among the premises or demanded. */
function oddMassOf(demands: ReadonlyMap<string, Demand>, known: number | null): number | null {
  return [...demands.values()].reduce((lowest, { target, candidate, order }) => {
    const isMass = target.spinorPair && candidate.weight === 0;
    return isMass && (lowest === null || order < lowest) ? order : lowest;
  }, known);
}

/** By loops: where the sets stand that make graphs with the target's legs. */
function placesOf({ total, counts }: Target, { settings }: Frame): number[] {
  return Array.from({ length: settings.loops }, (_, n) => placeOf(2 * n + total, counts));
}

/** Looks through the sets for a first or a lower order of each operator with the target's legs. */
function lookFor(
  target: Target,
  index: SetIndex,
  demands: Map<string, Demand>,
  oddMass: number | null,
  frame: Frame,
): number {
  let undecided = 0;
  const { settings } = frame;
  const byLoops = placesOf(target, frame).map((place) => index.find(place));
  const ranks = [...new Set(byLoops.flatMap((ranked) => ranked.map(({ rank }) => rank)))];
  for (const rank of ranks.sort((a, b) => a - b)) {
    for (const [n, ranked] of byLoops.entries()) {
      for (const set of ranked.find((one) => one.rank === rank)?.sets ?? []) {
        const omega = target.bound - set.coefficient;
        if (omega < 0 || set.counts.some((count, f) => count < (target.counts[f] ?? 0))) continue;
        const searches = new Map<boolean, WitnessSearch>();
        for (const candidate of target.candidates) {
          if (candidate.weight > omega) continue;
          const rest = omega - candidate.weight;
          const remainder = remainderOf(rest, set, target, n + 1, oddMass, frame);
          if (!remainder) continue;
          const { evenLoops } = remainder;
          const total = rank + remainder.order;
          const order = settings.cutoff ? Math.max(0, total - candidate.coefficient) : total;
          const known = demands.get(candidate.key);
          if (order > frame.mostOrder || (known && known.order <= order)) continue;
          const search =
            searches.get(evenLoops) ?? new WitnessSearch(set, target.legs, n + 1, evenLoops, frame);
          searches.set(evenLoops, search);
          const witness = search.find(candidate.weight > set.derivatives);
          if (witness === "undecided") undecided += 1;
          if (witness === "undecided" || witness === "none") continue;
          demands.set(candidate.key, { target, candidate, order, set, loops: n + 1, omega, witness });
        }
      }
    }
  }
  return undecided;
}

/** What the premises lack is inserted in turn, at the order at which it is demanded. */
function insertionOf({ target, candidate, order }: Demand, frame: Frame): Insertion[] {
  const { counterterm, coefficient } = candidate;
  if (counterterm.presentAs !== null || counterterm.kinetic) return [];
  if (!canMatter(target.legs, coefficient, frame.theory)) return [];
  return [
    {
      key: candidate.key,
      termRowId: null,
      latex: counterterm.latex,
      mark: coefficient < 0 || target.total <= 2 ? "insertion" : "vertex",
      ...legsOf(target.legs, frame.theory),
      coefficient,
      order,
      derivatives: candidate.weight,
    },
  ];
}
