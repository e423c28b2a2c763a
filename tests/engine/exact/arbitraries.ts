/** Random exact numbers for laws. */
import fc from "fast-check";
import { LinearForm } from "#engine/exact/linear-form.ts";
import { Rational } from "#engine/exact/rational.ts";

export const rational = fc
  .tuple(fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }), fc.bigInt({ min: 1n, max: 10n ** 20n }))
  .map(([n, m]) => Rational.of(n, m));
export const smallRational = fc
  .tuple(fc.integer({ min: -60, max: 60 }), fc.integer({ min: 1, max: 12 }))
  .map(([n, m]) => Rational.of(n, m));
export const linearForm = fc
  .tuple(smallRational, smallRational, smallRational, smallRational)
  .map(([a, b, c, e]) =>
    LinearForm.constant(a)
      .plus(LinearForm.symbol("d").times(b))
      .plus(LinearForm.symbol("D").times(c))
      .plus(LinearForm.symbol("z").times(e)),
  );
