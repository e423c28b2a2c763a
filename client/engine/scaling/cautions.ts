/** What a reader of the sizes should know. Paths are empty: the terms stand in the premises, not in this block. */
import type { Notice } from "../evaluation.ts";
import { roundFloat } from "../evaluation.ts";
import { shown } from "../notation/quantity.ts";
import { forbidding } from "../premises/read-terms.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { couplingsAtStrongest } from "./dimensional-analysis.ts";
import type { ScalingInputs } from "./inputs.ts";
import { classify } from "./classes.ts";
import type { Size } from "./sizes.ts";
import type { WorkingPoint } from "./working-point.ts";

/**
 * Notices: `term-forbidden`, `relevant-unassigned` (with the size its written coefficient would have, where that can
 * be told), `coupling-at-strongest`, `analysis-means-strong`, `loop-mass-below-probe`, `two-free-dimensions`.
 */
export function scalingCautions(
  theory: Theory,
  sized: readonly { readonly term: Term; readonly size: Size }[],
  point: WorkingPoint,
  inputs: ScalingInputs,
): Notice[] {
  const notices: Notice[] = [];
  const add = (code: string, facts: Notice["facts"]) => notices.push({ code, path: [], facts });
  const analysed = inputs.at === "naive dimensional analysis";
  for (const { term, size } of sized) {
    const facts = { term: term.latex, rowId: term.rowId };
    const forbiddenBy = forbidding(term.monomial, theory.fields, theory.symmetries);
    if (forbiddenBy.length > 0)
      add("term-forbidden", { ...facts, symmetries: forbiddenBy.map(({ name }) => name).join(", ") });
    const relevant = classify(term.coefficient, null).scalingClass === "relevant";
    // Analysis has already counted light masses in the coefficient, and small relevant terms upset nothing.
    if (relevant && size.from !== "assigned" && (size.quantity?.value ?? Infinity) >= 1)
      add("relevant-unassigned", { ...facts, ...sizeFact(size), ...writtenSize(term, theory, point) });
    const strongest = analysed ? couplingsAtStrongest(term, theory) : [];
    if (strongest.length > 0) add("coupling-at-strongest", { ...facts, symbols: strongest.join(", ") });
  }
  if (analysed && (inputs.couplings === "weak" || inputs.couplings === "loop-generated"))
    add("analysis-means-strong", { couplings: inputs.couplings });
  const loopRatio = point.expansion ? point.expansion.value * 4 * Math.PI : 0;
  if (inputs.couplings === "loop-generated" && loopRatio >= 1)
    add("loop-mass-below-probe", { ratio: Number(loopRatio.toPrecision(3)) });
  const { spacetime } = theory;
  if (spacetime.geometry === "anisotropic" && !spacetime.D.asRational() && !spacetime.z.asRational())
    add("two-free-dimensions", {});
  return notices;
}

function sizeFact(size: Size): Notice["facts"] {
  return size.quantity ? { size: roundFloat(shown(size.quantity).value) } : {};
}

/**
 * A coefficient made of scales alone, such as m² in m²φ²/2, says its own size, m²/p². It is offered, never taken: a
 * person decides that the coupling is tuned or protected.
 */
function writtenSize(term: Term, theory: Theory, point: WorkingPoint): Notice["facts"] {
  const factors = term.monomial.coefficients.filter(({ symbol }) => symbol !== "i" && symbol !== "pi");
  const dimension = term.coefficient.asRational();
  const probe = point.probe?.symbol;
  const allEnergies = factors.every(({ symbol }) =>
    theory.scales.some((scale) => scale.symbol === symbol && scale.gev !== null),
  );
  if (!dimension || !probe || factors.length === 0 || !allEnergies) return {};
  const power = factors.reduce((sum, factor) => sum.plus(factor.power), dimension.minus(dimension));
  if (!power.equals(dimension)) return {};
  const raised = (symbol: string, exponent: string) =>
    exponent === "1" ? symbol : /^\d+$/.test(exponent) ? `${symbol}^${exponent}` : `${symbol}^(${exponent})`;
  const written = factors.map((factor) => raised(factor.symbol, factor.power.toString())).join(" ");
  return { written: `${written}/${raised(probe, dimension.toString())}` };
}
