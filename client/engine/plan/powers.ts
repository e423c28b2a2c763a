/**
 * Sums of entries as sums of powers of p and Λ. Entries of equal order and powers are added once and for all, so that a
 * sum over hundreds of products at many values of p costs a handful of powers.
 */
import type { Rational } from "../exact/rational.ts";
import { sizeOfEntry, type Entry } from "./entries.ts";
import { powersOf } from "./terms.ts";

/** p and Λ relative to the working point. */
export interface Point {
  readonly probe: number;
  readonly heavy: number;
}
export const workingPoint: Point = { probe: 1, heavy: 1 };

/** size · probe^a · heavy^b. */
export interface Power {
  readonly order: Rational;
  /** At the working point. */
  readonly size: number;
  readonly probe: number;
  readonly heavy: number;
  /** size without its power of Q = p/Λ: at tiny Q the power leaves the range of a double, at larger p it need not. */
  readonly prefactor: number;
  /** Σ count · size over the entries, by the row whose size was given by hand: the slope in the logarithm of that size. */
  readonly byHand: ReadonlyMap<string, number>;
}

export function sumPowers(entries: readonly Entry[], Q: number): Power[] {
  const sums = new Map<string, Power>();
  for (const entry of entries) {
    const size = sizeOfEntry(entry, Q);
    const prefactor = sizeOfEntry(entry, 1);
    let [probe, heavy] = [0, 0];
    const byHand = new Map<string, number>();
    for (const { term, count } of entry.insertions) {
      const powers = powersOf(term);
      probe += count * powers.probe;
      heavy += count * powers.heavy;
      if (term.assigned) byHand.set(term.rowId, (byHand.get(term.rowId) ?? 0) + count * size);
    }
    const key = `${entry.order.toString()}|${probe}|${heavy}`;
    const had = sums.get(key);
    for (const [rowId, slope] of had?.byHand ?? []) byHand.set(rowId, (byHand.get(rowId) ?? 0) + slope);
    sums.set(key, {
      order: entry.order,
      size: size + (had?.size ?? 0),
      prefactor: prefactor + (had?.prefactor ?? 0),
      probe,
      heavy,
      byHand,
    });
  }
  return [...sums.values()];
}

/** One power at a point; `Q` is the expansion parameter at the working point. */
export function sizeAt(power: Power, { probe, heavy }: Point, Q: number): number {
  const moved = (Q * probe) / heavy;
  // Of `power.probe` the part that Λ goes with comes from sizes by dimension, the rest from sizes given by hand.
  return power.prefactor * moved ** -power.heavy * probe ** (power.probe + power.heavy);
}

/** The sum at a point. */
export function valueAt(powers: readonly Power[], point: Point, Q: number): number {
  let sum = 0;
  for (const power of powers) sum += sizeAt(power, point, Q);
  return sum;
}
