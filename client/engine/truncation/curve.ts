/** A Truncation error block along x: the point methods at one x and at all, and the correlated model on request. */
import type { Notice, Problem } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import type { Theory } from "../premises/theory.ts";
import { coefficientsAlong, isUsedIn, type CoefficientsAlong } from "./coefficients-along.ts";
import { correlate, type Correlated } from "./correlated.ts";
import { evenly, type CurveData, type CurveSource } from "./curve-data.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";
import { readParameterAlong, type ParameterAlong } from "./parameter-along.ts";
import { readNumber } from "./read-orders.ts";
import type { Settings } from "./read-settings.ts";
import { estimateSeries, type Series, type SeriesEstimate } from "./series.ts";
import type { TruncationInputs } from "./shape.ts";
import { rememberQuantiles } from "./student-t.ts";
import { rememberSums } from "./uniform-sum.ts";

/** All that a curve gives, before it is rounded and drawn. */
export interface Curve {
  readonly data: CurveData;
  readonly variable: string;
  readonly along: ParameterAlong;
  /** At every x. */
  readonly q: readonly number[];
  /** The point at which the methods stand side by side. */
  readonly place: number;
  readonly at: ExpansionParameter;
  /** The series at a point; null when the point lacks an order or a reference. */
  seriesAt(place: number): Series | null;
  readonly series: Series;
  readonly estimate: SeriesEstimate;
  readonly coefficients: CoefficientsAlong;
  readonly correlated: Correlated | null;
}

export type ReadCurve =
  | { readonly curve: Curve; readonly notices: readonly Notice[]; readonly problems: readonly Problem[] }
  | { readonly curve: null; readonly notices: readonly Notice[]; readonly problems: readonly Problem[] };

/** @param sources the data of the block and of further observables, by block id */
export function readCurve(
  inputs: TruncationInputs,
  settings: Settings,
  theory: Theory | null,
  sources: ReadonlyMap<string, CurveSource>,
  tell: EvaluationContext["tell"],
): ReadCurve {
  const problems: Problem[] = [];
  const notices: Notice[] = [];
  const nothing = (): ReadCurve => ({ curve: null, problems, notices });
  const source = sources.get(inputs.data);
  if (!source) return nothing();
  const { data } = source;
  if (data.x.length === 0 || data.orders.length === 0) {
    problems.push({ code: "curve-empty", path: ["data"], facts: {} });
    return nothing();
  }
  if (data.unitsDiffer) problems.push({ code: "curve-units-differ", path: ["data"], facts: {} });
  if (inputs.orders.length > 0) notices.push({ code: "orders-beside-data", path: ["orders"], facts: {} });
  const name = readSymbol(inputs.variable.trim() === "" ? data.xName : inputs.variable);
  const reading = readParameterAlong(
    {
      q: inputs.q,
      path: ["q"],
      variable: inputs.variable.trim() !== "" ? inputs.variable : name.ok ? data.xName : "x",
      xUnit: data.xUnit,
      breakdown: inputs.breakdown,
      x: data.x,
    },
    theory,
  );
  if (!reading.ok) {
    problems.push(...reading.problems);
    return nothing();
  }
  const { along } = reading;
  const q = data.x.map((x) => along.at(x));
  const coefficients = coefficientsAlong(data, q, settings.reference, isUsedIn(inputs, settings, data));
  const place = placeOf(inputs.at, data, problems);
  const correlated =
    inputs.method === "correlated along x" && problems.length === 0
      ? correlate({ inputs, settings, theory, sources, data, along, coefficients, notices, problems, tell })
      : null;
  const shared = {
    quantiles: rememberQuantiles(),
    sets: settings.sets && { ...settings.sets, sums: rememberSums() },
    spreadAlong: correlated?.spreadAt ?? null,
  };
  const seriesAt = (at: number) => seriesOf(data, at, inputs, settings, shared);
  const series = place === null ? null : seriesAt(place);
  if (place === null || problems.length > 0) return nothing();
  const at = along.withSigma(data.x[place] ?? NaN);
  const estimate = series && estimateSeries(series, at.value);
  if (!series) problems.push({ code: "point-incomplete", path: ["at"], facts: { x: data.x[place] ?? NaN } });
  else if (!estimate)
    problems.push({ code: "coefficients-not-finite", path: ["q"], facts: { value: at.value } });
  if (!series || !estimate) return nothing();
  notices.push(...leftOut(coefficients, data, q));
  const variable = name.ok ? name.value.latex : "x";
  return {
    curve: { data, variable, along, q, place, at, seriesAt, series, estimate, coefficients, correlated },
    problems,
    notices,
  };
}

