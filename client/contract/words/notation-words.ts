/** Problems of typed notation: terms, symbols, values and dimensions. */
import { atCharacter, didYouMean, quoted, said, type Words } from "./words.ts";

export const notationWords: Words = {
  // Characters, marks and brackets.
  "text-too-long": ({ length, longest, most }) =>
    `This text has ${said(length)} characters; at most ${said(longest ?? most)} are read.`,
  "unexpected-character": (facts) => `${quoted(facts["text"])}${atCharacter(facts)} cannot be read here.`,
  "unknown-command": (facts) =>
    `The command ${quoted(facts["text"])}${atCharacter(facts)} is not known here.`,
  "bad-subscript": (facts) =>
    `The subscript${atCharacter(facts)} cannot be read. Write x_1, x_{12} or x_{ab}.`,
  "empty-text": () => "There is nothing to read here yet.",
  "unbalanced-bracket": (facts) => `The bracket${atCharacter(facts)} has no partner.`,
  "missing-operand": (facts) =>
    `Something is missing${atCharacter(facts)}: a number, a symbol or a bracket must stand there.`,
  "misplaced-mark": (facts) => `${quoted(facts["text"])}${atCharacter(facts)} cannot stand there.`,
  "misplaced-accent": (facts) => `The accent${atCharacter(facts)} must stand over a single symbol.`,
  "double-power": (facts) =>
    `There are two powers on one symbol${atCharacter(facts)}. Use brackets: (x^a)^b.`,
  "nested-too-deep": (facts) => `The brackets are nested too deeply${atCharacter(facts)}.`,
  "bad-index": (facts) => `${quoted(facts["text"])}${atCharacter(facts)} cannot be read as an index.`,
  // Numbers and powers.
  "number-too-large": (facts) => `The number${atCharacter(facts)} is too large to compute with.`,
  "division-by-zero": (facts) => `This divides by zero${atCharacter(facts)}.`,
  "root-of-negative": (facts) => `This takes a root of a negative number${atCharacter(facts)}.`,
  "exponent-not-a-number": (facts) =>
    `The exponent${atCharacter(facts)} must be a number, such as 2, -1 or 1/2.`,
  "power-too-large": ({ symbol, most }) =>
    `The power of ${quoted(symbol)} is too large; at most ${said(most)} is read.`,
  "odd-modulus-power": (facts) =>
    `A modulus of fields${atCharacter(facts)} needs an even power, as in |phi|^2.`,
  "units-differ": ({ left, right }) =>
    `Quantities of different dimension are added or compared here: ${said(left)} and ${said(right)}.`,
  "not-linear": (facts) =>
    `A dimension must be linear in the spacetime dimension, such as (d-2)/2; what stands${atCharacter(facts)} is not.`,
  // Symbols.
  "unknown-symbol": (facts) =>
    `${quoted(facts["symbol"])}${atCharacter(facts)} is declared nowhere in the premises.${didYouMean(facts)}`,
  "symbol-unreadable": ({ text }) =>
    `${quoted(text)} is not a symbol. Write one name, such as phi, Lambda or m_1.`,
  "symbol-reserved": ({ symbol }) =>
    `${quoted(symbol)} has a meaning of its own here and cannot be declared. Choose another symbol.`,
  "symbol-duplicate": ({ symbol }) =>
    `${quoted(symbol)} is declared already. Every symbol may be declared once.`,
  // Terms.
  "empty-term": () => "This row has no term yet.",
  "zero-term": () => "This term is zero.",
  "no-field": (facts) =>
    `This term contains no field${facts["symbol"] ? `: ${quoted(facts["symbol"])} is not one of the fields above` : ""}.${didYouMean(facts)}`,
  "field-in-error": ({ symbol }) => `The field ${quoted(symbol)} is in error above. Correct it first.`,
  "sum-in-term": (facts) =>
    `A term is a single product, but there is a sum${atCharacter(facts)}. Put each summand in a row of its own.`,
  "function-in-term": (facts) => `${quoted(facts["text"])}${atCharacter(facts)} cannot be part of a term.`,
  "negative-field-power": ({ symbol, power }) =>
    `The field ${quoted(symbol)} has the power ${said(power)}. Powers of fields are whole numbers above 0.`,
  "fractional-field-power": ({ symbol, power }) =>
    `The field ${quoted(symbol)} has the power ${said(power)}. Powers of fields are whole numbers above 0.`,
  "field-power-too-large": ({ symbol, most }) =>
    `The power of the field ${quoted(symbol)} is too large; at most ${said(most)} is read.`,
  "direction-needed": (facts) =>
    `In an anisotropic theory ${quoted(facts["text"])}${atCharacter(facts)} must say whether it is a time or a space derivative.`,
};
