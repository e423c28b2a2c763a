/**
 * Naive dimensional analysis in four dimensions (Manohar and Georgi 1984; Gavela, Jenkins, Manohar and Merlo 2016):
 * a term of N_p derivatives, N fields, couplings g, y, λ and light masses has the size
 *
 *   Λ⁴/16π² · (∂/Λ)^N_p (4πφ/Λ)^N_φ (4πA/Λ)^N_A (4πψ/Λ^{3/2})^N_ψ (g/4π)^N_g (y/4π)^N_y (λ/16π²)^N_λ (m_ψ/Λ)^p (m_φ²/Λ²)^q.
 *
 * Relative to the kinetic terms at momentum p this is (4π)^(N−2) (p/Λ)^(Δ−4) times the couplings and masses, with N all
 * fields. A coupling's power of 4π is that of the marginal term it multiplies: (4π)^(N−2), which is 4π for g and y and
 * 16π² for λ.
 */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { float, power, times, type Quantity } from "../notation/quantity.ts";
import { quantityOfScale } from "../premises/declared-scales.ts";
import type { FieldKind, Scale, Term, Theory } from "../premises/theory.ts";
import type { WorkingPoint } from "./working-point.ts";

/** The kinds that the rule counts: canonically normalised scalars, vectors, spinors, and what is made of them. */
const counted: readonly FieldKind[] = [
  "real scalar",
  "complex scalar",
  "Weyl spinor",
  "Majorana spinor",
  "Dirac spinor",
  "gauge potential",
  "massive vector",
  "massive vector, conserved current",
  "field strength",
  "ghost",
];

/**
 * What the rule does not cover. Problems: `analysis-needs-four-dimensions` (other or symbolic d, anisotropic scaling),
 * `analysis-kind-not-covered` (static and spin 3/2 fields, metric fluctuations), `analysis-dimension-overridden`.
 */
export function analysisRefusals(theory: Theory): Problem[] {
  const { spacetime } = theory;
  const four = spacetime.geometry === "isotropic" && spacetime.d.toString() === "4";
  if (!four) return [{ code: "analysis-needs-four-dimensions", path: ["at"], facts: {} }];
  return theory.fields.flatMap(({ symbol, kind, overridden }): Problem[] => {
    if (overridden) return [{ code: "analysis-dimension-overridden", path: ["at"], facts: { symbol } }];
    return counted.includes(kind)
      ? []
      : [{ code: "analysis-kind-not-covered", path: ["at"], facts: { symbol, kind } }];
  });
}

export function legsOf(term: Term): number {
  return term.monomial.fields.reduce((sum, { count }) => sum + count, 0);
}

/**
 * Power of 4π of a coupling: N − 2 of the first marginal interaction that it multiplies once; null when there is none,
 * and then the symbol is a coefficient that the rule expects to be of order one.
 */
function couplingPower(symbol: string, theory: Theory): number | null {
  const home = theory.terms.find(
    (term) =>
      !term.kinetic &&
      legsOf(term) > 2 &&
      term.coefficient.toString() === "0" &&
      term.monomial.coefficients.some(
        (factor) => factor.symbol === symbol && factor.power.equals(Rational.one),
      ),
  );
  return home ? legsOf(home) - 2 : null;
}

const fourPi = float(4 * Math.PI);
function fourPiTo(exponent: number): Quantity {
  const result = power(fourPi, Rational.of(exponent));
  // Legs are at most 1000, whose power of 4π overflows; such a term has no size.
  return "code" in result ? float(Infinity) : result;
}
function fourPiLatex(exponent: number): string {
  return exponent === 0 ? "" : exponent === 1 ? "4\\pi" : `(4\\pi)^{${exponent}}`;
}

/** What multiplies ĝ (p/Λ)^(Δ − 4), as a quantity and as LaTeX factors. */
export function dimensionalAnalysis(
  term: Term,
  theory: Theory,
  point: WorkingPoint,
): { readonly quantity: Quantity | null; readonly latex: readonly string[] } {
  const excess = legsOf(term) - 2;
  let quantity: Quantity | null = fourPiTo(excess);
  const latex = [fourPiLatex(excess)];
  for (const { symbol, power: exponent } of term.monomial.coefficients) {
    const scale = theory.scales.find((one) => one.symbol === symbol);
    if (!scale) continue;
    const factor = scaleFactor(scale, exponent, theory, point);
    if (!factor) continue;
    latex.push(factor.latex);
    quantity = quantity && factor.quantity && times(quantity, factor.quantity);
  }
  return { quantity: quantity && Number.isFinite(quantity.value) ? quantity : null, latex };
}

/** A declared coupling or light mass in a coefficient; null for scales whose powers the rule supplies itself. */
function scaleFactor(
  scale: Scale,
  exponent: Rational,
  theory: Theory,
  point: WorkingPoint,
): { readonly quantity: Quantity | null; readonly latex: string } | null {
  const value = quantityOfScale(scale);
  const isNumber = value ? value.energy.sign() === 0 : scale.role === "other";
  const isMass = scale.role === "light" && exponent.sign() > 0;
  if (!isMass && !(isNumber && scale.role !== "heavy" && scale.role !== "probe")) return null;
  const weight = isMass ? 0 : (couplingPower(scale.symbol, theory) ?? 0);
  const under = isMass ? (point.heavy?.quantity ?? null) : fourPiTo(weight);
  const inverse = under && power(under, Rational.of(-1));
  const ratio = value && inverse && !("code" in inverse) ? times(value, inverse) : null;
  const raised = ratio && power(ratio, exponent);
  const below = isMass ? (point.heavy?.latex ?? "\\Lambda") : fourPiLatex(weight);
  const base = below === "" ? scale.latex : `\\frac{${scale.latex}}{${below}}`;
  const text = exponent.toString();
  const latex = text === "1" ? base : `\\left(${base}\\right)^{${text}}`;
  // Masses of another dimension than Λ make no ratio.
  const pure = raised && !("code" in raised) && raised.energy.sign() === 0 ? raised : null;
  return { quantity: pure, latex };
}

/** Undeclared couplings of marginal interactions: the rule takes them at their strongest. */
export function couplingsAtStrongest(term: Term, theory: Theory): readonly string[] {
  if (term.kinetic || term.coefficient.toString() !== "0" || term.assigned) return [];
  return term.monomial.coefficients
    .map(({ symbol }) => symbol)
    .filter((symbol) => symbol !== "i" && symbol !== "pi" && !/^\d+$/.test(symbol))
    .filter((symbol) => !theory.scales.some((scale) => scale.symbol === symbol))
    .filter((symbol) => couplingPower(symbol, theory) !== null);
}
