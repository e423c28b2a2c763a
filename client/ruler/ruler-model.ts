/**
 * What the ruler is drawn from: numbers that the engine has given, gathered. Nothing is computed here but what follows
 * from them by their exponents: size(p′) = size(p) (p′/p)^(Δ − d).
 */
import type { OrderPlanValue, PlanEntry } from "#engine/plan/value.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import type { ScalingClass, ScalingValue } from "#engine/scaling/value.ts";
import type { TruncationValue } from "#engine/truncation/value.ts";
import { plainLatex } from "../blocks/parts/plain-latex.ts";
import { shortLabel } from "./short-label.ts";

export interface RulerMark {
  readonly id: string;
  /** Short, for beside the mark: "c₆ χ⁶". */
  readonly label: string;
  /** In full, for speech and for the panel. */
  readonly latex: string;
  readonly spoken: string;
  /** Rows of the premises it consists of. */
  readonly rowIds: readonly string[];
  /** How many terms are inserted: 1 for a term on its own. */
  readonly insertions: number;
  /** Power of Q that it costs. */
  readonly order: number;
  /** At the probe scale of the premises. */
  readonly size: number;
  /** Power of p with which the size grows. */
  readonly power: number;
  readonly scalingClass: ScalingClass;
  readonly assigned: boolean;
}

export interface RulerScale {
  readonly name: string;
  readonly value: number;
  readonly sigma: number;
  readonly unit: string;
}

export interface RulerOrder {
  readonly text: string;
  readonly order: number;
  /** What is left out when one stops here, at the probe scale of the premises. */
  readonly leftOut: number;
  /** The same against p, from the plan's curves; empty where the plan draws none. */
  readonly curve: readonly (readonly [probe: number, leftOut: number])[];
}

export interface RulerModel {
  readonly marks: readonly RulerMark[];
  readonly probe: RulerScale;
  readonly heavy: RulerScale;
  readonly Q: { readonly value: number; readonly sigma: number };
  /** Null without an Order plan: then nothing says what is left out. */
  readonly target: number | null;
  readonly orders: readonly RulerOrder[];
}

/** A band of relative errors: the least and the largest that the methods of a Truncation error block give. */
export interface EstimateBand {
  readonly low: number;
  readonly high: number;
  readonly words: string;
}

/** Products past this many would be a comb, not a reading. */
const MOST_PRODUCTS = 24;

export function modelOfPlan(plan: OrderPlanValue, premises: PremisesValue): RulerModel | null {
  const [Q] = plan.parameters;
  if (!Q || !(Q.value > 0)) return null;
  const powers = excesses(premises);
  const entries = plan.orders.flatMap((order) => order.entries);
  const marks = entries.map((entry) => markOfEntry(entry, plan.observable, powers));
  const singles = marks.filter(({ insertions }) => insertions === 1);
  const products = marks.filter(({ insertions }) => insertions > 1).slice(0, MOST_PRODUCTS);
  return {
    marks: [...singles, ...products].filter(isDrawable),
    probe: scaleOf(plan.probe),
    heavy: inUnitOf(plan.probe, scaleOf(plan.heavy), Q.value),
    Q,
    target: plan.target,
    orders: plan.orders.map(({ order: [at], leftOut }) => ({
      text: at?.text ?? "0",
      order: floatOf(at?.text ?? "0"),
      leftOut: leftOut.used,
      curve:
        plan.curves
          .find(({ order }) => order.text === at?.text)
          ?.points.map((point) => [point.probe, point.leftOut] as const) ?? [],
    })),
  };
}

