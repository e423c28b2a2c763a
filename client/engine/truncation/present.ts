/** Turns the estimates into the block's value: rounded, with the share of the uncertainty of Q. */
import { roundFloat } from "../evaluation.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";
import {
  estimateSeries,
  type EstimateAtOrder,
  type PlainBand,
  type Series,
  type SeriesEstimate,
} from "./series.ts";
import type { Method, Omitted, TruncationInputs } from "./shape.ts";
import type { Band, Coefficient, OrderEstimate, TruncationValue } from "./value.ts";

export function presentValue(
  inputs: TruncationInputs,
  series: Series,
  q: ExpansionParameter,
  estimate: SeriesEstimate,
): TruncationValue {
  const moved =
    q.sigma > 0
      ? [q.value - q.sigma, q.value + q.sigma].filter((at) => at > 0).map((at) => estimateSeries(series, at))
      : [];
  const orders = estimate.orders.map((at, index) =>
    presentOrder(
      at,
      moved.flatMap((other) => other?.orders[index] ?? []),
    ),
  );
  const squared = estimateSeries(series, q.value ** 2)?.orders.at(-1);
  return {
    unit: inputs.unit.trim(),
    reference: roundFloat(estimate.reference),
    q: { value: roundFloat(q.value), sigma: roundFloat(q.sigma), latex: q.latex },
    degrees: series.degrees,
    coefficients: presentCoefficients(inputs, estimate),
    orders,
    highlighted: highlightedBand(inputs, orders.at(-1)),
    rescaled: squared
      ? { q: roundFloat(q.value ** 2), bands: squared.bands.map((band) => presentBand(band, [])) }
      : null,
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

/** In the order of the table's rows by rising n; orders absent by symmetry carry null. */
function presentCoefficients(inputs: TruncationInputs, estimate: SeriesEstimate): Coefficient[] {
  const byOrder = new Map(estimate.coefficients.map((coefficient) => [coefficient.order, coefficient]));
  return inputs.orders
    .map(({ id, order }) => {
      const found = byOrder.get(Number(order));
      return {
        rowId: id,
        order: Number(order),
        value: found ? roundFloat(found.value) : null,
        used: found?.used ?? false,
      };
    })
    .sort((a, b) => a.order - b.order);
}

/** What the methods can estimate in closed form; the others only estimate the first omitted term. */
export function omittedOf(method: Method, wanted: Omitted): Omitted {
  return method === "conjugate prior" || method === "first omitted term" ? wanted : "first omitted term";
}

function highlightedBand(inputs: TruncationInputs, last: OrderEstimate | undefined): Band | null {
  // `method` and `omitted` are choices of the shape, so their text is one of these.
  const method = inputs.method as Method;
  const omitted = omittedOf(method, inputs.omitted as Omitted);
  return last?.bands.find((band) => band.method === method && band.omitted === omitted) ?? null;
}