/** The point nearest to the x typed; the middle one when none is. */
function placeOf(text: string, { x }: CurveData, problems: Problem[]): number | null {
  if (text.trim() === "") return Math.floor((x.length - 1) / 2);
  const wanted = readNumber(text)?.toFloat();
  const [least = NaN, most = NaN] = [x[0], x.at(-1)];
  if (wanted === undefined || wanted < least || wanted > most) {
    problems.push({ code: "at-unreadable", path: ["at"], facts: { text, least, most } });
    return null;
  }
  const misses = x.map((one) => Math.abs(one - wanted));
  return misses.indexOf(Math.min(...misses));
}

/** The orders that a point has; higher ones that are missing at the end are not known there. */
function seriesOf(
  data: CurveData,
  place: number,
  inputs: TruncationInputs,
  settings: Settings,
  shared: Pick<Series, "quantiles" | "sets" | "spreadAlong">,
): Series | null {
  const values = data.orders.map(({ values }) => values[place] ?? null);
  const end = values.indexOf(null);
  const present = end < 0 ? values : values.slice(0, end);
  if (present.length === 0 || values.slice(present.length).some((value) => value !== null)) return null;
  const reference = settings.reference ?? (data.reference ? (data.reference[place] ?? null) : null);
  if (reference === 0 || (reference === null && (data.reference !== null || present[0] === 0))) return null;
  let before = 0;
  const known = data.orders.slice(0, present.length).map(({ order }, index) => {
    const value = present[index] ?? NaN;
    const shift = value - before;
    before = value;
    return { rowId: `n${order}`, order, value, shift };
  });
  return {
    known,
    absent: data.absent,
    absentRows: data.absent.map((order) => ({ rowId: `n${order}`, order })),
    reference,
    includeOrderZero: inputs.first === "from c_0",
    degrees: settings.degrees,
    nu0: settings.nu0,
    tau0: settings.tau0,
    ...shared,
  };
}

/** What could not be used, said once for all points, with where Q reaches 1. */
function leftOut({ left }: CoefficientsAlong, { x }: CurveData, q: readonly number[]): Notice[] {
  const notices: Notice[] = [];
  const count = x.length;
  if (left.incomplete > 0)
    notices.push({ code: "points-incomplete", path: ["data"], facts: { points: left.incomplete, count } });
  if (left.zeroReference > 0)
    notices.push({
      code: "reference-vanishes",
      path: ["reference"],
      facts: { points: left.zeroReference, count },
    });
  if (left.outOfRange > 0)
    notices.push({
      code: "coefficients-out-of-range",
      path: ["data"],
      facts: { points: left.outOfRange, count },
    });
  const beyond = q.flatMap((one, place) => (one >= 1 ? [x[place] ?? NaN] : []));
  if (beyond.length > 0)
    notices.push({
      code: "q-beyond-one-along",
      path: ["q"],
      facts: { points: beyond.length, count, from: Math.min(...beyond), to: Math.max(...beyond) },
    });
  return notices;
}

/** Places of the points that are drawn. */
export function drawnPlaces({ data, place }: Pick<Curve, "data" | "place">): number[] {
  return [...new Set([...evenly(data.x.length, 119), place])].sort((a, b) => a - b);
}
