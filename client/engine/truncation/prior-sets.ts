/**
 * The prior sets A, B and C of Furnstahl, Klco, Phillips, Wesolowski 2015, Phys. Rev. C 92, 024005, table I, by
 * numerical integration: with finite limits of c̄, and for sums of several omitted terms.
 *   A: c_n uniform in |c_n| ≤ c̄, ln c̄ uniform between limits      B: c_n as in A, ln c̄ normal about 0 with width σ
 *   C: c_n normal with width c̄, ln c̄ uniform between limits
 */
import { normalCoverage } from "./incomplete-beta.ts";
import { integrate } from "./panels.ts";
import type { UniformSum } from "./uniform-sum.ts";

export type PriorSet = "A" | "B" | "C";

export interface ScaleLimits {
  /** c̄_< > 0 of sets A and C. */
  readonly low: number;
  /** c̄_> > c̄_<. */
  readonly high: number;
  /** σ of set B. */
  readonly sigma: number;
}

/** What the coefficients known so far say about c̄. */
export interface Evidence {
  /** n_c, which may be 0: the limits keep the priors proper. */
  readonly count: number;
  /** max |c_n|. */
  readonly largest: number;
  /** Σ c_n². */
  readonly squares: number;
}

/** What was left out, in units of |X_ref| c̄: the sum of uniform variables for A and B, the width of the normal one for C. */
export interface OmittedSum {
  readonly uniform: UniformSum;
  readonly width: number;
}

/** Beyond this many e-folds below its largest value the posterior of c̄ adds nothing. */
const DEPTH = 32;

/**
 * Half-width of the central interval in units of |X_ref|. Null when the data exclude the prior: set A with a
 * coefficient beyond c̄_>.
 *
 * @param probability two-sided degree of belief in (0, 1)
 * @example the limits 0.001 and 1000, c = 1, −0.5, 0.7, Q = 0.3, first omitted term: set A has 0.02448 at 68 %
 */
export function priorSetHalfWidth(
  set: PriorSet,
  evidence: Evidence,
  limits: ScaleLimits,
  omitted: OmittedSum,
  probability: number,
): number | null {
  const posterior = scalePosterior(set, evidence, limits);
  if (!posterior) return null;
  const { width, uniform } = omitted;
  const believed =
    set === "C"
      ? (d: number) => posterior.mean((scale) => normalCoverage(d / (scale * width)), [])
      : // The coverage of a bounded sum bends where c̄ times the bound is d, and the panels end there.
        (d: number) =>
          posterior.mean(
            (scale) => uniform.coverage(d / scale),
            uniform.bends.map((bend) => d / bend),
          );
  return solve(believed, probability, posterior.typical * (set === "C" ? width : uniform.reach));
}

/** The posterior of c̄, to be averaged over. */
interface ScalePosterior {
  /** About its middle. */
  readonly typical: number;
  /** The mean of a function of c̄ that is smooth but at the given values. */
  mean(given: (scale: number) => number, bends: readonly number[]): number;
}

/** No panel in ln c̄ is wider. */
const PANEL = 1.8;

function scalePosterior(set: PriorSet, evidence: Evidence, limits: ScaleLimits): ScalePosterior | null {
  const { count, largest, squares } = evidence;
  const logDensity = (u: number) =>
    -count * u -
    (set === "C" ? (squares / 2) * Math.exp(-2 * u) : 0) -
    (set === "B" ? (u * u) / (2 * limits.sigma ** 2) : 0);
  const [from, to] = range(set, evidence, limits);
  if (!(to > from) || (set !== "C" && to <= Math.log(largest))) return null;
  const peak = peakOf(set, count, squares, limits.sigma, from, to);
  const top = logDensity(peak);
  const low = edge(logDensity, top, peak, from);
  const high = edge(logDensity, top, peak, to);
  const over = (given: (scale: number) => number, bends: readonly number[]) => {
    const inside = bends.map(Math.log).filter((bend) => bend > low && bend < high);
    const cuts = [low, peak, high, ...inside].sort((a, b) => a - b);
    const weighted = (u: number) => Math.exp(logDensity(u) - top) * given(Math.exp(u));
    return cuts.reduce((sum, cut, index) => sum + integrate(weighted, cuts[index - 1] ?? cut, cut, PANEL), 0);
  };
  const total = over(() => 1, []);
  const mean = (given: (scale: number) => number, bends: readonly number[]) => over(given, bends) / total;
  return { typical: Math.exp(mean(Math.log, [])), mean };
}

/** Where ln c̄ may lie: a uniform c_n needs c̄ ≥ |c_n|. */
function range(set: PriorSet, { count, largest }: Evidence, limits: ScaleLimits): readonly [number, number] {
  const least = set === "C" || largest === 0 ? -Infinity : Math.log(largest);
  if (set !== "B") return [Math.max(least, Math.log(limits.low)), Math.log(limits.high)];
  const centre = -count * limits.sigma ** 2;
  const reach = 9 * limits.sigma;
  return [Math.max(least, centre - reach), Math.max(least, centre) + reach];
}

function peakOf(
  set: PriorSet,
  count: number,
  squares: number,
  sigma: number,
  from: number,
  to: number,
): number {
  const free =
    set === "B" ? -count * sigma ** 2 : set === "C" && count > 0 ? Math.log(squares / count) / 2 : from;
  return Math.min(Math.max(free, from), to);
}

/** The point between the peak and a limit where the density has fallen by DEPTH e-folds; the limit when it has not. */
function edge(logDensity: (u: number) => number, top: number, peak: number, limit: number): number {
  if (top - logDensity(limit) < DEPTH) return limit;
  let [inside, outside] = [peak, limit];
  for (let step = 0; step < 30; step += 1) {
    const middle = (inside + outside) / 2;
    if (top - logDensity(middle) < DEPTH) inside = middle;
    else outside = middle;
  }
  return outside;
}

/** The d at which the degree of belief is reached: it rises from 0 to 1, so the root is bracketed and then closed in on. */
function solve(believed: (d: number) => number, probability: number, guess: number): number {
  let low = 0;
  let high = guess;
  while (believed(high) < probability && Number.isFinite(high)) {
    low = high;
    high *= 4;
  }
  let [atLow, atHigh] = [(low === 0 ? 0 : believed(low)) - probability, believed(high) - probability];
  // Regula falsi with the Illinois correction: superlinear, and never outside the bracket.
  for (let step = 0; step < 200 && high - low > 1e-12 * high; step += 1) {
    const next = (low * atHigh - high * atLow) / (atHigh - atLow);
    const at = believed(next) - probability;
    if (at === 0) return next;
    if (at > 0) {
      if (step > 0 && Math.abs(next - high) < 1e-11 * high) return next;
      high = next;
      atHigh = at;
      atLow /= 2;
    } else {
      if (step > 0 && Math.abs(next - low) < 1e-11 * high) return next;
      low = next;
      atLow = at;
      atHigh /= 2;
    }
  }
  return (low + high) / 2;
}
