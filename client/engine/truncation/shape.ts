/** What a Truncation error block is given. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

/** The methods of this version, side by side on the same data; the chosen one is highlighted. */
export const methods = [
  "conjugate prior",
  "uniform prior",
  "first omitted term",
  "differences of orders",
] as const;
export type Method = (typeof methods)[number];

/** What is estimated: the first term left out, or the sum of all that are left out. */
export const omittedChoices = ["all omitted orders", "first omitted term"] as const;
export type Omitted = (typeof omittedChoices)[number];

export const truncationShape = defineShape({
  fields: {
    title: note(),
    /** What X is: "cross section at 300 GeV". */
    quantity: note(),
    /** Unit of X and of every error: "pb". */
    unit: text(),
    /** X_ref: "LO" for X⁽⁰⁾ (the value of the lowest order), or a number in the unit of X. */
    reference: text("LO"),
    /** Expansion parameter: a number, "0.30(5)", or an expression in the premises' scales, "max(p, m)/Lambda"; "" is probe over heavy scale. */
    q: text(),
    /** Which coefficients the estimates use. */
    first: choice("from c_1", "from c_0"),
    /** Degrees of belief in percent, two-sided, separated by commas. */
    belief: text("68, 95"),
    /** Prior degrees of freedom ν₀ of the conjugate method. */
    nu0: text("1"),
    /** Prior scale τ₀ of the conjugate method (τ₀², not τ₀, enters). */
    tau0: text("1"),
    method: choice(...methods),
    omitted: choice(...omittedChoices),
    note: note(),
  },
  tables: {
    orders: {
      /** Order n of the expansion in Q: a whole number from 0 on. */
      order: text(),
      /** X through that order; empty when the order is absent by symmetry. */
      value: text(),
      /** "LO", "NLO", …: for the reader only. */
      name: note(),
    },
  },
});
export type TruncationInputs = InputsOf<typeof truncationShape>;
