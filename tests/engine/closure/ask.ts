/** Asks a Closure block about a theory, in the fewest words. */
import { evaluateClosure } from "#engine/closure/evaluate.ts";
import { closureShape, type ClosureInputs } from "#engine/closure/inputs.ts";
import { isMissing, type ClosureValue } from "#engine/closure/value.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { aloneContext } from "#engine/kind.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";

export type Asked = Partial<ClosureInputs>;

export function askClosure(theory: Theory | null, asked: Asked = {}): Evaluation<ClosureValue> {
  return evaluateClosure(schemaOf(closureShape).parse(asked), theory, aloneContext);
}

export function closureOf(theory: Theory, asked: Asked = {}): ClosureValue {
  const { value, problems } = askClosure(theory, asked);
  if (!value) throw new Error(`refused: ${problems.map(({ code }) => code).join(", ")}`);
  return value;
}

/** Every demanded operator with the order at which it is demanded: { "phi^4": "0", … }. */
export function demanded(theory: Theory, asked: Asked = {}): Record<string, string> {
  return Object.fromEntries(closureOf(theory, asked).operators.map(({ text, order }) => [text, order.text]));
}

/** The missing ones alone. */
export function missing(theory: Theory, asked: Asked = {}): Record<string, string> {
  const { operators } = closureOf(theory, asked);
  return Object.fromEntries(operators.filter(isMissing).map(({ text, order }) => [text, order.text]));
}
