/** What a person states for a Counting rules block: small parameters, and what everything counts in powers of them. */
import { choice, defineShape, note, text, type InputsOf } from "../shape.ts";
import { presetNames } from "./preset-names.ts";

export const ruleSubjects = [
  "field",
  "derivative",
  "time derivative",
  "coupling or scale",
  "measure",
  "loop",
] as const;
export type RuleSubject = (typeof ruleSubjects)[number];

export const countingShape = defineShape({
  fields: {
    title: note(),
    /** Which published counting the rules began as; its conventions are stated with the result. */
    preset: choice(presetNames[0], ...presetNames.slice(1)),
    /** Added to the order of every graph, one exponent per parameter: another normalisation of the amplitude. */
    offset: text(),
    note: note(),
  },
  tables: {
    parameters: {
      /** "v", "lambda", "Q". */
      symbol: text(),
      /** A number or an expression in scales, "p/Lambda"; "" when it has none. */
      value: text(),
      meaning: note(),
    },
    rules: {
      of: choice(ruleSubjects[0], ...ruleSubjects.slice(1)),
      /** The field, coupling or scale; "" for all others. */
      symbol: text(),
      /** One exponent per parameter, separated by commas: "3/2", "-1, 1/2". */
      weight: text(),
    },
    exceptions: {
      /** Row id of a term of the premises. */
      term: text(),
      /** Added to what the rules give it. */
      weight: text(),
      why: note(),
    },
    vertices: {
      /** Row id of a term of the premises. */
      term: text(),
      count: text("1"),
    },
    legs: {
      field: text(),
      leg: choice("field", "conjugate", "pair"),
      count: text("1"),
    },
  },
});
export type CountingInputs = InputsOf<typeof countingShape>;
