/** Problems and notices of Counting rules. */
import { formula, quoted, said, type Words } from "./words.ts";

export const countingWords: Words = {
  "weight-count": ({ found, wanted }) =>
    Number(wanted) === 1
      ? "Give one exponent here, such as 3/2."
      : `Give one exponent for each of the ${said(wanted)} parameters, separated by commas; here ${Number(found) === 1 ? "is 1" : `are ${said(found)}`}.`,
  "parameter-not-small": ({ value }) =>
    `A small parameter lies between 0 and 1; this one is ${said(value)}, so nothing would be ordered by it.`,
  "parameter-not-a-number": ({ text }) =>
    `${quoted(text)} has a unit. A small parameter is a pure number, such as p/Lambda.`,
  "parameter-twice": ({ symbol }) => `${quoted(symbol)} is a parameter already. Give each its own symbol.`,
  "parameters-too-many": ({ most }) => `At most ${said(most)} small parameters are counted in.`,
  "parameters-too-few": ({ wanted, symbols }) =>
    `The published rules are in powers of ${said(wanted)} parameters, ${said(symbols)}; only the first are counted in here. Give all of them, or edit the rules.`,
  "pure-nucleon-states": () =>
    "Where nothing but nucleons stands between two vertices, this graph is enhanced by $m_N/Q$ over the order given. That part is not counted but iterated; the order is that of the irreducible rest.",
  "rule-twice": ({ of, text }) =>
    `There is a rule for ${text === "" ? `the ${said(of)}` : quoted(text)} already. Keep one of them.`,
  "rule-symbol-unknown": ({ text, of }) => `${quoted(text)} is no ${said(of)} of the premises.`,
  "rule-symbol-needless": ({ of }) => `A rule for the ${said(of)} takes no symbol.`,
  "rule-missing": ({ what }) => `No rule says what ${said(what)} count, so terms with them have no order.`,
  "exception-unknown": () => "This is no term of the premises (any more). Choose one of them.",
  "kinetic-term-counts": ({ term, order }) =>
    `The kinetic term ${formula(term)} counts ${said(order)} by these rules. It should count 0, or orders are not relative to it.`,
  "sizes-need-numbers": ({ symbols }) =>
    `${formula(symbols)} has no number, so terms have orders and no sizes.`,
};
