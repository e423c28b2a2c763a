/** Problems and notices of Order plan. */
import { formula, quoted, said, type Words } from "./words.ts";

function scaleName(role: string | number | undefined): string {
  return role === "heavy" ? "heavy scale" : "probe scale";
}

export const planWords: Words = {
  "plan-target-unreadable": ({ text }) =>
    `The target is ${quoted(text)}; it must be a relative accuracy between 0 and 1, such as 1e-3 or 0.1 %.`,
  "plan-insertions-unreadable": ({ text, most }) =>
    `The number of insertions is ${quoted(text)}; it must be a whole number from 1 to ${said(most)}.`,
  "plan-cap-unreadable": ({ text, most }) =>
    `The largest order is ${quoted(text)}; it must be a number above 0 and at most ${said(most)}.`,
  "plan-scale-missing": ({ role }) =>
    `The premises have no ${scaleName(role)}. Give a scale that role there, or enter one here with its unit.`,
  "plan-scale-ambiguous": ({ role, symbols }) =>
    `The premises have several scales with the role of ${scaleName(role)}: ${said(symbols)}. Enter here which one is meant.`,
  "plan-scale-not-positive": ({ role, value }) =>
    `The ${scaleName(role)} is ${said(value)}; it must be above 0.`,
  "plan-scales-differ": ({ probe, heavy }) =>
    `The probe scale is in ${said(probe)} and the heavy scale in ${said(heavy)}: their ratio is no pure number.`,
  "plan-q-not-below-one": ({ Q }) =>
    `p/Λ is ${said(Q)}, not below 1: higher orders are not smaller than lower ones, and no order can be chosen.`,
  "plan-q-too-small": ({ Q, least }) =>
    `p/Λ is ${said(Q)}, below ${said(least)}: nothing but the leading order could ever matter, and no plan is made.`,
  "plan-dimension-symbolic": () =>
    "The dimension is a symbol, so orders are no numbers. Choose a number in the premises.",
  "plan-too-large": ({ most }) =>
    `There would be more than ${said(most)} terms and products of terms. Lower the insertions or the largest order.`,
  "plan-relevant-unassigned": ({ latex }) =>
    `The relevant term ${formula(latex)} has no assigned size and is left out: at its natural size it would outweigh everything. Give it a size in the premises, such as $m^2/p^2$.`,
  "plan-gap": ({ orders }) =>
    `Fields and symmetries allow terms of order ${said(orders)}, and none is listed: they are taken as absent. If they exist, list them.`,
  "plan-size-unreadable": ({ latex }) =>
    `The size typed for ${formula(latex)} cannot be read, so the term is left out. Correct it in the premises.`,
  "plan-target-unreached": ({ target, leftOut, next }) =>
    `The terms listed do not reach the target ${said(target)}: ${said(leftOut)} is left out with all of them kept. List the terms of order ${said(next)} in the premises, or allow more insertions.`,
  "plan-slow": ({ Q }) =>
    `p/Λ is ${said(Q)}: successive orders are hardly smaller, and the estimate leans on its tail.`,
  "plan-reaches-end": ({ Q, sigma }) =>
    `p/Λ = ${said(Q)} ± ${said(sigma)} reaches 1 within its uncertainty, where the expansion ends.`,
  "plan-assigned-large": ({ latex, size }) =>
    `The size given to the relevant term ${formula(latex)} is ${said(size)}, above 1: it must be kept to all orders, in the propagator.`,
  "plan-forbidden-term": ({ rowId }) =>
    `A term (row ${said(rowId)}) is forbidden by a symmetry of the premises; it is counted all the same.`,
  "plan-tail-matters": ({ unlisted }) =>
    `Listed terms alone meet the target, but unlisted ones of natural size would add ${said(unlisted)}: with them it is missed.`,
  "plan-square-leads": ({ order }) =>
    `Without interference with the leading amplitude the first correction is a square, of order ${said(order)}. Terms of that order that are not listed may interfere and be as large.`,
  "plan-square-alone": ({ order }) =>
    `A square of order ${said(order)} is kept, but no single term of that order is listed whose interference is as large: the rate is not complete at this order.`,
  "plan-basis-other-dimension": ({ d }) =>
    `The Basis count is for d = ${said(d)}, and these premises are not, so its numbers are not shown.`,
};
