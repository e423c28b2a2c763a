/** Problems and notices of Truncation error. */
import { quoted, said, type Words } from "./words.ts";

export const truncationWords: Words = {
  "orders-missing": () => "There are no predictions yet. Enter X through at least one order.",
  "order-missing": ({ row }) =>
    `Row ${said(row)} has no order. Enter 0 for leading order, 1 for the next, and so on.`,
  "order-unreadable": ({ row, text, highest }) =>
    `Row ${said(row)}: ${quoted(text)} is not an order. An order is a whole number from 0 to ${said(highest)}.`,
  "order-twice": ({ row, order }) =>
    `Order ${said(order)} is in the table twice, again in row ${said(row)}. Keep one of them.`,
  "order-value-unreadable": ({ row, order, text }) =>
    `Row ${said(row)}, order ${said(order)}: ${quoted(text)} is not a number. Leave it empty only if this order is absent by symmetry.`,
  "order-value-uncertain": ({ row, order, text }) =>
    `Row ${said(row)}, order ${said(order)}: ${quoted(text)} has an uncertainty of its own, which no method here uses. Enter the value alone.`,
  "orders-taken-as-absent": ({ orders }) =>
    `Order ${said(orders)} is not in the table and is taken as absent by symmetry. If it exists, enter it.`,
  "belief-missing": () => "Enter at least one degree of belief in percent, such as 68.",
  "belief-unreadable": ({ text }) =>
    `${quoted(text)} is not a degree of belief. It is a percentage above 0 and below 100, such as 68 or 95.`,
  "belief-too-many": ({ most }) => `At most ${said(most)} degrees of belief are shown at once.`,
  "belief-below-one-percent": ({ text }) =>
    `${quoted(text)} is read as a percentage. For a probability of 0.68 enter 68.`,
  "nu0-unreadable": ({ text, largest }) =>
    `ν₀ is ${quoted(text)}, but must be a number from 0 to ${said(largest)}. 0 means no prior.`,
  "tau0-unreadable": ({ text }) => `τ₀ is ${quoted(text)}, but must be a number above 0.`,
  "reference-unreadable": ({ text }) =>
    `The reference is ${quoted(text)}. Enter LO for the value of the lowest order, or a number.`,
  "reference-zero": () =>
    "The reference is zero, so no coefficient can be formed. Enter a reference value other than zero.",
  "reference-from-order": ({ order }) =>
    `The series starts at order ${said(order)}; the reference is its first value divided by Q to that power, so that its coefficient is 1.`,
  "coefficients-not-finite": ({ value }) =>
    `With Q = ${said(value)} some power of Q is too small to divide by, so a coefficient has no value.`,
  "q-not-positive": ({ value }) => `Q is ${said(value)}. An expansion parameter must be above 0.`,
  "q-needs-premises": () =>
    "Q is to come from the scales of the premises, but this block stands on none. Choose premises, or enter a number.",
  "q-needs-roles": () =>
    "Q is left empty, so it is the probe scale over the heavy scale; the premises need exactly one of each. Or enter Q.",
  "q-has-units": ({ text }) => `${quoted(text)} is not a pure number: its units do not cancel.`,
  "sum-needs-q-below-one": ({ value }) =>
    `Q is ${said(value)}. The sum over all omitted orders exists only for Q below 1, so it is refused; the first omitted term can still be shown.`,
  "q-not-below-one": ({ value }) =>
    `Q is ${said(value)}, not below 1: higher orders are not suppressed, and no estimate of what is left out can be trusted.`,
  "q-may-reach-one": ({ value, sigma }) =>
    `Q = ${said(value)} ± ${said(sigma)} reaches 1 within its uncertainty, where the expansion ends.`,
  "method-without-coefficients": ({ method }) =>
    `The method “${said(method)}” needs a coefficient, and no order gives one. Enter a further order${method === "conjugate prior" ? ", or a ν₀ above 0" : ""}.`,
  "methods-without-coefficients": () =>
    "No order gives a coefficient yet: what is shown rests on the leading value and the prior alone, and the methods that need a coefficient are left out.",
  "error-not-finite": ({ method }) =>
    `At this degree of belief the error of the method “${said(method)}” has no finite value.`,
  "only-first-omitted-term": ({ method }) =>
    `The method “${said(method)}” estimates the first omitted term only; it is not summed over all omitted orders here.`,
  "leading-coefficient-excluded": () =>
    "c_0 is 1 by construction because the reference is the leading order. It carries no information and is left out; give the reference as a number to include it.",
  "one-coefficient": () => "Only one coefficient is known: the estimate rests on a single number.",
  "coefficients-vanish": () =>
    "All coefficients used are zero, so some methods find nothing left out. That is rarely true.",
  "variance-infinite": ({ nu }) =>
    `With ν = ${said(nu)} the distribution of the error has no finite variance: its tails are heavy, so quote an interval, not a standard deviation.`,
};
