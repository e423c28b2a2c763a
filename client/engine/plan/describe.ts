/** Puts an order plan together as plain JSON. */
import { roundFloat } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import { entryLatex, leading, sizeOfEntry, type Entry } from "./entries.ts";
import { hasLeadingLoops, loopFactor, loopsForTarget, loopsOfInsertions } from "./loops.ts";
import { workingPoint } from "./powers.ts";
import type { PlanScales, PlanScaleRead } from "./read-scales.ts";
import { curvesOf, probeTable, shiftsOf, sigmaOfLeftOut } from "./scan.ts";
import { largestProbe, leftOutAt, type Expansion, type LeftOut } from "./sums.ts";
import { sizeOf, type PlanTerm } from "./terms.ts";
import type { OrderPlanValue, PlanEntry, PlanOrder, PlanScale } from "./value.ts";

/** Longer lists are cut to their largest entries; sums and counts are always over all. */
const MOST_LISTED = 40;

export function describePlan(
  expansion: Expansion,
  order: Rational | null,
  terms: readonly PlanTerm[],
  scales: PlanScales,
  theory: Theory,
): OrderPlanValue {
  const factor = loopFactor(theory);
  const orders = expansion.orders.map((at) => describeOrder(expansion, at, order, terms, factor, scales));
  const stop = orders.find(({ order: [at] }) => at?.text === order?.toString()) ?? orders.at(-1);
  const firstUnlisted = expansion.highestListed.plus(expansion.step);
  const text = order && shown(order);
  return {
    parameters: [
      {
        latex: `\\frac{${scales.probe.latex}}{${scales.heavy.latex}}`,
        value: roundFloat(scales.Q),
        sigma: roundFloat(scales.sigmaQ),
      },
    ],
    probe: describeScale(scales.probe),
    heavy: describeScale(scales.heavy),
    target: expansion.target,
    observable: expansion.observable,
    sumUsed: expansion.sumUsed,
    order: text,
    leftOut: {
      ...(stop?.leftOut ?? { listed: 0, unlisted: 0, used: 0 }),
      sigma: roundFloat(
        sigmaOfLeftOut(expansion, order ?? expansion.orders.at(-1) ?? Rational.zero, terms, scales),
      ),
    },
    firstOut: firstLeftOut(orders, order),
    firstUnlisted: { order: shown(firstUnlisted), size: roundFloat(expansion.Q ** firstUnlisted.toFloat()) },
    step: shown(expansion.step),
    largestProbe: stop?.largestProbe ?? 0,
    largestProbeIsHeavy: stop?.largestProbeIsHeavy ?? false,
    orders,
    loopFactor: factor === null ? null : roundFloat(factor),
    terms: terms.map((term) => ({
      rowId: term.rowId,
      latex: term.latex,
      order: shown(term.order),
      size: roundFloat(sizeOf(term, expansion.Q)),
      assigned: term.assigned !== null,
    })),
    shifts: shiftsOf(expansion, scales),
    probeTable: probeTable(expansion, scales),
    curves: curvesOf(expansion, scales),
  };
}

function describeScale({ value, sigma, latex, unit }: PlanScaleRead): PlanScale {
  return { value: roundFloat(value), sigma: roundFloat(sigma), latex, unit };
}

function describeEntry(entry: Entry, Q: number): PlanEntry {
  const counts = new Map<string, number>();
  for (const { term, count } of entry.insertions)
    counts.set(term.rowId, count + (counts.get(term.rowId) ?? 0));
  return {
    id: entry.id,
    latex: entryLatex(entry),
    order: [shown(entry.order)],
    size: roundFloat(sizeOfEntry(entry, Q)),
    insertions: [...counts].map(([termRowId, count]) => ({ termRowId, count })),
    role: entry.role,
    assigned: entry.insertions.some(({ term }) => term.assigned !== null),
  };
}

function describeOrder(
  expansion: Expansion,
  at: Rational,
  stop: Rational | null,
  terms: readonly PlanTerm[],
  factor: number | null,
  scales: PlanScales,
): PlanOrder {
  const own = at.sign() === 0 ? leading(terms) : expansion.entries.filter(({ order }) => order.equals(at));
  const sized = own.map((entry) => ({ entry, size: sizeOfEntry(entry, expansion.Q) }));
  const largest = [...sized].sort((a, b) => b.size - a.size).slice(0, MOST_LISTED);
  const sum = sized.reduce((total, { size }) => total + size, 0);
  const probe = largestProbe(expansion, at);
  // At order 0 the leading amplitude itself, of size 1, carries the loops.
  const estimate = factor && loopsForTarget(at.sign() === 0 ? 1 : sum, factor, expansion.target);
  const insertions = at.sign() === 0 ? 0 : loopsOfInsertions(own);
  const needed = hasLeadingLoops(terms) ? estimate : Math.min(insertions, estimate ?? insertions);
  return {
    order: [shown(at)],
    entries: largest.map(({ entry }) => describeEntry(entry, expansion.Q)),
    count: own.length,
    sum: roundFloat(sum),
    leftOut: rounded(leftOutAt(expansion, at, workingPoint)),
    largestProbe: roundFloat(
      probe.isHeavy ? scales.probe.value / scales.Q : probe.probe * scales.probe.value,
    ),
    largestProbeIsHeavy: probe.isHeavy,
    loops: { insertions, needed },
    included: stop === null || at.compare(stop) <= 0,
  };
}

function rounded({ listed, unlisted, used }: LeftOut): LeftOut {
  return { listed: roundFloat(listed), unlisted: roundFloat(unlisted), used: roundFloat(used) };
}

/** Of the lowest order beyond the cut, the largest. */
function firstLeftOut(orders: readonly PlanOrder[], stop: Rational | null): PlanEntry | null {
  if (stop === null) return null;
  return orders.find(({ included }) => !included)?.entries[0] ?? null;
}
