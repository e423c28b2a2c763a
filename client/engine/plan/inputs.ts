/** What an Order plan is asked: the accuracy wanted, of which observable, and how far to look. */
import { choice, defineShape, note, reference, text, type InputsOf } from "../shape.ts";

export const orderPlanShape = defineShape({
  fields: {
    title: note(),
    /** Relative accuracy wanted: "1e-3", "0.001", "0.1 %", "1 %". */
    target: text("1 %"),
    /** Probe scale p: "" takes the premises' probe scale; else a scale's symbol, or a value with unit: "250 GeV". */
    probe: text(),
    /** Heavy scale Λ: "" takes the premises' heavy scale; else a scale's symbol, or a value with unit. */
    heavy: text(),
    observable: choice("amplitude", "rate with interference", "rate without interference"),
    /** The most insertions of suppressed terms in one amplitude: a whole number from 1 to 6. */
    insertions: text("2"),
    /** The largest order (power of p/Λ) considered. */
    cap: text("8"),
    /** Whether unlisted terms past the highest listed order are estimated at natural size when the cut is made. */
    unlisted: choice("natural tail", "listed terms only"),
    /** A Basis count whose numbers of operators are shown beside the orders. */
    basis: reference(["basisCount"]),
    /** Counting rules whose small parameters span a lattice of orders. */
    counting: reference(["countingRules"]),
    note: note(),
  },
  tables: {},
});

export type OrderPlanInputs = InputsOf<typeof orderPlanShape>;
