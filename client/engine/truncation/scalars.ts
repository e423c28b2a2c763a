/** The numbers of a truncation estimate that can be pinned into prose. */
import { roundFloat, type Scalar, type ScalarValue } from "../evaluation.ts";
import type { Method } from "./shape.ts";
import type { Band, OrderEstimate, TruncationValue } from "./value.ts";

const shortNames: Readonly<Record<Method, string>> = {
  "conjugate prior": "conjugate",
  "uniform prior": "uniform",
  "prior set A": "setA",
  "prior set B": "setB",
  "prior set C": "setC",
  "first omitted term": "first-omitted",
  "differences of orders": "differences",
  "correlated along x": "correlated",
};

/**
 * The last order's estimates carry short ids, "conjugate/68", and so move on when an order is added; each order's own
 * carry its row id before them. Where a method estimates two things, the one that is not its usual says so:
 * "conjugate-first/68" for the first omitted term alone, "first-omitted-all" for the geometric sum.
 */
export function describeScalars(value: TruncationValue): Scalar[] {
  const last = value.orders.at(-1);
  if (!last) return [];
  const scalars: Scalar[] = [
    {
      id: "Q",
      label: value.q.latex === "Q" ? "expansion parameter $Q$" : `expansion parameter $Q = ${value.q.latex}$`,
      value: number(value.q.value, value.q.sigma),
    },
    { id: "order", label: "highest order known", value: { type: "exact", text: String(last.order) } },
    {
      id: "next-order",
      label: "first order left out",
      value: { type: "exact", text: String(last.nextOrder) },
    },
  ];
  const best = value.highlighted;
  if (best) {
    scalars.push({
      id: "value",
      label: `$X$ through order ${last.order} with its truncation error (${nameOf(best)})`,
      value: number(last.value, best.halfWidth, value.unit),
    });
    scalars.push({
      id: "error",
      label: `truncation error after order ${last.order}: ${nameOf(best)}`,
      value: number(best.halfWidth, 0, value.unit),
    });
    if (Number.isFinite(best.halfWidth / Math.abs(last.value))) {
      scalars.push({
        id: "relative-error",
        label: `the same relative to $X$`,
        value: number(best.halfWidth / Math.abs(last.value)),
      });
    }
  }
  scalars.push(...bandScalars("", last, value.unit));
  for (const { order, value: coefficient } of value.coefficients) {
    if (coefficient !== null)
      scalars.push({
        id: `coefficients/${order}`,
        label: `coefficient $c_{${order}}$`,
        value: number(coefficient),
      });
  }
  for (const at of value.orders) {
    scalars.push({
      id: `${at.rowId}/value`,
      label: `$X$ through order ${at.order}`,
      value: number(at.value, 0, value.unit),
    });
    scalars.push(...bandScalars(`${at.rowId}/`, at, value.unit));
  }
  return scalars;
}

function bandScalars(prefix: string, at: OrderEstimate, unit: string): Scalar[] {
  return at.bands.map((band) => ({
    id: `${prefix}${shortNames[band.method]}${variant(band)}${band.degree === null ? "" : `/${band.degree}`}`,
    label: `truncation error after order ${at.order}: ${nameOf(band)}`,
    value: number(band.halfWidth, 0, unit),
  }));
}

/** Where a method estimates two things, the one that is not its usual says so. */
function variant({ method, omitted }: Band): string {
  if (method === "first omitted term") return omitted === "all omitted orders" ? "-all" : "";
  return method !== "uniform prior" && method !== "differences of orders" && omitted === "first omitted term"
    ? "-first"
    : "";
}

function nameOf({ method, omitted, degree }: Band): string {
  const what = method === omitted || method === "differences of orders" ? "" : `, ${omitted}`;
  return `${method}${what}${degree === null ? "" : `, ${degree} %`}`;
}

function number(value: number, sigma = 0, unit = ""): ScalarValue {
  return {
    type: "number",
    value: roundFloat(value),
    ...(sigma > 0 ? { sigma } : {}),
    ...(unit === "" ? {} : { unit }),
  };
}
