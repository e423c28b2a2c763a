/** What a reader must know beside the numbers: refused methods, and the assumptions that the data strain. */
import type { Notice, Problem } from "../evaluation.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";
import { omittedOf } from "./present.ts";
import type { Series } from "./series.ts";
import type { Method, Omitted, TruncationInputs } from "./shape.ts";
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
  const wanted = inputs.omitted as Omitted; // a choice of the shape
  const problems = value.highlighted ? [] : [refusal(method, omittedOf(method, wanted), q, last)];
  const notices: Notice[] = [];
  const tell = (code: string, path: readonly string[], facts: Notice["facts"] = {}) =>
    notices.push({ code, path, facts });

  if (q.value >= 1 && value.highlighted) tell("q-not-below-one", ["q"], { value: value.q.value });
  if (q.value < 1 && q.value + q.sigma >= 1)
    tell("q-may-reach-one", ["q"], { value: value.q.value, sigma: value.q.sigma });
  if (omittedOf(method, wanted) !== wanted) tell("only-first-omitted-term", ["omitted"], { method });
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

function refusal(method: Method, omitted: Omitted, q: ExpansionParameter, last: OrderEstimate): Problem {
  if (omitted === "all omitted orders" && q.value >= 1)
    return { code: "sum-needs-q-below-one", path: ["q"], facts: { value: q.value } };
  const nothingKnown = method === "conjugate prior" ? last.posterior === null : last.largest === null;
  if (nothingKnown) return { code: "method-without-coefficients", path: ["orders"], facts: { method } };
  return { code: "error-not-finite", path: ["belief"], facts: { method } };
}
