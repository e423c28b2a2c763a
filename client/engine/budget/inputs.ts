/** What an Error budget is given: a value, and what makes it uncertain. */
import { choice, defineShape, note, reference, text, type InputsOf } from "../shape.ts";

export const sourceKinds = ["truncation", "parametric", "numerical", "scale variation", "other"] as const;
export type SourceKind = (typeof sourceKinds)[number];
export const combinations = ["in quadrature, with the correlations stated", "linearly"] as const;
export const conversions = ["units as they are", "natural units, ħ = c = 1"] as const;
/** What is taken of a number of another block. */
export const scalarParts = ["the number", "its uncertainty"] as const;

export const budgetShape = defineShape({
  fields: {
    title: note(),
    /** What the value is: "scattering length". */
    quantity: note(),
    /** Unit of the value and of the result: "MeV", "fm", or any other text such as "pb". */
    unit: text(),
    /** The value itself, with or without unit; "" when only its error is wanted. */
    value: text(),
    /** Or taken from a block. */
    from: reference("any"),
    scalar: text(),
    combine: choice(...combinations),
    convert: choice(...conversions),
    note: note(),
  },
  tables: {
    sources: {
      name: text(),
      kind: choice(sourceKinds[0], ...sourceKinds.slice(1)),
      /** Standard uncertainty: "0.012 GeV", "3 MeV", "1.2 %"; a sign says which way it moves together with its group. */
      size: text(),
      /** Or taken from a block. */
      from: reference("any"),
      scalar: text(),
      /** What of that number is the error: itself, or its own uncertainty. */
      part: choice(...scalarParts),
      /** Sources of one group move together. */
      group: text(),
    },
    correlations: {
      group: text(),
      /** Between any two sources of the group, −1 to 1; 1 where nothing is said. */
      coefficient: text("1"),
    },
    /** Two sources, by the ids of their rows, that have a coefficient of their own, whatever their groups. */
    pairs: {
      first: text(),
      second: text(),
      coefficient: text(),
    },
  },
});
export type BudgetInputs = InputsOf<typeof budgetShape>;
