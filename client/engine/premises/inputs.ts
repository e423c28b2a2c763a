/** What a person types to state a theory. Row charges are comma separated, one per symmetry in the order of that table. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";
import { fieldKinds } from "./theory.ts";

const [firstKind, ...otherKinds] = fieldKinds;

export const premisesShape = defineShape({
  fields: {
    /** Shown title of the theory. */
    name: note(),
    geometry: choice("isotropic", "anisotropic"),
    /** Spacetime dimension of an isotropic theory: a number, a fraction, or the symbol d. */
    d: text("4"),
    /** Number of space dimensions of an anisotropic theory, or the symbol D. */
    D: text("3"),
    /** Anisotropy exponent, time counts −z; a number or the symbol z. */
    z: text("2"),
    note: note(),
  },
  tables: {
    fields: {
      symbol: text(),
      kind: choice(firstKind, ...otherKinds),
      /** Override of the dimension, an exact linear form: "(d-4)/2", "1 + 1/40" (canonical plus anomalous γ); "" by kind. */
      dimension: text(),
      /** "1, -2, odd": one per symmetry; "odd" and "even" for Z2; what is left out counts 0. */
      charges: text(),
      meaning: note(),
    },
    symmetries: {
      name: text(),
      /** "Z2", "Z_3", "U(1)". */
      group: text("Z2"),
      meaning: note(),
    },
    scales: {
      symbol: text(),
      /** "3.2(4) TeV", "350 GeV", "0.5", "3.2 ± 0.4 TeV", or an expression in other scales: "p/Lambda". */
      value: text(),
      role: choice("other", "heavy", "probe", "light"),
      meaning: note(),
    },
    terms: {
      term: text(),
      /** Natural coefficient ĝ; "" is 1. */
      natural: text(),
      /** Relative size typed by hand: a number or an expression in scales such as "m^2/p^2"; "" is by dimension. */
      assigned: text(),
      meaning: note(),
    },
  },
});

export type PremisesInputs = InputsOf<typeof premisesShape>;
export type FieldRow = PremisesInputs["fields"][number];
export type SymmetryRow = PremisesInputs["symmetries"][number];
export type ScaleRow = PremisesInputs["scales"][number];
export type TermRow = PremisesInputs["terms"][number];
