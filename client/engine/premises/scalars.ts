/** What of a theory can be pinned into prose. */
import { roundFloat, type Scalar, type ScalarValue } from "../evaluation.ts";
import type { LinearForm } from "../exact/linear-form.ts";
import type { Theory } from "./theory.ts";

/** An exact scalar. */
export function exactValue(value: LinearForm): ScalarValue {
  return { type: "exact", text: value.toString() };
}
/** A float scalar; uncertainty and unit only where there are any. */
export function numberValue(value: number, sigma: number, unit: string): ScalarValue {
  return {
    type: "number",
    value: roundFloat(value),
    ...(sigma > 0 ? { sigma: roundFloat(sigma) } : {}),
    ...(unit === "" ? {} : { unit }),
  };
}

/** Ids: "<field row>/dimension", "/weight"; "<scale row>/value"; "<term row>/dimension", "/coefficient". */
export function premisesScalars(theory: Theory): Scalar[] {
  return [
    ...theory.fields.flatMap(({ rowId, latex, dimension, weight }): Scalar[] => [
      { id: `${rowId}/dimension`, label: `dimension of $${latex}$`, value: exactValue(dimension) },
      { id: `${rowId}/weight`, label: `ultraviolet weight of $${latex}$`, value: exactValue(weight) },
    ]),
    ...theory.scales.flatMap(({ rowId, latex, value, sigma, unit }): Scalar[] =>
      value === null
        ? []
        : [{ id: `${rowId}/value`, label: `$${latex}$`, value: numberValue(value, sigma, unit) }],
    ),
    ...theory.terms.flatMap(({ rowId, latex, dimension, coefficient }): Scalar[] => [
      { id: `${rowId}/dimension`, label: `dimension of $${latex}$`, value: exactValue(dimension) },
      {
        id: `${rowId}/coefficient`,
        label: `dimension of the coefficient of $${latex}$`,
        value: exactValue(coefficient),
      },
    ]),
  ];
}
