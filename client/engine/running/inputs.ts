/** What a person chooses for a Running block. Charges are comma separated, one per group in the order of that table. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

export const subjects = [
  "running between two scales",
  "fixed points in 4 − ε dimensions",
  "fixed points in 3 − ε dimensions",
] as const;
export const signs = ["as in the potential V", "as in the Lagrangian, −V"] as const;
export const contentKinds = ["Weyl fermion", "Dirac fermion", "complex scalar", "real scalar"] as const;
export const givenAs = ["g", "α = g²/4π"] as const;

export const runningShape = defineShape({
  fields: {
    title: note(),
    about: choice(subjects[0], ...subjects.slice(1)),
    /** Where couplings are given: a scale's symbol or a value with unit. */
    from: text(),
    to: text(),
    /** How the terms of the premises enter: with the sign they have in V, or in the Lagrangian. */
    sign: choice(signs[0], ...signs.slice(1)),
    /** Loops of the gauge couplings; all others run at one loop. */
    gaugeLoops: choice("1", "2"),
    /** ε for the numbers of fixed points; "" is 4 − d (or 3 − d) of the premises where that is above 0, else 1. */
    epsilon: text(),
    note: note(),
  },
  tables: {
    /** Values at the first scale: "lambda" or "m^2" as in the premises. A scale of the premises gives its own number. */
    values: {
      coupling: text(),
      value: text(),
    },
    /** Scales between, for the table of values. */
    at: {
      scale: text(),
    },
    /** How many components a scalar field stands for, of O(N); copies of a fermion. */
    components: {
      field: text(),
      count: text(),
    },
    groups: {
      /** "SU(3)", "U(1)". */
      group: text("SU(3)"),
      /** "g_3" or "alpha_s". */
      symbol: text(),
      given: choice(givenAs[0], ...givenAs.slice(1)),
      value: text(),
      /** U(1) only: k in g² = k g_Y², where charges are meant for g_Y; 5/3 for the usual unified one. */
      unit: text(),
    },
    content: {
      name: text(),
      kind: choice(contentKinds[0], ...contentKinds.slice(1)),
      /** "3, 2, 1/6". */
      charges: text(),
      copies: text("1"),
      /** Below this scale the field has left; "" never. */
      mass: text(),
    },
  },
});
export type RunningInputs = InputsOf<typeof runningShape>;
