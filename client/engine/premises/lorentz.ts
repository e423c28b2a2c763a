/** Whether the Lorentz indices of a term can all be contracted. */
import type { FieldKind, Term, Theory } from "./theory.ts";

/** Indices that a leg carries; kinds that are not here carry spin in other ways. */
const indicesOf: Partial<Readonly<Record<FieldKind, number>>> = {
  "real scalar": 0,
  "complex scalar": 0,
  "gauge potential": 1,
  "massive vector": 1,
  "massive vector, conserved current": 1,
  "field strength": 2,
  "metric fluctuation": 2,
};

/**
 * The number of indices when it is odd and nothing can contract it; null otherwise, and where this cannot be told.
 * The metric takes indices in pairs, and the only other invariant tensor has d of them, so an odd number is left over
 * in even d, and in odd d when there are fewer than d. Matrices of spinors and the velocity of a static field take
 * indices of their own, so terms with such fields are passed over.
 */
export function uncontractedIndices({ monomial }: Term, { spacetime, fields }: Theory): number | null {
  const d = spacetime.geometry === "isotropic" ? spacetime.d.asRational() : null;
  if (!d?.isInteger()) return null;
  let indices = monomial.derivatives;
  for (const { symbol, count } of monomial.fields) {
    const field = fields.find((one) => one.symbol === symbol);
    const each = field && !field.overridden ? indicesOf[field.kind] : undefined;
    if (each === undefined) return null;
    indices += each * count;
  }
  const oddDimension = d.numerator % 2n === 1n;
  return indices % 2 === 0 || (oddDimension && BigInt(indices) >= d.numerator) ? null : indices;
}
