/** How an exact number leaves the engine: canonical text, and the same as LaTeX. */
import { LinearForm } from "./linear-form.ts";
import type { Rational } from "./rational.ts";

export function shown(value: LinearForm | Rational | bigint | number): {
  readonly text: string;
  readonly latex: string;
} {
  const form = value instanceof LinearForm ? value : LinearForm.constant(value);
  return { text: form.toString(), latex: form.toLatex() };
}
