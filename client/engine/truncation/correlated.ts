/** The correlated model of a block: reads its fields, fits it, checks it, and says what a reader should know. */
import { roundFloat, type Notice, type Problem } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { Theory } from "../premises/theory.ts";
import { whiten } from "./cholesky.ts";
import { checkConsistency, spreadOf, type Checks, type Spread } from "./checks.ts";
import { coefficientsAlong, isUsedIn, type CoefficientsAlong } from "./coefficients-along.ts";
import type { CurveData, CurveSource } from "./curve-data.ts";
import { jointPosterior, type BreakdownBelief, type JointPosterior } from "./joint-posterior.ts";
import { lengthRange } from "./length-search.ts";
import { factorOf } from "./kernel.ts";
import type { LengthFit, Observable } from "./likelihood.ts";
import { readParameterAlong, type BreakdownScale, type ParameterAlong } from "./parameter-along.ts";
import { readNumber } from "./read-orders.ts";
import type { Settings } from "./read-settings.ts";
import { typedOr, type TruncationInputs } from "./shape.ts";

export interface Correlated {
  readonly posterior: JointPosterior;
  readonly breakdown: BreakdownScale | null;
  readonly names: readonly string[];
  /** The coefficients that were fitted, at the points that were. */
  readonly fitted: CoefficientsAlong;
  /** As asked for, before it was raised. */
  readonly nugget: number;
  readonly checks: Checks;
  /** From the coefficients through an order. */
  spreadAt: SpreadAt;
  /** The same with Q a standard uncertainty lower, and higher, at every point at once; null when Q has none. */
  readonly spreadsMoved: readonly [SpreadAt, SpreadAt] | null;
}
export type SpreadAt = (order: number) => Spread | null;

interface Given {
  readonly inputs: TruncationInputs;
  readonly settings: Settings;
  readonly theory: Theory | null;
  readonly sources: ReadonlyMap<string, CurveSource>;
  readonly data: CurveData;
  readonly along: ParameterAlong;
  readonly coefficients: CoefficientsAlong;
  readonly notices: Notice[];
  readonly problems: Problem[];
  readonly tell: EvaluationContext["tell"];
}

const SMALLEST_NUGGET = 1e-8;
const LARGEST_NUGGET = 0.1;
/** Each is a fit of its own. */
const MOST_OBSERVABLES = 8;
/** Fewer points have no length scale. */
const FEWEST_POINTS = 3;

/** Null when it cannot be computed; why is among the problems. */
export function correlate(given: Given): Correlated | null {
  const { inputs, settings, along, coefficients, problems, notices, tell } = given;
  const wrong = (code: string, field: string, facts: Problem["facts"] = {}) => {
    problems.push({ code, path: [field], facts });
    return null;
  };
  if (coefficients.orders.length === 0) return wrong("correlated-without-coefficients", "data");
  const different = differentOf(coefficients.x);
  if (different < FEWEST_POINTS)
    return wrong("correlated-few-points", "data", { points: different, fewest: FEWEST_POINTS });
  if (coefficients.orders.every(({ values }) => values.every((value) => value === 0)))
    return wrong("correlated-all-zero", "data");
  const typed = (field: "length" | "nugget") => {
    if (inputs[field].trim() === "") return null;
    const value = readNumber(inputs[field])?.toFloat() ?? NaN;
    const fits = field === "length" ? value > 0 : value > 0 && value <= LARGEST_NUGGET;
    if (!fits)
      wrong(field === "length" ? "length-unreadable" : "nugget-unreadable", field, {
        text: inputs[field],
        largest: LARGEST_NUGGET,
      });
    return fits ? value : null;
  };
  const length = typed("length");
  const nugget = typed("nugget");
  const belief = along.breakdown ? readBelief(given, along.breakdown) : null;
  const others = readOthers(given);
  if (problems.length > 0) return null;
  if (!along.breakdown) notices.push({ code: "breakdown-not-in-q", path: ["q"], facts: {} });

  const main = observableOf(given.data, coefficients, along, nugget);
  const observables = [main, ...others.map(({ observable }) => observable)];
  const posterior = jointPosterior(
    observables,
    observables.map((_, index) => (index === 0 ? length : null)),
    settings,
    belief,
    settings.degrees,
    (done) => tell({ done, of: null, part: "length scales fitted" }),
  );
  const fitted = posterior?.fitted[0]?.coefficients;
  if (!posterior || !fitted) return wrong("correlated-without-coefficients", "data");
  const { chosen } = posterior;
  const checks = checkConsistency(fitted, chosen, settings);
  notices.push(...cautions(posterior, fitted, main.nugget, coefficients.x.length, length));
  const spreadFrom =
    (squares: readonly number[]): SpreadAt =>
    (order) =>
      spreadOf(
        squares.slice(0, fitted.orders.filter((one) => one.order <= order).length),
        fitted.x.length,
        settings,
      );
  return {
    posterior,
    breakdown: along.breakdown,
    names: [given.sources.get(inputs.data)?.name ?? "", ...others.map(({ name }) => name)],
    fitted,
    nugget: main.nugget,
    checks,
    spreadAt: spreadFrom(chosen.squares),
    spreadsMoved: movedSpreads(fitted, along, chosen, spreadFrom),
  };
}

