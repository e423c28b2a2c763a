/** A small vocabulary for tests of Truncation error: a block by what matters to the case, and its answers by name. */
import type { Evaluation } from "#engine/evaluation.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { aloneContext } from "#engine/kind.ts";
import { truncationError } from "#engine/truncation/kind.ts";
import type { TruncationInputs } from "#engine/truncation/shape.ts";
import type { TruncationValue } from "#engine/truncation/value.ts";

type Fields = Omit<TruncationInputs, "orders" | "observables">;

/** X by order: null is absent by symmetry. Row ids are "n0", "n1", … */
export type ByOrder = Readonly<Record<number, string | number | null>>;

export function blockInputs(orders: ByOrder, fields: Partial<Fields> = {}): TruncationInputs {
  const initial = Object.fromEntries(
    Object.entries(truncationError.shape.fields).map(([name, spec]) => [name, spec.initial]),
  ) as unknown as Fields; // one text for each field of the shape
  return {
    ...initial,
    ...fields,
    observables: [],
    orders: Object.entries(orders).map(([order, value]) => ({
      id: `n${order}`,
      order,
      value: value === null ? "" : String(value),
      name: "",
    })),
  };
}

export function evaluateBlock(
  orders: ByOrder,
  fields: Partial<Fields> = {},
  theory: Theory | null = null,
): Evaluation<TruncationValue> {
  return truncationError.evaluate(blockInputs(orders, fields), theory, aloneContext);
}

/** The number behind a scalar; throws when the block has no such scalar, so that a test cannot pass without it. */
export function scalar({ scalars, problems }: Evaluation, id: string): number {
  const value = scalars.find((candidate) => candidate.id === id)?.value;
  if (!value) throw new Error(`no scalar ${id}; problems: ${problems.map(({ code }) => code).join(", ")}`);
  if (value.type === "number") return value.value;
  return Number(value.text);
}

/** X^(k) = X_ref Σ c_n Qⁿ as decimals that lose nothing a test would see. */
export function partialSums(coefficients: readonly number[], q: number, reference = 1): ByOrder {
  let sum = 0;
  return Object.fromEntries(
    coefficients.map((c, n) => {
      sum += reference * c * q ** n;
      return [n, sum.toPrecision(17)];
    }),
  );
}
