/** What a person states for a Basis count. Charges are comma separated, one per group in the order of that table. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

export const countedKinds = [
  "real scalar",
  "complex scalar",
  "pseudoscalar",
  "left-handed spinor",
  "right-handed spinor",
  "field strength",
] as const;
export type CountedKind = (typeof countedKinds)[number];

export const patienceChoices = ["a few seconds at most", "however long it takes"] as const;

export const basisShape = defineShape({
  fields: {
    title: note(),
    /** Dimension of spacetime: 4, or 3 to 6 for scalars alone. */
    d: text("4"),
    /** Mass dimensions, inclusive; above d. Whole numbers, or halves in odd d. */
    from: text("5"),
    to: text("8"),
    parity: choice("without parity", "with parity"),
    /** Where n_f is asked for: a whole number. */
    flavours: text("3"),
    patience: choice(...patienceChoices),
    note: note(),
  },
  tables: {
    groups: {
      name: text(),
      /** "SU(3)", "U(1)", "Z2", "O(4)". */
      group: text("SU(3)"),
      /** For U(1) and Z_n, the charges an operator may have: "" is 0 only, "all", or a list "1, -1". */
      keep: text(),
    },
    fields: {
      symbol: text(),
      kind: choice(countedKinds[0], ...countedKinds.slice(1)),
      /** "3, 2, 1/6": a representation for SU(N) (its dimension, "3bar", "adj", or Dynkin labels), "vector" or 1 for O(N), a charge. */
      charges: text(),
      /** Number of copies: a whole number, or n_f. */
      flavours: text("1"),
      meaning: note(),
    },
  },
});
export type BasisInputs = InputsOf<typeof basisShape>;