/**
 * The scales that make Q uncertain are the same at every point, so Q moves at all of them together: the coefficients are
 * those of Q(x) ± its standard uncertainty there. ℓ stays as fitted: it is read from how alike neighbours are, which a
 * common factor does not change.
 */
function movedSpreads(
  fitted: CoefficientsAlong,
  along: ParameterAlong,
  { length, nugget }: LengthFit,
  spreadFrom: (squares: readonly number[]) => SpreadAt,
): readonly [SpreadAt, SpreadAt] | null {
  const shares = fitted.x.map((x) => {
    const { value, sigma } = along.withSigma(x);
    return sigma / value;
  });
  if (!shares.some((share) => share > 0)) return null;
  const { factor } = factorOf(fitted.x, length, nugget);
  const moved = (sign: -1 | 1) =>
    spreadFrom(
      fitted.orders.map(({ power, values }) => {
        const there = values.map((c, point) => c * (1 + sign * (shares[point] ?? 0)) ** -power);
        return whiten(factor, there).reduce((sum, z) => sum + z * z, 0);
      }),
    );
  return [moved(-1), moved(1)];
}

/** How many x there are; those that differ only in the last digits of a double count as one. */
function differentOf(x: readonly number[]): number {
  return new Set(x.map((at) => at.toPrecision(9))).size;
}

function observableOf(
  data: CurveData,
  coefficients: CoefficientsAlong,
  along: ParameterAlong,
  nugget: number | null,
): Observable {
  return {
    coefficients,
    parameterAt: along.breakdown && !along.isInverse ? (x, s) => along.at(x, Math.exp(s)) : null,
    nugget: nugget ?? Math.min(LARGEST_NUGGET, Math.max(SMALLEST_NUGGET, rounding(data, coefficients))),
  };
}

/**
 * Variance that the last digit of the data gives the coefficients, in units of their mean square: a step u spreads a
 * value by u²/12, and a shift by twice that.
 */
function rounding({ resolution }: CurveData, { orders, q, reference }: CoefficientsAlong): number {
  let [noise, size, count] = [0, 0, 0];
  for (const { power, values } of orders) {
    values.forEach((value, point) => {
      noise += (resolution ** 2 / 6) * ((reference[point] ?? NaN) * (q[point] ?? NaN) ** power) ** -2;
      size += value * value;
      count += 1;
    });
  }
  if (count === 0 || size === 0) return 0;
  // Sizes at the ends of what a double holds: then nothing is known of their digits.
  return Number.isFinite(noise / size) ? noise / size : LARGEST_NUGGET;
}

