/** Problems and notices of Closure. */
import { formula, quoted, said, type Words } from "./words.ts";

export const closureWords: Words = {
  "closure-needs-numbers": () =>
    "The dimension, or that of a field or term, is a symbol: an order in 1/Λ is then no number, and what is demanded cannot be told. Give the premises a number.",
  "closure-too-large": ({ loops, legs, order }) =>
    `There are too many insertions to go through within ${said(loops)} loops, ${said(legs)} legs and order ${said(order)}. Lower one of these.`,
  "closure-term-forbidden": ({ latex }) =>
    `A symmetry of the premises forbids ${formula(latex)}: the term is not inserted here. Remove it, or the symmetry, or let symmetries select nothing.`,
  "closure-term-breaks-shift": ({ latex }) =>
    `${formula(latex)} has fewer derivatives than legs whose shift is to be a symmetry: it breaks that symmetry and is not inserted here.`,
  "shift-unknown": ({ text }) =>
    `${quoted(text)} is no field of the premises. Name the fields whose shift is a symmetry, with commas between them.`,
  "shift-not-scalar": ({ latex, kind }) =>
    `${formula(latex)} is a ${said(kind)}; only a scalar can be shifted by a constant.`,
  "closure-legs-cut": ({ most, legs }) =>
    `Operators with up to ${said(most)} legs can be demanded at this order; those with more than ${said(legs)} are not looked at.`,
  "closure-undecided": ({ count }) =>
    `For ${said(count)} ${count === 1 ? "set" : "sets"} of insertions the search for a graph was given up: what only these demand is not listed.`,
};
