/** The degree of one graph in both ways, written out with this theory's numbers. */
import { LinearForm } from "../exact/linear-form.ts";
import type { Theory } from "../premises/theory.ts";
import type { Degree, GraphParts } from "./degree.ts";
import { countOf } from "./half-edges.ts";

/** A form inside a product: sums and negative numbers are bracketed. */
export function bracketed(form: LinearForm): string {
  const latex = form.toLatex();
  return /^[^-].* [+-] |^-/.test(latex) ? `\\left(${latex}\\right)` : latex;
}

/** "a - b - c" from its subtracted products; a zero sum is left out. */
function minusEach(products: readonly string[]): string {
  return products.map((product) => ` - ${product}`).join("");
}

/** "\\omega = 4\\cdot 1 - 2\\cdot 2 = 0": measure and loops, propagators, derivatives. */
export function byMomenta({ vertices }: GraphParts, { lines, loops, omega }: Degree, theory: Theory): string {
  const propagators = theory.fields.flatMap((field, f) => {
    const count = lines[f] ?? 0;
    return count === 0 ? [] : [`${count}\\cdot ${bracketed(theory.measure.minus(field.weight.times(2)))}`];
  });
  const derivatives = vertices
    .filter(({ term }) => !term.derivativeWeight.equals(LinearForm.zero))
    .map(({ term, count }) => ` + ${count}\\cdot ${bracketed(term.derivativeWeight)}`);
  const measure = `${bracketed(theory.measure)}\\cdot ${loops}`;
  return `\\omega = ${measure}${minusEach(propagators)}${derivatives.join("")} = ${omega.toLatex()}`;
}

/** "\\omega = 4 - 4\\cdot 1 - 2\\cdot 0 = 0": measure, external legs, couplings. */
export function byDimensions({ vertices, legs }: GraphParts, { omega }: Degree, theory: Theory): string {
  const external = theory.fields.flatMap((field, f) => {
    const count = countOf(legs, f);
    return count === 0 ? [] : [`${count}\\cdot ${bracketed(field.weight)}`];
  });
  const couplings = vertices.map(
    ({ term, count }) => `${count}\\cdot ${bracketed(term.ultravioletCoefficient)}`,
  );
  return `\\omega = ${theory.measure.toLatex()}${minusEach(external)}${minusEach(couplings)} = ${omega.toLatex()}`;
}
