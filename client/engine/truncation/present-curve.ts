/** Turns a curve into plain numbers at the points that are drawn. */
import { roundFloat } from "../evaluation.ts";
import type { Correlated } from "./correlated.ts";
import { drawnPlaces, type Curve } from "./curve.ts";
import type { BandAlong, CorrelatedValue, Covered, CurveValue, DrawnDensity } from "./curve-value.ts";
import type { Density } from "./density.ts";
import { describeFindings } from "./findings.ts";
import { omittedOf } from "./present.ts";
import {
  estimateSeries,
  setBands,
  type EstimateAtOrder,
  type PlainBand,
  type SeriesEstimate,
} from "./series.ts";
import { isPriorSet, type Method, type TruncationInputs } from "./shape.ts";
import { studentHalfWidth } from "./student-t.ts";

/** So many degrees of freedom are as good as normal. */
const NORMAL = 1e6;

const rounded = (value: number | null | undefined) =>
  value === null || value === undefined || !Number.isFinite(value) ? null : roundFloat(value);

export function presentCurve(inputs: TruncationInputs, curve: Curve): CurveValue {
  const { data, q, coefficients } = curve;
  const places = drawnPlaces(curve);
  const estimates = places.map((place) => estimateAlong(inputs, curve, place));
  const orders = data.orders.map(({ order, values }) => ({
    order,
    used: coefficients.orders.some((one) => one.order === order),
    values: places.map((place) => rounded(values[place])),
    coefficients: estimates.map((estimate) =>
      rounded(estimate?.coefficients.find((c) => c.order === order)?.value),
    ),
  }));
  const bands = bandsAlong(inputs, curve, estimates);
  const all = coefficients.orders.flatMap(({ values }) => [...values]);
  return {
    variable: curve.variable,
    xUnit: data.xUnit,
    at: roundFloat(data.x[curve.place] ?? NaN),
    count: data.x.length,
    x: places.map((place) => roundFloat(data.x[place] ?? NaN)),
    q: places.map((place) => rounded(q[place])),
    orders,
    bands,
    covered: covered(inputs, curve, places, bands),
    measured: places.flatMap((place) => {
      const [x, value] = [data.x[place], data.measured?.[place] ?? null];
      if (x === undefined || value === null) return [];
      return [{ x: roundFloat(x), value: roundFloat(value), error: rounded(data.measuredError?.[place]) }];
    }),
    spread:
      all.length === 0
        ? null
        : curve.correlated
          ? rounded(Math.sqrt(curve.correlated.spreadAt(Infinity)?.tau2 ?? NaN))
          : roundFloat(Math.sqrt(all.reduce((sum, c) => sum + c * c, 0) / all.length)),
    correlated: curve.correlated && presentCorrelated(curve.correlated),
  };
}

/** The estimates at a point; prior sets only at the last order, and at the others when one of them is highlighted. */
function estimateAlong(inputs: TruncationInputs, curve: Curve, place: number): SeriesEstimate | null {
  const series = curve.seriesAt(place);
  const q = curve.q[place] ?? NaN;
  const estimate = series && estimateSeries({ ...series, sets: null }, q);
  const { sets } = curve.series;
  if (!series || !estimate || !sets) return estimate;
  const method = inputs.method as Method; // a choice of the shape
  const isChosen = isPriorSet(method);
  const only = omittedOf("prior set A", inputs);
  const size = Math.abs(estimate.reference);
  const orders = estimate.orders.map((at, index): EstimateAtOrder => {
    if (!isChosen && index < estimate.orders.length - 1) return at;
    const used = estimate.coefficients.slice(0, index + 1).flatMap((c) => (c.used ? [c.value] : []));
    const bands = setBands(series, sets, q, at.nextOrder, used, only);
    return {
      ...at,
      bands: [...at.bands, ...bands.map((band) => ({ ...band, halfWidth: band.halfWidth * size }))],
    };
  });
  return { ...estimate, orders };
}

function bandsAlong(
  inputs: TruncationInputs,
  { data, estimate }: Curve,
  estimates: readonly (SeriesEstimate | null)[],
): BandAlong[] {
  const method = inputs.method as Method; // a choice of the shape
  const omitted = omittedOf(method, inputs);
  const bands = new Map<string, { band: PlainBand; order: number; halfWidths: (number | null)[] }>();
  const last = data.orders.at(-1)?.order ?? estimate.orders.at(-1)?.order;
  estimates.forEach((at, place) => {
    for (const { order, bands: found } of at?.orders ?? []) {
      for (const band of found) {
        if (order !== last && (band.method !== method || band.omitted !== omitted)) continue;
        const name = `${order} ${band.method} ${band.omitted} ${band.degree ?? ""}`;
        const known = bands.get(name) ?? { band, order, halfWidths: estimates.map(() => null) };
        known.halfWidths[place] = rounded(band.halfWidth);
        bands.set(name, known);
      }
    }
  });
  return [...bands.values()].map(({ band, order, halfWidths }) => ({
    method: band.method,
    omitted: band.omitted,
    degree: band.degree,
    order,
    halfWidths,
  }));
}

