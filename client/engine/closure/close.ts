/** The smallest set of operators that contains the premises' terms and all that its own graphs demand. */
import { breaksChirality } from "../divergence/counterterms.ts";
import type { EvaluationContext } from "../kind.ts";
import { canMatter, legsOf, type Frame, type Insertion } from "./frame.ts";
import { insertionSets, type Allowance } from "./insertion-sets.ts";
import { isSettled, lookFor, needsOf, type Demand } from "./look-for.ts";
import { ReachableLegs } from "./reachable.ts";
import { targetsOf } from "./targets.ts";

export interface Closure {
  readonly demands: readonly Demand[];
  readonly rounds: number;
  /** Pairs of insertions and legs for which the search for a graph was given up. */
  readonly undecided: number;
}

/** Past these a closure would take minutes. */
const MOST_SETS = 150_000;
const MOST_STEPS = 4_000_000;
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
  const allowance: Allowance = { steps: MOST_STEPS, sets: MOST_SETS };
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
      const open = targets.filter(({ candidates }) => candidates.some((one) => !isSettled(one, demands)));
      if (open.length === 0) break;
      const needs = needsOf(open, demands, frame);
      const index = insertionSets(insertions, (one) => fresh.has(one), vertices, needs, frame, allowance);
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

/** The lowest order of a mass term of spinors, among the premises or demanded. */
function oddMassOf(demands: ReadonlyMap<string, Demand>, known: number | null): number | null {
  return [...demands.values()].reduce((lowest, { target, candidate, order }) => {
    const isMass = target.spinorPair && candidate.weight === 0;
    return isMass && (lowest === null || order < lowest) ? order : lowest;
  }, known);
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
