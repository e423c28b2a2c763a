/** Finds the length scales that matter, with as few factorisations as it takes to draw their posterior. */
import type { LengthFit } from "./likelihood.ts";

/** Length scales further below the best than this, in ln pr, do not matter. */
const DEPTH = 9;
/** The first lengths tried are about this far apart in ln ℓ. */
const STEP = 0.45;
const [FEWEST, MOST] = [5, 14];
const NEXT = 8;
const ROUNDS = 4;
/** With so many points on it a peak is drawn and integrated well. */
const ENOUGH = 11;

/** Lengths between which the data can tell: from half the usual distance of neighbours to twice the whole range. */
export function lengthRange(x: readonly number[]): readonly [number, number] {
  const gaps = x.slice(1).map((at, index) => at - (x[index] ?? at));
  const sorted = [...gaps].sort((a, b) => a - b);
  const usual = sorted[Math.floor(sorted.length / 2)] ?? 1;
  const whole = (x.at(-1) ?? 0) - (x[0] ?? 0);
  return [usual / 2, 2 * whole];
}

/**
 * Fits at length scales that crowd where the posterior is large, rising.
 *
 * @param profile the largest ln pr of a fit over breakdown scales
 * @param tell called after each factorisation
 * @param rounds how often to look closer
 */
export function searchLengths(
  fit: (length: number) => LengthFit,
  [low, high]: readonly [number, number],
  profile: (fit: LengthFit) => number,
  tell: () => void,
  rounds = ROUNDS,
): readonly LengthFit[] {
  const found: { readonly log: number; readonly fit: LengthFit; readonly value: number }[] = [];
  const add = (from: number, to: number, count: number, ends: boolean) => {
    for (let index = 0; index < count; index += 1) {
      const log = ends
        ? from + ((to - from) * index) / (count - 1)
        : from + ((to - from) * (index + 1)) / (count + 1);
      const one = fit(Math.exp(log));
      found.push({ log, fit: one, value: profile(one) });
      tell();
    }
    found.sort((a, b) => a.log - b.log);
  };
  const first = Math.min(MOST, Math.max(FEWEST, 1 + Math.ceil(Math.log(high / low) / STEP)));
  add(Math.log(low), Math.log(high), first, true);
  for (let round = 0; round < rounds; round += 1) {
    const best = Math.max(...found.map(({ value }) => value));
    const near = found.flatMap(({ value }, index) => (value > best - DEPTH ? [index] : []));
    if (near.length >= ENOUGH) break;
    const from = found[Math.max(0, (near[0] ?? 0) - 1)];
    const to = found[Math.min(found.length - 1, (near.at(-1) ?? 0) + 1)];
    if (from && to) add(from.log, to.log, NEXT, false);
  }
  return found.map((one) => one.fit);
}
