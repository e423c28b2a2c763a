/** Problems and notices of Premises and Scaling. */
import { formula, quoted, said, type Words } from "./words.ts";

export const premisesWords: Words = {
  "dimension-unreadable": ({ symbol, text }) =>
    `${quoted(text)} is not a value for ${said(symbol)}. Enter a number, a fraction, or the symbol ${said(symbol)}.`,
  "dimension-not-positive": ({ symbol, text }) => `${said(symbol)} is ${quoted(text)}, but must be above 0.`,
  "dimension-overridden": ({ field, dimension }) =>
    `The dimension of ${formula(field)} is set by hand to ${formula(dimension)}.`,
  "kind-needs-anisotropic": ({ symbol, kind }) =>
    `${quoted(symbol)} is a ${said(kind)}, which needs an anisotropic spacetime, or a dimension typed by hand.`,
  "kind-needs-isotropic": ({ symbol, kind }) =>
    `${quoted(symbol)} is a ${said(kind)}, which needs an isotropic spacetime, or a dimension typed by hand.`,
  "real-field-charged": ({ symbol, kind }) =>
    `${quoted(symbol)} is a ${said(kind)}, its own conjugate, so it can only carry a charge that is its own opposite.`,
  // Symmetries.
  "group-unknown": ({ text }) =>
    `${quoted(text)} is not a symmetry group known here. Write Z2, Z3, … or U(1).`,
  "charges-too-many": ({ given, wanted }) =>
    `There are ${said(given)} charges for ${said(wanted)} symmetries. Give one for each, in the order of their table.`,
  "charge-unreadable": ({ text, name }) =>
    `${quoted(text)} is not a charge under ${quoted(name)}. Write a number, or odd or even for a Z2.`,
  "charge-not-whole": ({ text, name }) =>
    `The charge ${quoted(text)} under ${quoted(name)} must be a whole number, since the symmetry is a Z_n.`,
  "parity-without-z2": ({ text, name }) =>
    `${quoted(text)} is a charge under a Z2 only, and ${quoted(name)} is none.`,
  // Scales.
  "scale-in-error": ({ symbol }) => `The scale ${quoted(symbol)} is in error itself. Correct it first.`,
  "scale-has-no-number": ({ symbol }) => `The scale ${quoted(symbol)} has no value in the premises.`,
  "scale-circular": ({ symbol }) =>
    `The scale ${quoted(symbol)} is defined by itself, perhaps by way of others.`,
  "roles-shared": ({ role, first, second }) =>
    `Two scales have the role “${said(role)}”: ${formula(first)} and ${formula(second)}. Blocks that need one cannot choose.`,
  // Terms.
  "size-has-unit": ({ text, unit }) =>
    `${quoted(text)} has the unit ${said(unit)}, but a relative size is a pure number.`,
  "size-not-positive": ({ text }) => `${quoted(text)} is not above 0, as a size must be.`,
  "term-forbidden": ({ term, symmetries }) =>
    `The term ${formula(term)} is forbidden by ${said(symmetries)}.`,
  "term-duplicate": ({ term, earlier }) =>
    `The terms ${formula(earlier)} and ${formula(term)} have the same fields and derivatives.`,
  "odd-indices": ({ term, count }) =>
    `The term ${formula(term)} has ${said(count)} Lorentz indices in all. An odd number cannot be contracted here, so it is not Lorentz invariant.`,
  "odd-fermions": ({ term, count }) =>
    `The term ${formula(term)} has ${said(count)} fermions. An odd number is not Lorentz invariant.`,
};
