/**
 * Every multiset of insertions with a given number of vertices. With L loops and E legs, lines and vertices obey
 * L = I − V + 1 and Σ V n = 2I + E, so Σ V (n − 2) = 2(L − 1) + E: loops and legs bound every vertex with three or more
 * legs, marginal and relevant ones too; vertices with two legs are bounded by the order, or by ω ≥ 0.
 */
import type { Frame, Insertion } from "./frame.ts";

export interface InsertionSet {
  readonly parts: readonly { readonly insertion: Insertion; readonly count: number }[];
  /** Legs by field. */
  readonly counts: readonly number[];
  /** Σ V (n − 2). */
  readonly surplus: number;
  /** Σ V [g], Σ V order and Σ V derivatives, in units of the frame. */
  readonly coefficient: number;
  readonly order: number;
  readonly derivatives: number;
  /** How many kinds are operators that the premises lack: fewer make a plainer example. */
  readonly derived: number;
  readonly vertices: number;
}

/** Sets by what legs and loops fix, then by rank: the order of what they demand, before ω is looked at. */
export interface SetIndex {
  find(place: number): readonly RankedSets[];
  /** Whether there is any set of so many vertices, in whatever place: without one there is none of more. */
  readonly any: boolean;
}
interface RankedSets {
  readonly rank: number;
  readonly sets: readonly InsertionSet[];
}

/**
 * In dimensional regularisation what a set demands has the set's order. A cutoff of the size of Λ makes up dimensions
 * with powers of Λ: then only what relevant couplings take away stays, Σ V (order + [g]).
 */
function rankOf(set: InsertionSet, { settings }: Frame): number {
  return settings.cutoff ? set.order + set.coefficient : set.order;
}

/** What a set must fit to matter for legs with a number of loops: 2(L − 1) + E, and the parity of each field. */
export function placeOf(surplus: number, counts: readonly number[]): number {
  return counts.reduce((bits, count, f) => bits + (count % 2) * 2 ** f, surplus * 2 ** counts.length);
}

/** What may still be looked at, over all rounds: a bound on time and memory that is the same everywhere. */
export interface Allowance {
  /** Partial sets. */
  steps: number;
  /** Sets that are kept. */
  sets: number;
}

/** A set is of use when Σ V [g] leaves room for an operator's derivatives, at an order below the known one. */
export interface Need {
  /** [g] of the operator: the most that Σ V [g] may be. */
  readonly coefficient: number;
  readonly below: number;
}

/**
 * @param isFresh of each set one insertion at least is fresh: the others have been looked at before
 * @param needs by place: only sets that one of them asks for are kept
 * @returns null when the allowance does not suffice
 */
export function insertionSets(
  insertions: readonly Insertion[],
  isFresh: (insertion: Insertion) => boolean,
  vertices: number,
  needs: ReadonlyMap<number, readonly Need[]>,
  frame: Frame,
  allowance: Allowance,
): SetIndex | null {
  const list = [...insertions].sort((a, b) => a.order - b.order || a.legs - b.legs);
  const lastFresh = list.findLastIndex(isFresh);
  const limits = {
    surplus: 2 * (frame.settings.loops - 1) + frame.mostLegs,
    // ω of the fewest legs: when even that is below 0, nothing diverges.
    omega: frame.measure - Math.min(0, frame.mostLegs * Math.min(0, ...frame.weights)),
  };
  const groups = new Map<number, Map<number, InsertionSet[]>>();
  const chosen: number[] = list.map(() => 0);
  let any = false;
  const fields = frame.weights.length;
  const parities = list.map(({ counts }) => placeOf(0, counts));

  const choose = (
    from: number,
    left: number,
    sums: { surplus: number; order: number; coefficient: number; parity: number; fresh: boolean },
  ): void => {
    allowance.steps -= 1;
    if (left === 0) {
      if (!sums.fresh) return;
      any = true;
      const key = sums.surplus * 2 ** fields + sums.parity;
      if (!needs.get(key)?.some((need) => isOfUse(sums, need, frame))) return;
      allowance.sets -= 1;
      if (allowance.sets < 0) return;
      const set = finished(list, chosen, sums, vertices, frame);
      const byRank = groups.get(key) ?? new Map<number, InsertionSet[]>();
      groups.set(key, byRank);
      const rank = rankOf(set, frame);
      const sets = byRank.get(rank);
      if (sets) sets.push(set);
      else byRank.set(rank, [set]);
      return;
    }
    for (let index = from; index < list.length; index += 1) {
      const insertion = list[index];
      if (!insertion || allowance.sets < 0 || allowance.steps < 0 || (!sums.fresh && index > lastFresh))
        return;
      const order = sums.order + insertion.order;
      // Insertions stand in rising order: the next ones cost as much or more.
      if (sums.order + left * insertion.order > frame.mostOrder) return;
      const surplus = sums.surplus + insertion.legs - 2;
      const coefficient = sums.coefficient + insertion.coefficient;
      if (surplus > limits.surplus || limits.omega - coefficient + frame.mostOrder - order < 0) continue;
      chosen[index] = (chosen[index] ?? 0) + 1;
      const parity = (sums.parity ^ (parities[index] ?? 0)) >>> 0;
      const fresh = sums.fresh || isFresh(insertion);
      choose(index, left - 1, { surplus, order, coefficient, parity, fresh });
      chosen[index] = (chosen[index] ?? 0) - 1;
    }
  };
  choose(0, vertices, { surplus: 0, order: 0, coefficient: 0, parity: 0, fresh: false });
  if (allowance.sets < 0 || allowance.steps < 0) return null;
  const sorted = new Map<number, RankedSets[]>();
  for (const [key, byRank] of groups) {
    const ranked = [...byRank].map(([rank, sets]) => ({
      rank,
      sets: sets.sort((a, b) => a.derived - b.derived || a.parts.length - b.parts.length),
    }));
    sorted.set(
      key,
      ranked.sort((a, b) => a.rank - b.rank),
    );
  }
  return { any, find: (place) => sorted.get(place) ?? [] };
}

function isOfUse(
  sums: { readonly order: number; readonly coefficient: number },
  { coefficient, below }: Need,
  { settings }: Frame,
): boolean {
  if (sums.coefficient > coefficient) return false;
  const order = settings.cutoff ? Math.max(0, sums.order + sums.coefficient - coefficient) : sums.order;
  return order < below;
}

function finished(
  list: readonly Insertion[],
  chosen: readonly number[],
  sums: { readonly surplus: number; readonly order: number; readonly coefficient: number },
  vertices: number,
  { theory }: Frame,
): InsertionSet {
  const parts = list.flatMap((insertion, index) => {
    const count = chosen[index] ?? 0;
    return count === 0 ? [] : [{ insertion, count }];
  });
  return {
    parts,
    counts: theory.fields.map((_, f) =>
      parts.reduce((sum, { insertion, count }) => sum + count * (insertion.counts[f] ?? 0), 0),
    ),
    surplus: sums.surplus,
    order: sums.order,
    coefficient: sums.coefficient,
    derivatives: parts.reduce((sum, { insertion, count }) => sum + count * insertion.derivatives, 0),
    derived: parts.filter(({ insertion }) => insertion.termRowId === null).length,
    vertices,
  };
}
