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
    `With Q = ${said(value)} a coefficient is too large to compute with: a power of Q, or the reference, is too small to divide by.`,
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
  "cbar-unreadable": ({ text }) =>
    `${quoted(text)} is not a limit or width of the prior sets: enter a number above 0.`,
  "cbar-limits-reversed": ({ text, low }) =>
    `The upper limit of c̄ is ${quoted(text)}, but must lie above the lower one, ${said(low)}.`,
  "terms-unreadable": ({ text, most }) =>
    `${quoted(text)} is not a number of omitted terms. Enter a whole number from 1 to ${said(most)}, or nothing for what is estimated.`,
  "cbar-excluded": ({ largest, high }) =>
    `A coefficient is ${said(largest)}, which a c̄ of at most ${said(high)} does not allow. Raise the upper limit of c̄.`,
  "correlated-needs-data": () =>
    "The correlated model needs predictions along x. Choose a Data block, or another method.",
  "curve-empty": () =>
    "The data have no points, or no column of predictions with an order. Give one column the role x, and others the role of an order.",
  "curve-units-differ": () =>
    "The columns of predictions, reference and measurements have different units. Give all of them in one unit.",
  "orders-beside-data": () =>
    "The orders typed here are not used: the predictions come from the Data block. Remove one of the two.",
  "variable-unreadable": ({ text }) =>
    `${quoted(text)} cannot be the name of x in Q. Use one symbol that is no unit, such as p.`,
  "x-unit-unreadable": ({ text }) =>
    `${quoted(text)}, the unit of x, is not a unit that Q can be computed with. Use MeV, GeV, fm or another known one, or none.`,
  "q-needs-heavy": () =>
    "Q is left empty, so it is x over the heavy scale; the premises need exactly one heavy scale. Or enter Q.",
  "q-not-positive-at": ({ value, x }) =>
    `Q is ${said(value)} at x = ${said(x)}. An expansion parameter must be above 0 at every point.`,
  "breakdown-unknown": ({ text }) =>
    `${quoted(text)} is not a scale of the premises with a value, so it cannot be estimated.`,
  "breakdown-not-in-q": () =>
    "Q does not depend on a heavy scale, so no breakdown scale is estimated. Write Q with it, as in p/Lambda.",
  "breakdown-limit-unreadable": ({ text, unit }) =>
    `${quoted(text)} is not a limit for the breakdown scale. Enter a number above 0 in ${said(unit)}, or a value with its unit.`,
  "breakdown-limits-reversed": ({ from }) =>
    `The upper limit of the breakdown scale must lie above the lower one, ${said(from)}.`,
  "breakdown-width-unreadable": ({ text }) =>
    `${quoted(text)} is not the width of a normal prior in the logarithm. Enter a number above 0, such as 0.5.`,
  "breakdown-at-limit": ({ end }) =>
    `The posterior of the breakdown scale is cut off by its prior (${said(end)} end): it says where the prior ends, not where the theory does. Widen the limits, or read it as a bound.`,
  "at-unreadable": ({ text, least, most }) =>
    `${quoted(text)} is not an x of the data. Enter a number from ${said(least)} to ${said(most)}.`,
  "point-incomplete": ({ x }) =>
    `At x = ${said(x)} an order between known ones is missing, or the reference is missing or 0. Choose another x for the comparison.`,
  "points-incomplete": ({ points, count }) =>
    `${said(points)} of ${said(count)} points lack an order or a reference. There the bands stop at the orders known, and the correlated model leaves them out.`,
  "reference-vanishes": ({ points, count }) =>
    `The reference is 0 at ${said(points)} of ${said(count)} points, where no coefficient exists. They are left out; a reference column, or a number, avoids it.`,
  "coefficients-out-of-range": ({ points, count }) =>
    `At ${said(points)} of ${said(count)} points a coefficient is too large to compute with; they are left out.`,
  "q-beyond-one-along": ({ points, count, from, to }) =>
    `Q is not below 1 at ${said(points)} of ${said(count)} points, from x = ${said(from)} to ${said(to)}. Sums over omitted orders do not exist there, and the correlated model leaves these points out.`,
  "observables-too-many": ({ most }) => `At most ${said(most)} further observables are combined at once.`,
  "observable-twice": () =>
    "This observable is the block's own data: each may count once in the joint posterior.",
  "correlated-without-coefficients": () =>
    "No order gives a coefficient along x, so there is nothing to correlate. Add an order to the data.",
  "correlated-few-points": ({ points, fewest }) =>
    `Only ${said(points)} different x have all orders and Q below 1; a length scale needs at least ${said(fewest)}.`,
  "correlated-all-zero": () =>
    "All coefficients are zero at every point, so they have neither size nor length scale.",
  "length-unreadable": ({ text }) =>
    `${quoted(text)} is not a length scale. Enter a number above 0 in the unit of x, or nothing to estimate it.`,
  "nugget-unreadable": ({ text, largest }) =>
    `${quoted(text)} is not a nugget. Enter a number above 0 and at most ${said(largest)}, or nothing to take it from the digits of the data.`,
  "points-thinned": ({ points, count, length }) =>
    `The correlated model is fitted to ${said(points)} of ${said(count)} points. With ℓ near ${said(length)} the others lie too close to them to say more than rounding does; the bands use all.`,
  "length-not-resolved": ({ length, spacing }) =>
    `The length scale comes out at ${said(length)}, no larger than the distance of the points, ${said(spacing)}: they are too few to resolve it, and count as independent.`,
  "length-beyond-range": () =>
    "The length scale may exceed the range of x: the coefficients look the same at all points, which then say little more than one.",
  "kernel-regularised": ({ asked, nugget, condition }) =>
    `The correlation matrix was too ill-conditioned for a nugget of ${said(asked)}; ${said(nugget)} was added to its diagonal instead, for a condition number of ${said(condition)}.`,
  "values-rounded": ({ nugget }) =>
    `Rounding of the data is seen in their coefficients: an independent part of ${said(nugget)} of their variance is allowed for. More digits in the data would help.`,
};
