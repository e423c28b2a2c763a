/** The posterior of the breakdown scale, joint over observables, and of the length scale of each. */
import { densityOf, type Density } from "./density.ts";
import { fitPoints } from "./fit-points.ts";
import { searchLengths } from "./length-search.ts";
import { likelihoodOf, type LengthFit, type Observable, type Prior } from "./likelihood.ts";
import type { Degree } from "./value.ts";

/** What is believed of the breakdown scale before the data: a density in s = ln(Λ_b/stated), between limits. */
export interface BreakdownBelief {
  readonly logPrior: (s: number) => number;
  readonly range: readonly [number, number];
  readonly stated: number;
}

export interface JointPosterior {
  /** In the unit in which the scale is stated; null when none is estimated. */
  readonly breakdown: Density | null;
  /** Of each observable alone, on the same grid. */
  readonly alone: readonly (readonly number[])[];
  /** Of the first observable's length scale; null when it is given. */
  readonly length: Density | null;
  /** The fit with the most probable length scale at the breakdown scale as stated. */
  readonly chosen: LengthFit;
  /** What was fitted, of each observable. */
  readonly fitted: readonly Observable[];
  readonly fits: number;
}

const COARSE = 121;
const FINE = 161;
/** The breakdown scale is drawn where its ln pr is within this of the best. */
const DEPTH = 14;

/** @param lengths as given for each observable; null is estimated */
export function jointPosterior(
  observables: readonly Observable[],
  lengths: readonly (number | null)[],
  prior: Prior,
  belief: BreakdownBelief | null,
  degrees: readonly Degree[],
  tell: (done: number) => void,
): JointPosterior | null {
  const range = belief?.range ?? ([0, 0] as const);
  const coarse = belief ? spread(range[0], range[1], COARSE) : [0];
  const logPrior = belief?.logPrior ?? (() => 0);
  let done = 0;
  const count = () => tell((done += 1));
  const chosenPoints = observables.map((one, index) => fitPoints(one, lengths[index] ?? null, prior, count));
  const fitted = chosenPoints.map(({ observable }) => observable);
  const all = chosenPoints.map(({ observable, range: where }, index) => {
    const fit = likelihoodOf(observable, prior, range);
    const given = lengths[index] ?? null;
    if (given !== null) {
      count();
      return [fit(given)];
    }
    const profile = (one: LengthFit) => Math.max(...coarse.map((s) => one.logLikelihood(s) + logPrior(s)));
    return searchLengths(fit, where, profile, count);
  });
  const [first] = all;
  const chosen = first && [...first].sort((a, b) => b.logLikelihood(0) - a.logLikelihood(0))[0];
  if (!first || !chosen) return null;

  // For each observable alone: ln ∫ pr(data | s, ℓ) d ln ℓ.
  const marginals = all.map((fits) => (s: number) => logIntegral(fits, (fit) => fit.logLikelihood(s)));
  const joint = (s: number) => marginals.reduce((sum, one) => sum + one(s), logPrior(s));
  const s = belief ? grid(joint, coarse) : [0];
  const breakdown = belief && densityInScale(s, s.map(joint), belief.stated, degrees);
  const alone = belief
    ? marginals.map(
        (one) =>
          densityInScale(
            s,
            s.map((at) => one(at) + logPrior(at)),
            belief.stated,
            degrees,
          ).density,
      )
    : [];
  const others = s.map((at) => marginals.slice(1).reduce((sum, one) => sum + one(at), logPrior(at)));
  const length =
    first.length > 1
      ? densityOf(
          first.map((fit) => fit.length),
          first.map(
            (fit) =>
              logSum(s.map((at, index) => (others[index] ?? 0) + fit.logLikelihood(at))) -
              Math.log(fit.length),
          ),
          degrees,
        )
      : null;
  return { breakdown, alone, length, chosen, fitted, fits: done };
}

function spread(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, index) => from + ((to - from) * index) / (count - 1));
}

/** Finer where the posterior is, and over the whole range when it is everywhere. */
function grid(log: (s: number) => number, coarse: readonly number[]): number[] {
  let points = coarse;
  // A peak narrower than a step is found by looking closer, twice at most.
  for (let round = 0; round < 3; round += 1) {
    const values = points.map(log);
    const best = Math.max(...values);
    const near = values.flatMap((value, index) => (value > best - DEPTH ? [index] : []));
    const from = points[Math.max(0, (near[0] ?? 0) - 1)] ?? 0;
    const to = points[Math.min(points.length - 1, (near.at(-1) ?? 0) + 1)] ?? 0;
    points = spread(from, to, FINE);
    if (near.length > 25) break;
  }
  return [...points];
}

/** From a density in s = ln(Λ/stated), where it is smoother, to one in the scale Λ: dP/dΛ = (dP/ds)/Λ. */
function densityInScale(
  s: readonly number[],
  logs: readonly number[],
  stated: number,
  degrees: readonly Degree[],
): Density {
  const scale = (at: number) => stated * Math.exp(at);
  const { density, median, intervals, cutAt } = densityOf(s, logs, degrees);
  const inScale = logs.map((log, index) => log - (s[index] ?? 0));
  return {
    grid: s.map(scale),
    density: density.map((one, index) => one / scale(s[index] ?? 0)),
    mode: scale(densityOf(s, inScale, []).mode),
    median: scale(median),
    intervals: intervals.map(({ degree, low, high }) => ({ degree, low: scale(low), high: scale(high) })),
    cutAt,
  };
}

/** ln ∫ e^log d ln ℓ by the trapezium rule; the one fit of a given ℓ stands for itself. */
function logIntegral(fits: readonly LengthFit[], log: (fit: LengthFit) => number): number {
  const values = fits.map(log);
  if (values.length === 1) return values[0] ?? NaN;
  const at = fits.map(({ length }) => Math.log(length));
  return logSum(
    values.map((value, index) => {
      const left = (at[index] ?? 0) - (at[index - 1] ?? at[index] ?? 0);
      const right = (at[index + 1] ?? at[index] ?? 0) - (at[index] ?? 0);
      return value + Math.log((left + right) / 2);
    }),
  );
}
function logSum(logs: readonly number[]): number {
  const top = Math.max(...logs);
  return top + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - top), 0));
}
