/**
 * Which points the correlated model is fitted to. Between points much closer than ℓ a smooth kernel allows differences
 * far below the digits of any data: there the matrix is singular, and what it would weigh is rounding. Points a fraction
 * of ℓ apart carry all that the kernel says the others do, and their number is the number of data.
 */
import { coefficientsAt } from "./coefficients-along.ts";
import { evenly } from "./curve-data.ts";
import { lengthRange, searchLengths } from "./length-search.ts";
import { likelihoodOf, type Observable, type Prior } from "./likelihood.ts";

const FIRST_POINTS = 16;
const FEWEST = 5;
const ROUNDS = 6;

/**
 * How far apart, in units of ℓ, points must be for the smallest eigenvalue of R to stay above the nugget: it is about
 * exp(−π²ℓ²/2h²) for points h apart, from the spectrum of the kernel at the highest frequency they resolve. (Own derivation.)
 * @example apartFor(1e-8) // 0.51758…
 */
export function apartFor(nugget: number): number {
  return Math.PI / Math.sqrt(2 * Math.log(1 / Math.min(Math.max(nugget, 1e-12), 0.1)));
}

/** @param length as given; null is estimated, with the number of points, in turns */
export function fitPoints(
  observable: Observable,
  length: number | null,
  prior: Prior,
  tell: () => void,
): Observable {
  const all = observable.coefficients;
  const whole = (all.x.at(-1) ?? 0) - (all.x[0] ?? 0);
  const apart = apartFor(observable.nugget);
  const countFor = (scale: number) =>
    Math.min(all.x.length, Math.max(FEWEST, 1 + Math.floor(whole / (apart * scale))));
  const at = (count: number) => ({
    ...observable,
    coefficients: coefficientsAt(all, evenly(all.x.length, count)),
  });
  if (length !== null) return at(countFor(length));
  let count = Math.min(all.x.length, FIRST_POINTS);
  for (let round = 0; round < ROUNDS; round += 1) {
    const tried = at(count);
    const fits = searchLengths(
      likelihoodOf(tried, prior, [0, 0]),
      lengthRange(tried.coefficients.x),
      (fit) => fit.logLikelihood(0),
      tell,
      1,
    );
    const best = fits.reduce((one, other) => (other.logLikelihood(0) > one.logLikelihood(0) ? other : one));
    const wanted = countFor(best.length);
    // Fewer than a quarter more or less changes nothing that a reader would see.
    if (wanted === count || Math.abs(wanted - count) < count / 4) break;
    // Too sparse a grid finds lengths at random: never more than three times as many at once.
    count = Math.min(wanted, 3 * count);
  }
  return at(count);
}