/** Without a plan there are sizes all the same, but no target and nothing left out. */
export function modelOfScaling(scaling: ScalingValue): RulerModel | null {
  const { probe, heavy, expansion } = scaling;
  if (!probe?.size || !heavy?.size || !expansion || !(expansion.value > 0)) return null;
  const marks = scaling.rows.flatMap((row): RulerMark[] => {
    const excess = -floatOf(row.coefficient.text);
    if (row.kinetic || !row.size || !row.scalingClass || !Number.isFinite(excess)) return [];
    return [
      {
        id: row.rowId,
        label: shortLabel(row.latex),
        latex: row.latex,
        spoken: plainLatex(row.latex),
        rowIds: [row.rowId],
        insertions: 1,
        order: Math.max(0, excess),
        size: row.size.value,
        power: excess,
        scalingClass: row.scalingClass,
        assigned: row.sizeFrom === "assigned",
      },
    ];
  });
  return {
    marks: marks.filter(isDrawable),
    probe: scaleOf({ latex: probe.latex, ...probe.size }),
    heavy: inUnitOf(probe.size, scaleOf({ latex: heavy.latex, ...heavy.size }), expansion.value),
    Q: expansion,
    target: null,
    orders: [],
  };
}

/** Of the highest order that is known, at the first degree of belief; null when no method gives a size. */
export function bandOf(truncation: TruncationValue): EstimateBand | null {
  const last = truncation.orders.at(-1);
  const [degree] = truncation.degrees;
  if (!last || last.value === 0) return null;
  const sizes = last.bands
    .filter((band) => band.degree === null || band.degree === degree?.text)
    .map(({ halfWidth }) => Math.abs(halfWidth / last.value))
    .filter((size) => size > 0 && Number.isFinite(size));
  if (sizes.length === 0) return null;
  return {
    low: Math.min(...sizes),
    high: Math.max(...sizes),
    words: degree ? `truncation error, ${degree.text} %` : "truncation error",
  };
}

function markOfEntry(
  entry: PlanEntry,
  observable: OrderPlanValue["observable"],
  powers: ReadonlyMap<string, number>,
): RulerMark {
  const count = entry.insertions.reduce((sum, insertion) => sum + insertion.count, 0);
  // Where nothing interferes, the least that a term does to a rate is its own square.
  const isOwnSquare = observable === "rate without interference" && entry.insertions.length === 1;
  const power = entry.insertions.reduce(
    (sum, insertion) => sum + insertion.count * (powers.get(insertion.termRowId) ?? 0),
    0,
  );
  const twice = count === 2 && entry.insertions.length === 1 && entry.role === "insertion";
  const base = shortLabel(twice ? entry.latex.replace(/\^\{2\}$/, "") : entry.latex);
  return {
    id: entry.id,
    label: base,
    latex: entry.latex,
    spoken: plainLatex(entry.latex),
    rowIds: entry.insertions.map(({ termRowId }) => termRowId),
    insertions: isOwnSquare && count === 2 ? 1 : count,
    order: floatOf(entry.order[0]?.text ?? "0"),
    size: entry.size,
    power,
    scalingClass: power < 0 ? "relevant" : power === 0 ? "marginal" : "irrelevant",
    assigned: entry.assigned,
  };
}

/** Δ − d of every term, by row: minus the dimension of its coefficient. */
function excesses({ terms }: PremisesValue): ReadonlyMap<string, number> {
  return new Map(terms.map(({ rowId, coefficient }) => [rowId, 0 - floatOf(coefficient.text)]));
}

function scaleOf({ latex, value, sigma, unit }: OrderPlanValue["probe"]): RulerScale {
  return { name: plainLatex(latex), value, sigma, unit };
}

/** The heavy scale in the probe's unit, whatever unit it was typed in: only so can both be on one rail. */
function inUnitOf(
  probe: { readonly value: number; readonly unit: string },
  heavy: RulerScale,
  Q: number,
): RulerScale {
  const value = probe.value / Q;
  return { ...heavy, value, sigma: (heavy.sigma / heavy.value) * value, unit: probe.unit };
}

const isDrawable = ({ size, power }: RulerMark) =>
  size > 0 && Number.isFinite(size) && Number.isFinite(power);

/** Canonical text of a rational as a float; NaN where symbols are left in it. */
export function floatOf(text: string): number {
  const [over = "0", under = "1"] = text.split("/");
  return Number(over) / Number(under);
}
