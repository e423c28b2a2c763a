/** What a reader must know beside the numbers: refused methods, and the assumptions that the data strain. */
import type { Notice, Problem } from "../evaluation.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";
import { omittedOf } from "./present.ts";
import type { Series } from "./series.ts";
import { isPriorSet, type Method, type Omitted, type TruncationInputs } from "./shape.ts";
import type { OrderEstimate, TruncationValue } from "./value.ts";

export interface Verdict {
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
}

export function judge(
  inputs: TruncationInputs,
  series: Series,
  q: ExpansionParameter,
  value: TruncationValue,
): Verdict {
  const last = value.orders.at(-1);
  if (!last) return { problems: [], notices: [] };
  const method = inputs.method as Method; // a choice of the shape
  const omitted = omittedOf(method, inputs);
  const problems = value.highlighted ? [] : [refusal(method, omitted, q, value, last)];
  const notices: Notice[] = [];
  const tell = (code: string, path: readonly string[], facts: Notice["facts"] = {}) =>
    notices.push({ code, path, facts });

  if (q.value >= 1 && value.highlighted) tell("q-not-below-one", ["q"], { value: value.q.value });
  if (q.value < 1 && q.value + q.sigma >= 1)
    tell("q-may-reach-one", ["q"], { value: value.q.value, sigma: value.q.sigma });
  if (omitted !== inputs.omitted && inputs.terms.trim() === "")
    tell("only-first-omitted-term", ["omitted"], { method });
  const lowest = series.known[0];
  if (series.reference === null && lowest) {
    if (series.includeOrderZero && lowest.order === 0) tell("leading-coefficient-excluded", ["first"]);
    if (lowest.order > 0) tell("reference-from-order", ["reference"], { order: lowest.order });
  }
  if (last.coefficientCount === 0) tell("methods-without-coefficients", ["orders"]);
  if (last.coefficientCount === 1) tell("one-coefficient", ["orders"]);
  if (last.largest === 0) tell("coefficients-vanish", ["orders"]);
  if (method === "conjugate prior" && last.posterior && last.posterior.nu <= 2) {
    tell("variance-infinite", ["nu0"], { nu: last.posterior.nu });
  }
  return { problems, notices };
}

function refusal(
  method: Method,
  omitted: Omitted,
  q: ExpansionParameter,
  { curve, sets }: TruncationValue,
  last: OrderEstimate,
): Problem {
  if (method === "correlated along x" && curve === null)
    return { code: "correlated-needs-data", path: ["method"], facts: {} };
  if (omitted === "all omitted orders" && q.value >= 1 && (sets?.terms ?? null) === null)
    return { code: "sum-needs-q-below-one", path: ["q"], facts: { value: q.value } };
  if (sets && isPriorSet(method) && (last.largest ?? 0) > sets.high)
    return {
      code: "cbar-excluded",
      path: ["cbarHigh"],
      facts: { largest: last.largest ?? 0, high: sets.high },
    };
  const nothingKnown = method === "conjugate prior" ? last.posterior === null : last.largest === null;
  if (nothingKnown) return { code: "method-without-coefficients", path: ["orders"], facts: { method } };
  return { code: "error-not-finite", path: ["belief"], facts: { method } };
}
