/** Asking the Basis count for numbers, in few words. */
import { basisCount } from "#engine/basis/kind.ts";
import { basisShape, type BasisInputs } from "#engine/basis/inputs.ts";
import type { BasisValue } from "#engine/basis/value.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { aloneContext } from "#engine/kind.ts";

const initial = Object.fromEntries(
  Object.entries(basisShape.fields).map(([name, spec]) => [name, spec.initial]),
) as unknown as BasisInputs; // every single field of the shape

export function evaluate(inputs: Partial<BasisInputs>): Evaluation<BasisValue> {
  return basisCount.evaluate({ ...initial, groups: [], fields: [], ...inputs }, null, aloneContext);
}

/** The value, or the codes of what stands in its way. */
export function count(inputs: Partial<BasisInputs>): BasisValue {
  const { value, problems } = evaluate({ patience: "however long it takes", ...inputs });
  if (!value || problems.length > 0) throw new Error(problems.map(({ code }) => code).join(", "));
  return value;
}

export const codes = (inputs: Partial<BasisInputs>) => evaluate(inputs).problems.map(({ code }) => code);

/** Totals by dimension at the chosen number of flavours; without the zeros. */
export function totals(value: BasisValue): Record<string, string> {
  return Object.fromEntries(
    value.totals.filter(({ total }) => total.at !== "0").map(({ dimension, total }) => [dimension, total.at]),
  );
}

export const field = (
  symbol: string,
  kind: string,
  charges = "",
  flavours = "1",
): BasisInputs["fields"][number] => ({ id: symbol, symbol, kind, charges, flavours, meaning: "" });
export const group = (name: string, text: string, keep = ""): BasisInputs["groups"][number] => ({
  id: name,
  name,
  group: text,
  keep,
});
