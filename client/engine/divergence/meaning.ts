/** What a degree of divergence means: the verdict, and what each regulator shows. */
import type { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import type { Counterterm, GraphDivergence, Meaning, Verdict } from "./value.ts";

const two = Rational.of(2);

export function verdictOf(omega: LinearForm, loops: number): Verdict {
  if (loops === 0) return "tree";
  const degree = omega.asRational();
  if (!degree) return "depends";
  return degree.sign() < 0 ? "convergent" : degree.sign() === 0 ? "logarithmic" : "power";
}

/** Where ω vanishes, when it depends on one symbol alone. */
export function logarithmicAt(omega: LinearForm): GraphDivergence["logarithmicAt"] {
  const [symbol, ...others] = omega.freeSymbols();
  if (!symbol || others.length > 0) return null;
  const value = omega.zeroIn(symbol);
  return value ? { symbol, value: shown(value), growsAbove: omega.slope(symbol).sign() > 0 } : null;
}

export interface GraphFacts {
  readonly verdict: Verdict;
  readonly omega: LinearForm;
  readonly loops: number;
  readonly vanishes: boolean;
  /** Whether every internal line is a Schrödinger field's: then the energy integrals come first. */
  readonly onlySchroedingerLines: boolean;
  readonly counterterms: readonly Counterterm[];
}

/**
 * Dimensional regularisation: the overall divergence is a pole only if a local operator with analytic coefficients has
 * the right dimension. In odd d none has at odd loop order. For Schrödinger propagators the energy integrals leave D·L
 * powers of k² in even steps, so D·L must be even: even D at one loop, and D = 3 at two loops (three-body contact terms).
 */
export function dimensionalMeaning(facts: GraphFacts, theory: Theory): Meaning {
  if (facts.verdict === "tree") return "tree";
  if (facts.vanishes) return "vanishes: retarded loop";
  if (facts.verdict === "depends") return "depends";
  if (facts.verdict === "convergent") return "convergent";
  if (theory.spacetime.geometry === "isotropic") {
    const d = theory.spacetime.d.asRational();
    if (d && d.isInteger() && isOdd(d) && facts.loops % 2 !== 0) return "no pole: odd dimension, odd loops";
  } else if (facts.onlySchroedingerLines) {
    const momenta = theory.spacetime.D.asRational()?.times(Rational.of(facts.loops));
    if (momenta?.isInteger() && isOdd(momenta)) return "no pole: Schrödinger, odd D·L";
  }
  return facts.counterterms.some(({ analytic }) => analytic) ? "pole" : "no pole: no analytic counterterm";
}

function isOdd(value: Rational): boolean {
  return !value.over(two).isInteger();
}

/**
 * A cutoff shows Λ^ω and, in the steps in which momenta and masses enter, lower powers; a logarithm too when a
 * counterterm uses up all of ω analytically, which is the same condition as for a pole.
 */
export function cutoffMeaning(facts: GraphFacts, dimensional: Meaning): Meaning {
  if (facts.verdict === "logarithmic" && !facts.vanishes) return "logarithm of the cutoff";
  if (facts.verdict !== "power" || facts.vanishes) return dimensional;
  return dimensional === "pole" ? "powers and a logarithm of the cutoff" : "powers of the cutoff";
}