/**
 * Measured values against the intervals of the highlighted method around each order: inside when they differ by less than
 * the half-width, with their own error at the same degree of belief added in quadrature.
 */
function covered(
  inputs: TruncationInputs,
  { data, series, coefficients }: Curve,
  places: readonly number[],
  bands: readonly BandAlong[],
): Covered[] {
  const { measured, measuredError } = data;
  // Before the first coefficient an interval rests on the prior alone, and says nothing about these data.
  const first = coefficients.orders[0]?.order;
  if (!measured || first === undefined) return [];
  const omitted = omittedOf(inputs.method as Method, inputs); // a choice of the shape
  return bands.flatMap(({ method, omitted: of, degree, order, halfWidths }) => {
    const probability = series.degrees.find(({ text }) => text === degree)?.probability;
    const values = data.orders.find((one) => one.order === order)?.values;
    if (
      method !== inputs.method ||
      of !== omitted ||
      degree === null ||
      !probability ||
      !values ||
      order < first
    )
      return [];
    const quantile = studentHalfWidth(probability, NORMAL);
    const inside = places.flatMap((place, index) => {
      const [truth, value, half] = [
        measured[place] ?? null,
        values[place] ?? null,
        halfWidths[index] ?? null,
      ];
      if (truth === null || value === null || half === null) return [];
      return [Math.abs(truth - value) <= Math.hypot(half, quantile * (measuredError?.[place] ?? 0))];
    });
    return inside.length === 0
      ? []
      : [{ order, degree, inside: inside.filter(Boolean).length, count: inside.length }];
  });
}

function presentCorrelated({
  posterior,
  breakdown,
  names,
  fitted,
  checks,
  spreadAt,
}: Correlated): CorrelatedValue {
  const { chosen, length } = posterior;
  const spread = spreadAt(Infinity);
  const list = (values: readonly number[]) => values.map(roundFloat);
  return {
    points: fitted.x.length,
    spacing: roundFloat(((fitted.x.at(-1) ?? 0) - (fitted.x[0] ?? 0)) / Math.max(1, fitted.x.length - 1)),
    length: roundFloat(chosen.length),
    lengthPosterior: length && presentDensity(length, ""),
    breakdown:
      breakdown && posterior.breakdown
        ? {
            latex: breakdown.latex,
            stated: roundFloat(breakdown.stated),
            posterior: presentDensity(posterior.breakdown, breakdown.unit),
            alone:
              names.length > 1
                ? posterior.alone.map((density, index) => ({
                    name: names[index] ?? "",
                    density: list(density),
                  }))
                : [],
          }
        : null,
    nu: roundFloat(spread?.nu ?? NaN),
    tau2: roundFloat(spread?.tau2 ?? NaN),
    nugget: roundFloat(chosen.nugget),
    condition: Number(chosen.condition.toPrecision(3)),
    checks: {
      x: list(checks.x),
      beliefs: checks.beliefs,
      coverage: checks.coverage.map((one) => ({
        ...one,
        inside: list(one.inside),
        expected: one.expected.map(([low, high]) => [roundFloat(low), roundFloat(high)] as const),
      })),
      orders: checks.orders
        .filter(({ spread: known }) => known !== null)
        .map(({ order, distance, tail, expected: [low, high], pivoted, pivotedLimit }) => ({
          order,
          distance: roundFloat(distance),
          tail: roundFloat(tail),
          expected: [roundFloat(low), roundFloat(high)] as const,
          pivoted: list(pivoted),
          pivotedLimit: roundFloat(pivotedLimit),
        })),
    },
    findings: describeFindings(checks),
  };
}

function presentDensity(density: Density, unit: string): DrawnDensity {
  return {
    unit,
    grid: density.grid.map(roundFloat),
    density: density.density.map(roundFloat),
    mode: roundFloat(density.mode),
    median: roundFloat(density.median),
    intervals: density.intervals.map(({ degree, low, high }) => ({
      degree,
      low: roundFloat(low),
      high: roundFloat(high),
    })),
    cutAt: density.cutAt,
  };
}
