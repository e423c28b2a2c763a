/** What a reader of an order plan should know beside the order. */
import type { Notice } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Theory } from "../premises/theory.ts";
import { HIGHEST_LOOKED_AT } from "./allowed-orders.ts";
import type { Entry } from "./entries.ts";
import { workingPoint } from "./powers.ts";
import type { PlanScales } from "./read-scales.ts";
import { leftOutAt, type Expansion } from "./sums.ts";
import { sizeOf, type PlanTerm } from "./terms.ts";

function caution(code: string, facts: Notice["facts"] = {}): Notice {
  return { code, path: [], facts };
}

export function planCautions(
  expansion: Expansion,
  order: Rational | null,
  terms: readonly PlanTerm[],
  scales: PlanScales,
  theory: Theory,
): Notice[] {
  const found: Notice[] = [];
  if (scales.Q > 0.5) found.push(caution("plan-slow", { Q: Number(scales.Q.toPrecision(3)) }));
  if (scales.Q + scales.sigmaQ >= 1)
    found.push(caution("plan-reaches-end", { Q: scales.Q, sigma: scales.sigmaQ }));
  found.push(...gaps(expansion, terms));
  for (const term of terms) {
    const size = sizeOf(term, expansion.Q);
    if (term.assigned && term.order.sign() === 0 && size > 1)
      found.push(
        caution("plan-assigned-large", {
          latex: term.latex,
          rowId: term.rowId,
          size: Number(size.toPrecision(3)),
        }),
      );
  }
  for (const term of theory.terms)
    if (!term.allowed && !term.kinetic)
      found.push(caution("plan-forbidden-term", { latex: term.latex, rowId: term.rowId }));
  const last = order ?? expansion.orders.at(-1);
  if (last) {
    const { listed, unlisted } = leftOutAt(expansion, last, workingPoint);
    if (
      expansion.sumUsed === "listed terms only" &&
      listed + unlisted >= expansion.target &&
      listed < expansion.target
    )
      found.push(caution("plan-tail-matters", { unlisted: Number(unlisted.toPrecision(3)) }));
    found.push(...rateCautions(expansion, last));
  }
  return found;
}

/** Beyond the orders looked at every step is taken to have terms. */
function mayExist(order: Rational, allowed: readonly Rational[]): boolean {
  const known = allowed.length > 0 && order.compare(Rational.of(HIGHEST_LOOKED_AT)) <= 0;
  return !known || allowed.some((one) => one.equals(order));
}

/** Orders below the highest listed at which operators may exist and none is listed: absent, or forgotten. */
function gaps({ highestListed, step, allowed }: Expansion, terms: readonly PlanTerm[]): Notice[] {
  const missing: string[] = [];
  for (let order = step; order.compare(highestListed) < 0; order = order.plus(step))
    if (mayExist(order, allowed) && !terms.some((term) => term.order.equals(order)))
      missing.push(order.toString());
  return missing.length === 0 ? [] : [caution("plan-gap", { orders: missing.join(", ") })];
}

/** Squares kept at an order where the interference of a single term of that order is missing, and what leads without it. */
function rateCautions({ observable, entries }: Expansion, kept: Rational): Notice[] {
  const isLoneTerm = ({ insertions }: Entry) => insertions.length === 1 && insertions[0]?.count === 1;
  const squares = entries.filter((entry) => entry.role === "square" && entry.order.compare(kept) <= 0);
  const [first] = [...squares].sort((a, b) => a.order.compare(b.order));
  if (observable === "rate without interference") {
    const lowest = [...entries].sort((a, b) => a.order.compare(b.order))[0];
    return lowest ? [caution("plan-square-leads", { order: lowest.order.toString() })] : [];
  }
  if (observable !== "rate with interference" || !first) return [];
  const hasInterference = entries.some(
    (entry) => entry.role === "interference" && isLoneTerm(entry) && entry.order.equals(first.order),
  );
  return hasInterference ? [] : [caution("plan-square-alone", { order: first.order.toString() })];
}
