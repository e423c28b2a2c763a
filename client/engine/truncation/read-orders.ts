/** Reads the table of orders: which exist, which are absent by symmetry, and what is wrong with the rest. */
import type { Notice, Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { KnownOrder } from "./estimates.ts";
import type { TruncationInputs } from "./shape.ts";

/** Beyond this a power of Q has lost its meaning long before its digits. */
export const HIGHEST_ORDER = 200;

export interface ReadOrder extends KnownOrder {
  readonly rowId: string;
}
export interface ReadOrders {
  /** Orders that exist, rising. */
  readonly known: readonly ReadOrder[];
  /** Orders that the table gives without a value: absent by symmetry, rising. */
  readonly absent: readonly { readonly rowId: string; readonly order: number }[];
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
}

/** A typed decimal or fraction, with either minus sign; null when it is none or does not fit a double. */
export function readNumber(text: string): Rational | null {
  const number = Rational.parse(text.trim().replace(/^\u2212/u, "-"));
  return number !== null && Number.isFinite(number.toFloat()) ? number : null;
}

/** Shifts are taken between exact decimals: 10.9 − 10 is 9/10 here, not a float next to it. */
export function readOrders(rows: TruncationInputs["orders"]): ReadOrders {
  const problems: Problem[] = [];
  const seen = new Map<number, Rational | null>();
  const rowIds = new Map<number, string>();
  rows.forEach((row, index) => {
    const facts = { row: index + 1 };
    const order = /^\d{1,4}$/.test(row.order.trim()) ? Number(row.order) : null;
    if (order === null || order > HIGHEST_ORDER) {
      const code = row.order.trim() === "" ? "order-missing" : "order-unreadable";
      problems.push({
        code,
        path: ["orders", row.id, "order"],
        facts: { ...facts, text: row.order, highest: HIGHEST_ORDER },
      });
      return;
    }
    if (seen.has(order)) {
      problems.push({ code: "order-twice", path: ["orders", row.id, "order"], facts: { ...facts, order } });
      return;
    }
    const value = row.value.trim() === "" ? null : readNumber(row.value);
    if (value === null && row.value.trim() !== "") {
      problems.push({
        code: /\(\d+\)|±|\+-/u.test(row.value) ? "order-value-uncertain" : "order-value-unreadable",
        path: ["orders", row.id, "value"],
        facts: { ...facts, order, text: row.value },
      });
    }
    seen.set(order, value);
    rowIds.set(order, row.id);
  });

  const rising = [...seen].sort(([a], [b]) => a - b);
  const known: ReadOrder[] = [];
  const absent: { rowId: string; order: number }[] = [];
  let previous = Rational.zero;
  for (const [order, value] of rising) {
    const rowId = rowIds.get(order) ?? "";
    if (value === null) {
      absent.push({ rowId, order });
      continue;
    }
    known.push({ rowId, order, value: value.toFloat(), shift: value.minus(previous).toFloat() });
    previous = value;
  }
  if (problems.length === 0 && known.length === 0)
    problems.push({ code: "orders-missing", path: ["orders"], facts: {} });
  return { known, absent, problems, notices: gapNotices(known, seen) };
}

/** Orders between the lowest and the highest that have no row at all are taken as absent; a reader should know. */
function gapNotices(known: readonly ReadOrder[], seen: ReadonlyMap<number, unknown>): Notice[] {
  const lowest = known[0]?.order ?? 0;
  const highest = known.at(-1)?.order ?? 0;
  const gaps: number[] = [];
  for (let order = lowest + 1; order < highest; order += 1) if (!seen.has(order)) gaps.push(order);
  return gaps.length === 0
    ? []
    : [{ code: "orders-taken-as-absent", path: ["orders"], facts: { orders: gaps.join(", ") } }];
}
