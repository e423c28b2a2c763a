import { evaluateCounting } from "#engine/counting/evaluate.ts";
import { countingShape } from "#engine/counting/inputs.ts";
import type { CountingValue } from "#engine/counting/value.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryFrom, type Sketch } from "../premises/state.ts";

type Row = Readonly<Record<string, string>>;
export interface CountingQuestion {
  readonly theory: Sketch;
  readonly preset?: string;
  readonly offset?: string;
  readonly parameters?: readonly Row[];
  readonly rules?: readonly Row[];
  readonly exceptions?: readonly Row[];
  readonly vertices?: readonly Row[];
  readonly legs?: readonly Row[];
}

/** Rows are named by table and place: "rules1". */
export function count({ theory, ...asked }: CountingQuestion) {
  const inputs = Object.fromEntries(
    Object.entries(asked).map(([name, typed]) => [
      name,
      typeof typed === "string" ? typed : typed.map((row, at) => ({ id: `${name}${at + 1}`, ...row })),
    ]),
  );
  return evaluateCounting(schemaOf(countingShape).parse(inputs), theoryFrom(theory));
}
export function valueOf(question: CountingQuestion): CountingValue {
  const { value, problems } = count(question);
  const all = [...problems, ...theoryFrom(question.theory).problems];
  if (!value || all.length > 0) throw new Error(JSON.stringify(all));
  return value;
}
/** Orders of all terms, in order; of several parameters joined by commas. */
export const ordersOf = (question: CountingQuestion) =>
  valueOf(question).terms.map(({ order }) => order?.join(", ") ?? null);
export const graphOf = (question: CountingQuestion) =>
  valueOf(question)
    .graph?.order.map(({ text }) => text)
    .join(", ");
