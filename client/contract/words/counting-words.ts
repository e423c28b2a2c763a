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
  "rule-twice": ({ of, text }) =>
    `There is a rule for ${text === "" ? `the ${said(of)}` : quoted(text)} already. Keep one of them.`,
  "rule-symbol-unknown": ({ text }) => `${quoted(text)} is no field of the premises.`,
  "rule-symbol-needless": ({ of }) => `A rule for the ${said(of)} takes no symbol.`,
  "rule-missing": ({ what }) => `No rule says what ${said(what)} count, so terms with them have no order.`,
  "exception-unknown": () => "This is no term of the premises (any more). Choose one of them.",
  "kinetic-term-counts": ({ term, order }) =>
    `The kinetic term ${formula(term)} counts ${said(order)} by these rules. It should count 0, or orders are not relative to it.`,
  "sizes-need-numbers": ({ symbols }) =>
    `${formula(symbols)} has no number, so terms have orders and no sizes.`,
};
