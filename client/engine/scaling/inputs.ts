/** What a person chooses for a Scaling block. */
import { choice, defineShape, note, reference, text, type InputsOf } from "../shape.ts";

export const scalingShape = defineShape({
  fields: {
    title: note(),
    /** Which counting gives the sizes. */
    at: choice("natural size", "naive dimensional analysis"),
    /** Probe scale p: a scale's symbol or a value with unit; "" is the scale with role probe. */
    probe: text(),
    /** Heavy scale Λ: likewise; "" is the scale with role heavy. */
    heavy: text(),
    /** What the couplings at the heavy scale are taken to be, and so what Λ means. */
    couplings: choice("not stated", "strong", "weak", "loop-generated"),
    /** A Running block whose β functions split marginal terms, or whose fixed point gives dimensions. */
    running: reference(["running"]),
    /** Which of its fixed points, by the name its numbers have; "" is the one that attracts, else the first but the Gaussian. */
    fixedPoint: text(),
    note: note(),
  },
  tables: {},
});

export type ScalingInputs = InputsOf<typeof scalingShape>;