function readBelief({ inputs, theory, problems }: Given, scale: BreakdownScale): BreakdownBelief | null {
  const limit = (field: "breakdownFrom" | "breakdownTo", otherwise: number) => {
    const text = inputs[field];
    if (text.trim() === "") return otherwise * scale.stated;
    const reading = readQuantity(
      text,
      theory ? declaredScales(theory) : { lookUp: () => null, symbols: [] },
      field,
    );
    const bare = readNumber(text)?.toFloat();
    if (bare !== undefined && bare > 0) return bare;
    if (
      reading.ok &&
      reading.value.quantity.energy.equals(scale.quantity.energy) &&
      reading.value.quantity.value > 0
    )
      return reading.value.quantity.value / scale.unitSize;
    problems.push({ code: "breakdown-limit-unreadable", path: [field], facts: { text, unit: scale.unit } });
    return NaN;
  };
  const [from, to] = [limit("breakdownFrom", 0.25), limit("breakdownTo", 4)];
  if (from >= to)
    problems.push({
      code: "breakdown-limits-reversed",
      path: ["breakdownTo"],
      facts: { from: roundFloat(from) },
    });
  const width = readNumber(typedOr(inputs, "breakdownWidth"))?.toFloat() ?? NaN;
  if (inputs.breakdownPrior === "normal in its logarithm" && !(width > 0))
    problems.push({
      code: "breakdown-width-unreadable",
      path: ["breakdownWidth"],
      facts: { text: inputs.breakdownWidth },
    });
  const logPrior = (s: number) =>
    inputs.breakdownPrior === "uniform"
      ? s
      : inputs.breakdownPrior === "normal in its logarithm"
        ? -0.5 * (s / width) ** 2
        : 0;
  return {
    logPrior,
    range: [Math.log(from / scale.stated), Math.log(to / scale.stated)],
    stated: scale.stated,
  };
}

/** Further observables; what is wrong with one is said at its row. */
function readOthers(given: Given): { observable: Observable; name: string }[] {
  const { inputs, settings, theory, sources, problems } = given;
  if (inputs.observables.length > MOST_OBSERVABLES)
    problems.push({ code: "observables-too-many", path: ["observables"], facts: { most: MOST_OBSERVABLES } });
  return inputs.observables.flatMap((row) => {
    const source = sources.get(row.data);
    if (!source) return [];
    if (row.data === inputs.data) {
      problems.push({ code: "observable-twice", path: ["observables", row.id, "data"], facts: {} });
      return [];
    }
    const { data, name } = source;
    const reading = readParameterAlong(
      {
        q: row.q.trim() === "" ? inputs.q : row.q,
        path: ["observables", row.id, "q"],
        variable: inputs.variable.trim() === "" ? data.xName : inputs.variable,
        xUnit: data.xUnit,
        breakdown: inputs.breakdown,
        x: data.x,
      },
      theory,
    );
    if (!reading.ok) {
      problems.push(...reading.problems);
      return [];
    }
    const q = data.x.map((x) => reading.along.at(x));
    const coefficients = coefficientsAlong(data, q, settings.reference, isUsedIn(inputs, settings, data));
    const different = coefficients.orders.length === 0 ? 0 : differentOf(coefficients.x);
    if (different < FEWEST_POINTS) {
      problems.push({
        code: "correlated-few-points",
        path: ["observables", row.id, "data"],
        facts: { points: different, fewest: FEWEST_POINTS },
      });
      return [];
    }
    return [{ observable: observableOf(data, coefficients, reading.along, null), name }];
  });
}

function cautions(
  { breakdown, length, chosen }: JointPosterior,
  fitted: CoefficientsAlong,
  nugget: number,
  count: number,
  given: number | null,
): Notice[] {
  const notices: Notice[] = [];
  const tell = (code: string, field: string, facts: Notice["facts"]) =>
    notices.push({ code, path: [field], facts });
  const number = (value: number) => Number(value.toPrecision(3));
  const [shortest] = lengthRange(fitted.x);
  if (fitted.x.length < count)
    tell("points-thinned", "data", { points: fitted.x.length, count, length: number(chosen.length) });
  if (given === null && chosen.length < 2 * shortest)
    tell("length-not-resolved", "length", { length: number(chosen.length), spacing: number(2 * shortest) });
  if (length?.cutAt === "high" || length?.cutAt === "both") tell("length-beyond-range", "length", {});
  if (chosen.nugget > nugget)
    tell("kernel-regularised", "nugget", {
      asked: nugget,
      nugget: chosen.nugget,
      condition: number(chosen.condition),
    });
  else if (nugget > 1e-4) tell("values-rounded", "data", { nugget: number(nugget) });
  if (breakdown?.cutAt) tell("breakdown-at-limit", "breakdownPrior", { end: breakdown.cutAt });
  return notices;
}
