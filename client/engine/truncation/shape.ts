/** What a Truncation error block is given. */
import { choice, defineShape, note, reference, text, type InputsOf } from "../shape.ts";

/** Side by side on the same data; the chosen one is highlighted. The last needs data along x. */
export const methods = [
  "conjugate prior",
  "uniform prior",
  "prior set A",
  "prior set B",
  "prior set C",
  "first omitted term",
  "differences of orders",
  "correlated along x",
] as const;
export type Method = (typeof methods)[number];

export function isPriorSet(method: unknown): boolean {
  return method === "prior set A" || method === "prior set B" || method === "prior set C";
}

/** What is estimated: the first term left out, or the sum of all that are left out. */
export const omittedChoices = ["all omitted orders", "first omitted term"] as const;
export type Omitted = (typeof omittedChoices)[number];

/** Prior sets are integrated numerically, so they are shown on request, or when one of them is the chosen method. */
export const setChoices = ["without sets A, B, C", "with sets A, B, C"] as const;

/** What is believed of the breakdown scale before the data. */
export const breakdownPriors = ["uniform in its logarithm", "uniform", "normal in its logarithm"] as const;
export type BreakdownPrior = (typeof breakdownPriors)[number];

/** What settings that few people touch are while they are empty. */
export const unlessTyped = {
  cbarLow: "0.001",
  cbarHigh: "1000",
  cbarWidth: "1",
  breakdownWidth: "0.5",
} as const;

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
    sets: choice(...setChoices),
    /** Limits of c̄ in sets A and C; "" is what `unlessTyped` says, here and below. */
    cbarLow: text(),
    cbarHigh: text(),
    /** Width of ln c̄ in set B. */
    cbarWidth: text(),
    /** How many omitted terms the prior sets sum; "" follows `omitted`. */
    terms: text(),
    /** A table of predictions along x, in place of the orders typed here. */
    data: reference(["data"]),
    /** What x is called in Q; "" is the name of its column. */
    variable: text(),
    /** The x at which the methods stand side by side; "" is the middle point. */
    at: text(),
    /** Length over which coefficients stay alike, in the unit of x; "" is estimated. */
    length: text(),
    /** Independent part of each coefficient, as a variance in units of c̄²; "" follows the digits of the data. */
    nugget: text(),
    /** The scale in Q that is estimated; "" is the one heavy scale. */
    breakdown: text(),
    breakdownPrior: choice(...breakdownPriors),
    /** Limits of that prior, such as "300 MeV"; "" is a quarter of, and four times, the stated value. */
    breakdownFrom: text(),
    breakdownTo: text(),
    /** Width of the normal prior in ln Λ_b, about the stated value. */
    breakdownWidth: text(),
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
    /** Further observables with the same breakdown scale. */
    observables: {
      data: reference(["data"]),
      /** Their Q; "" is the same expression. */
      q: text(),
    },
  },
});
export type TruncationInputs = InputsOf<typeof truncationShape>;

/** A setting as typed, or what stands for it. */
export function typedOr(inputs: TruncationInputs, field: keyof typeof unlessTyped): string {
  return inputs[field].trim() === "" ? unlessTyped[field] : inputs[field];
}
