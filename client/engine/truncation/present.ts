/** Turns the estimates into the block's value: rounded, with the share of the uncertainty of Q. */
import { roundFloat } from "../evaluation.ts";
import type { Correlated } from "./correlated.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";
import {
  estimateSeries,
  type EstimateAtOrder,
  type PlainBand,
  type Series,
  type SeriesEstimate,
} from "./series.ts";
import { isPriorSet, type Method, type Omitted, type TruncationInputs } from "./shape.ts";
import type { Band, Coefficient, OrderEstimate, TruncationValue } from "./value.ts";

export function presentValue(
  inputs: TruncationInputs,
  series: Series,
  q: ExpansionParameter,
  estimate: SeriesEstimate,
  spreadsMoved: Correlated["spreadsMoved"] = null,
): TruncationValue {
  const moved =
    q.sigma > 0
      ? ([-1, 1] as const).flatMap((sign) => {
          const at = q.value + sign * q.sigma;
          const spreadAlong = spreadsMoved?.[sign < 0 ? 0 : 1] ?? null;
          return at > 0 ? [estimateSeries({ ...series, spreadAlong }, at)] : [];
        })
      : [];
  const orders = estimate.orders.map((at, index) =>
    presentOrder(
      at,
      moved.flatMap((other) => other?.orders[index] ?? []),
    ),
  );
  const squared = estimateSeries({ ...series, spreadAlong: null }, q.value ** 2)?.orders.at(-1);
  return {
    unit: inputs.unit.trim(),
    reference: roundFloat(estimate.reference),
    q: { value: roundFloat(q.value), sigma: roundFloat(q.sigma), latex: q.latex },
    degrees: series.degrees,
    coefficients: presentCoefficients(series, estimate),
    orders,
    highlighted: highlightedBand(inputs, orders.at(-1)),
    rescaled: squared
      ? { q: roundFloat(q.value ** 2), bands: squared.bands.map((band) => presentBand(band, [])) }
      : null,
    sets: series.sets && {
      low: series.sets.low,
      high: series.sets.high,
      sigma: series.sets.sigma,
      terms: series.sets.terms,
    },
    curve: null,
  };
}

function presentOrder(at: EstimateAtOrder, moved: readonly EstimateAtOrder[]): OrderEstimate {
  const { posterior, largest, bands, ...rest } = at;
  return {
    ...rest,
    largest: largest === null ? null : roundFloat(largest),
    posterior: posterior === null ? null : { nu: roundFloat(posterior.nu), tau2: roundFloat(posterior.tau2) },
    bands: bands.map((band) => presentBand(band, moved)),
  };
}

/** The larger of the two changes, since a half-width is seldom linear in Q. */
function presentBand(band: PlainBand, moved: readonly EstimateAtOrder[]): Band {
  const changes = moved.flatMap((other) =>
    other.bands
      .filter((candidate) => isSame(candidate, band))
      .map(({ halfWidth }) => Math.abs(halfWidth - band.halfWidth)),
  );
  return { ...band, halfWidth: roundFloat(band.halfWidth), fromQ: roundFloat(Math.max(0, ...changes)) };
}

function isSame(a: PlainBand, b: PlainBand): boolean {
  return a.method === b.method && a.omitted === b.omitted && a.degree === b.degree;
}

/** By rising n; orders absent by symmetry carry null. */
function presentCoefficients(series: Series, estimate: SeriesEstimate): Coefficient[] {
  const byOrder = new Map(estimate.coefficients.map((coefficient) => [coefficient.order, coefficient]));
  return [...series.known, ...series.absentRows]
    .map(({ rowId, order }) => {
      const found = byOrder.get(order);
      return {
        rowId,
        order,
        value: found ? roundFloat(found.value) : null,
        used: found?.used ?? false,
      };
    })
    .sort((a, b) => a.order - b.order);
}

/** What a method can estimate; some only estimate the first omitted term. */
export function omittedOf(method: Method, inputs: Pick<TruncationInputs, "omitted" | "terms">): Omitted {
  const wanted = inputs.omitted as Omitted; // a choice of the shape
  if (method === "uniform prior" || method === "differences of orders") return "first omitted term";
  if (!isPriorSet(method) || inputs.terms.trim() === "") return wanted;
  return inputs.terms.trim() === "1" ? "first omitted term" : "all omitted orders";
}

function highlightedBand(inputs: TruncationInputs, last: OrderEstimate | undefined): Band | null {
  const method = inputs.method as Method; // a choice of the shape
  const omitted = omittedOf(method, inputs);
  return last?.bands.find((band) => band.method === method && band.omitted === omitted) ?? null;
}
