/** Problems and notices of Error budget. */
import { quoted, said, type Words } from "./words.ts";

export const budgetWords: Words = {
  "budget-empty": () => "There is no source of error yet. Type one with its size, or take one from a block.",
  "size-missing": ({ name }) => `${quoted(name)} has no size. Give one such as “0.012”, “3 MeV” or “1.2 %”.`,
  "size-unreadable": ({ text }) =>
    `${quoted(text)} is no size. Give a number, with a unit or percent sign if need be.`,
  "size-uncertain-itself": ({ text }) =>
    `${quoted(text)} has an uncertainty of its own. Give the standard uncertainty alone.`,
  "budget-value-uncertain": ({ text }) =>
    `${quoted(text)} has an uncertainty. Give the value alone, and its uncertainty as a source below.`,
  "percent-of-nothing": () => "A percentage needs the value it is of. Give the value above.",
  "budget-units-differ": ({ from, to }) =>
    `${quoted(from)} cannot be added to ${quoted(to)}. Give the size in the unit of the budget.`,
  "budget-needs-conversion": ({ from, to }) =>
    `${quoted(from)} and ${quoted(to)} agree only by ħ = c = 1. Choose natural units to convert them.`,
  "budget-scalar-missing": ({ what }) => `Choose which number of that block the ${said(what)} is.`,
  "budget-scalar-no-number": ({ what }) =>
    `That is no number, so it cannot be the ${said(what)}. Choose another.`,
  "coefficient-unreadable": ({ text }) =>
    `${quoted(text)} is no coefficient of correlation. Give a number from -1 to 1.`,
  "coefficient-twice": ({ group }) => `The group ${quoted(group)} has two coefficients. Keep one of them.`,
  "pair-incomplete": () => "Choose two of the sources above.",
  "pair-with-itself": () => "A source moves with itself anyway. Choose two different ones.",
  "pair-twice": () => "These two sources have a coefficient already. Keep one of them.",
  "budget-scalar-certain": () =>
    "That number has no uncertainty of its own to take. Take the number itself, or choose another.",
  "correlations-too-many": ({ count, most }) =>
    `${said(count)} sources are correlated with others; at most ${said(most)} are checked. Give fewer of them a group.`,
  "correlations-contradict": () =>
    "These coefficients contradict each other: the squared error would be negative. Three sources cannot all be opposed.",
  "budget-kinds-correlated": ({ groups }) =>
    `Errors of different kinds move together (${said(groups)}). The brackets leave that out; the whole error has it.`,
  "scale-variation-and-truncation": () =>
    "Scale variation and truncation errors both stand for orders left out. Adding them in quadrature counts those twice.",
};
