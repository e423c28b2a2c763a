/** What a Closure is asked: how far in 1/Λ, loops and legs, with which regulator, and what selects. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

export const regulators = ["dimensional regularisation", "cutoff"] as const;

export const closureShape = defineShape({
  fields: {
    title: note(),
    regulator: choice(...regulators),
    /** The largest order in 1/Λ of all insertions together; "" is 2. */
    maxOrder: text("2"),
    /** The most loops considered; "" is 2. */
    maxLoops: text("2"),
    /** The most external legs; "" is as many as the order leaves room for. */
    maxLegs: text(),
    /** Dimensional regularisation: whether masses make up dimensions, or the theory is massless. */
    masses: choice("kept as light parameters", "none: a massless theory"),
    /** Whether the charges of the premises' symmetries select operators. */
    symmetries: choice("yes", "no"),
    /** Fields, comma separated, whose shift by a constant is a symmetry: each such leg needs a derivative. */
    shift: text(),
    note: note(),
  },
  tables: {},
});

export type ClosureInputs = InputsOf<typeof closureShape>;
