/** Problems and notices of Running. */
import { formula, quoted, said, type Words } from "./words.ts";

export const runningWords: Words = {
  "nothing-runs": () =>
    "There is nothing that runs: no potential or Yukawa term in the premises, and no gauge group here.",
  "running-needs-four": ({ d }) =>
    `The premises are in d = ${said(d)}, where one loop of scalars has no logarithm. Set d to 4, or ask for fixed points.`,
  "running-needs-isotropic": () =>
    "These β functions are those of isotropic spacetime. Choose isotropic premises, or none.",
  "running-too-large": ({ couplings, fields }) =>
    `At most ${said(couplings)} couplings of ${said(fields)} scalar fields are treated at once. Leave some out of the premises.`,
  "fixed-points-need-premises": () =>
    "Fixed points are sought for the potential of the premises, and there is none.",
  "yukawa-needs-four": () => "Yukawa couplings are marginal in four dimensions, not in three. Ask in 4 − ε.",
  // Premises.
  "running-left-out": ({ term, reason }) => `${formula(term)} is left out of the running: ${said(reason)}.`,
  "fermion-mass-left-out": ({ term }) =>
    `${formula(term)} is left out: dimensionless couplings do not see it, but masses and cubic couplings of scalars would.`,
  "hermitian-conjugate-added": ({ term }) => `The Hermitian conjugate of ${formula(term)} is added to it.`,
  "coupling-at-two-scales": ({ symbol }) =>
    `${formula(symbol)} stands with different scales in different terms, or in a potential and a Yukawa term. Give each its own coupling.`,
  "couplings-dependent": ({ symbols }) =>
    `The couplings ${formula(symbols)} stand before the same operators, so their running cannot be told apart. Write each operator once.`,
  "couplings-driven-apart": ({ symbols }) =>
    `Terms that share ${formula(symbols)} run differently: no symmetry keeps their coefficients together. Give each term its own coupling.`,
  "components-odd": ({ symbol }) =>
    `${formula(symbol)} has several components, so only even powers of it are invariant. Take out the odd ones.`,
  "components-with-yukawa": ({ symbol }) =>
    `${formula(symbol)} has several components and a Yukawa coupling, which is not covered. Write the components out.`,
  "components-of-complex": ({ symbol }) =>
    `${formula(symbol)} is complex. Write it as a real field with twice the components, or write the components out.`,
  "running-field-unknown": ({ text }) => `${quoted(text)} is no scalar or spinor field of the premises.`,
  "running-components-unreadable": ({ text, most }) =>
    `${quoted(text)} is no number of components. Give a whole number from 1 to ${said(most)}.`,
  // Gauge groups.
  "running-group-not-known": ({ text }) =>
    `${quoted(text)} is no gauge group that runs here. Use SU(N) or U(1).`,
  "unit-of-charge-unreadable": ({ text }) =>
    `${quoted(text)} does not say how g² is normalised. Give a number above 0, such as 5/3.`,
  "running-copies-unreadable": ({ text, most }) =>
    `${quoted(text)} is no number of copies. Give a whole number up to ${said(most)}.`,
  "real-scalar-charged": () => "A real scalar carries no charge of U(1). Choose a complex scalar.",
  "running-too-many": ({ most }) => `Only the first ${said(most)} fields are used.`,
  "gauge-value-not-positive": ({ text }) => `The coupling is ${quoted(text)}; it must be above 0.`,
  "gauge-values-missing": () =>
    "Not every gauge coupling has a value, so they are not run. Give one to each.",
  "gauge-left-out-of-fixed-points": () => "Gauge couplings are left out of the search for fixed points.",
  // Scales and values.
  "running-scales-missing": () =>
    "There are β functions but no numbers yet: enter the scale of the values and the scale to run to.",
  "running-scales-same": () => "Both scales are the same. Enter another one to run to.",
  "running-scale-outside": () => "This scale is not between the two ends.",
  "running-coupling-unknown": ({ text, known }) =>
    `${quoted(text)} is no coupling that runs here. There are: ${said(known)}.`,
  "running-coupling-twice": ({ text }) => `${quoted(text)} has a value already. Keep one of them.`,
  "running-value-has-unit": ({ text }) => `${quoted(text)} has a unit, but this coupling is a pure number.`,
  "running-value-dimension": ({ text, power }) =>
    power === "0"
      ? `${quoted(text)} has a unit, but this coupling is a pure number.`
      : `${quoted(text)} must be an energy to the power ${said(power)}, such as “1 GeV${power === "1" ? "" : `^${said(power)}`}”.`,
  "start-missing": ({ symbols }) =>
    `${formula(symbols)} cannot be run without a number: give one for each, and for the scales beside it.`,
  "start-nonperturbative": ({ symbols }) =>
    `${formula(symbols)} would change by as much as itself within one e-fold of the scale: one loop says nothing there. Start from smaller values.`,
  "running-pole": ({ coupling, scale }) =>
    `${formula(coupling)} has a pole at ${said(scale)}, short of the scale to run to. Perturbation theory fails before it.`,
  // Fixed points.
  "epsilon-unreadable": ({ text }) => `${quoted(text)} is no ε. Give a number above 0, such as 1 or 1/10.`,
  "no-marginal-coupling": ({ d, power }) =>
    `No coupling is marginal in d = ${said(d)}, so there is no fixed point to find. Add a term of power ${said(power)} to the premises.`,
  "too-many-marginal": ({ count, most }) =>
    `There are ${said(count)} marginal couplings; fixed points are sought for at most ${said(most)}.`,
  "fixed-points-searched": () =>
    "These fixed points are those that a search from many places finds; there may be others.",
  "epsilon-not-small": ({ epsilon }) =>
    `Numbers are for ε = ${said(epsilon)}, where the first order is a rough guide.`,
};
