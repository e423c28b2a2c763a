/**
 * Which points the correlated model is fitted to. Between points much closer than ℓ a smooth kernel allows differences
 * far below the digits of any data: there the matrix is singular, and what it would weigh is rounding. Points a fraction
 * of ℓ apart carry all that the kernel says the others do, and their number is the number of data.
 */
import { coefficientsAt } from "./coefficients-along.ts";
import { evenly } from "./curve-data.ts";
import { lengthRange, searchLengths } from "./length-search.ts";
import { likelihoodOf, type Observable, type Prior } from "./likelihood.ts";

/** Distances tried first, and at most, as parts of the whole range. */
const FIRST_PARTS = 15;
const FEWEST_PARTS = 4;
const ROUNDS = 6;
const WINDOW = 80;
/** A factor costs the cube of this and holds its square; more points than this are fitted by as many of them. */
const MOST = 600;
/** The factor by which a length found among neighbours may be wrong. */
const KNOWN = 3;
/** Points this much nearer than wanted are taken all the same: the next may be much too far. */
const SHORT = 0.85;

/** Real coefficients are no exact draws of a Gaussian process: what they do in directions fainter than this is not its business. */
const FAINTEST = 1e-4;

/**
 * How far apart, in units of ℓ, points must be for the smallest eigenvalue of R to stay above the nugget: it is about
 * exp(−π²ℓ²/2h²) for points h apart, from the spectrum of the kernel at the highest frequency they resolve. (Own derivation.)
 * @example apartFor(1e-8) // 0.73197…
 */
export function apartFor(nugget: number): number {
  return Math.PI / Math.sqrt(2 * Math.log(1 / Math.min(Math.max(nugget, FAINTEST), 0.1)));
}

export interface FitPoints {
  readonly observable: Observable;
  /** Where its length scale is to be looked for. */
  readonly range: readonly [number, number];
}

/** @param length as given; null is estimated, in turns with the distance of the points */
export function fitPoints(
  observable: Observable,
  length: number | null,
  prior: Prior,
  tell: () => void,
): FitPoints {
  const all = observable.coefficients;
  const whole = (all.x.at(-1) ?? 0) - (all.x[0] ?? 0);
  const apart = apartFor(observable.nugget);
  const gapFor = (scale: number) => Math.min(apart * scale, whole / FEWEST_PARTS);
  const placesFor = (gap: number) => {
    const places = placesApart(all.x, gap);
    return evenly(places.length, MOST).map((index) => places[index] ?? 0);
  };
  const at = (gap: number) => ({
    ...observable,
    coefficients: coefficientsAt(all, placesFor(gap)),
  });
  const chosen = (gap: number, best: number | null): FitPoints => {
    const points = at(gap);
    const [low, high] = lengthRange(points.coefficients.x);
    // With many points the length is known well by now, and each further one to be tried is dear.
    const isKnown = best !== null && points.coefficients.x.length > WINDOW;
    const range = isKnown
      ? ([Math.max(low, best / KNOWN), Math.min(high, best * KNOWN)] as const)
      : ([low, high] as const);
    return { observable: points, range };
  };
  if (length !== null) return chosen(gapFor(length), null);
  let best: number | null = null;
  let gap = whole / FIRST_PARTS;
  for (let round = 0; round < ROUNDS; round += 1) {
    const tried = windowOf(at(gap));
    const fits = searchLengths(
      likelihoodOf(tried, prior, [0, 0]),
      lengthRange(tried.coefficients.x),
      (fit) => fit.logLikelihood(0),
      tell,
      1,
    );
    best = fits.reduce((one, other) => (other.logLikelihood(0) > one.logLikelihood(0) ? other : one)).length;
    const wanted = gapFor(best);
    // A quarter more or less changes nothing that a reader would see; and more points than there are cannot be had.
    const isAll = placesApart(all.x, gap).length === all.x.length;
    if (Math.abs(wanted / gap - 1) < 0.25 || (isAll && wanted < gap)) break;
    // Too sparse a grid finds lengths at random: never more than three times as many points at once.
    gap = Math.max(wanted, gap / 3);
  }
  return chosen(gap, best);
}

/** Neighbours in the middle: enough to tell a length scale near their distance, which is all that is asked here. */
function windowOf(observable: Observable): Observable {
  const { coefficients } = observable;
  const count = Math.min(coefficients.x.length, WINDOW);
  const first = Math.floor((coefficients.x.length - count) / 2);
  const places = Array.from({ length: count }, (_, index) => first + index);
  return { ...observable, coefficients: coefficientsAt(coefficients, places) };
}

/** Places of points that are at least so far apart, from the first on. */
function placesApart(x: readonly number[], gap: number): number[] {
  const places: number[] = [];
  let last = -Infinity;
  x.forEach((at, place) => {
    if (at - last < SHORT * gap) return;
    places.push(place);
    last = at;
  });
  return places;
}
