/** What a Divergence block is asked: one graph by its vertices and legs, or the whole theory within caps. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";

export const divergenceShape = defineShape({
  fields: {
    title: note(),
    /** One connected graph, or every amplitude the premises' interactions can make. */
    mode: choice("one graph", "whole theory"),
    /** Whole theory: the most loops considered; "" is 2. */
    maxLoops: text("2"),
    /** Whole theory: the most external legs listed; "" is 6. */
    maxLegs: text("6"),
    /** Whole theory: the largest order in 1/Λ (sum of Δ − d over the insertions) considered; "" is 2. */
    maxOrder: text("2"),
    /** Whether the charges of the premises' symmetries forbid amplitudes and counterterms. */
    symmetries: choice("yes", "no"),
    /** One graph: what is not listed. Tadpole parts hang on one vertex without external legs; closed lines are such. */
    leftOut: choice("nothing", "closed lines", "tadpole parts"),
    /** One graph: whether legs of one field are told apart, so that each channel is a graph of its own. */
    toldLegs: choice("interchangeable", "labelled"),
    /** One graph: whether graphs that cancel by charge conjugation (Furry 1937) are left out. */
    furry: choice("no", "yes"),
    note: note(),
  },
  tables: {
    vertices: {
      /** Row id of a term of the premises: it survives reordering and retyping. */
      term: text(),
      /** How many of it: a positive whole number. */
      count: text("1"),
    },
    legs: {
      /** A field of the premises as terms write it: "phi", "psi"; "psibar" and "phi^\dagger" are conjugates. */
      field: text(),
      /** "pair" is one leg of the field and one of its conjugate; a real field's legs are all "field". */
      leg: choice("field", "conjugate", "pair"),
      /** How many: a positive whole number. A pair counts two legs. */
      count: text("1"),
    },
  },
});

export type DivergenceInputs = InputsOf<typeof divergenceShape>;
