/**
 * The order of a term and of a graph in powers of the small parameters.
 *
 * With weights w_f of the fields, k of derivatives, μ of the measure and ℓ of a loop integral, a term counts
 *   Δ_i = μ + Σ n_if w_f + k_i + couplings,
 * so a kinetic term counts nothing when the weights fit together. A propagator is then 2w_f + μ, and a connected graph
 *   ℓ L + Σ I_f (2w_f + μ) + Σ V_i (k_i + couplings) = −μ − Σ E_f w_f + (ℓ + μ) L + Σ V_i Δ_i
 * by 2I_f + E_f = Σ V_i n_if and L = Σ I_f − Σ V_i + 1 alone (own derivation; special cases: Weinberg 1979 and 1991).
 */
import type { Problem } from "../evaluation.ts";
import type { Degree, GraphParts } from "../divergence/degree.ts";
import { countOf } from "../divergence/half-edges.ts";
import type { Term, Theory } from "../premises/theory.ts";
import type { Rules } from "./read-rules.ts";
import { minus, plus, sameWeights, times, zeroWeights, type Weights } from "./weights.ts";

export interface TermOrder {
  readonly term: Term;
  /** Relative to the kinetic terms; null when a rule for something in it is missing. */
  readonly order: Weights | null;
  /** Derivatives, couplings and what was added by hand: what a vertex of a graph counts. */
  readonly vertex: Weights | null;
}
export interface GraphOrder {
  readonly amplitude: Weights;
  /** With the wave functions of its external legs. */
  readonly withLegs: Weights;
  /** Of each field: 2w + μ. */
  readonly propagators: readonly Weights[];
}

export function weightOfField(rules: Rules, symbol: string): Weights | null {
  return rules.fields.get(symbol) ?? rules.otherFields;
}

/** Problems: `rule-missing`, once for each thing without a rule, at the table of rules. */
export function ordersOfTerms(theory: Theory, rules: Rules, problems: Problem[]): readonly TermOrder[] {
  const missing = new Set<string>();
  const need = (weights: Weights | null, what: string): Weights | null => {
    if (!weights) missing.add(what);
    return weights;
  };
  const orders = theory.terms.map((term): TermOrder => {
    const vertex = vertexWeights(term, rules, need);
    const fields = fieldWeights(term, rules, need);
    const measure = need(rules.measure, "the measure");
    return { term, vertex, order: vertex && fields && measure && plus(plus(vertex, fields), measure) };
  });
  for (const what of missing) problems.push({ code: "rule-missing", path: ["rules"], facts: { what } });
  return orders;
}

type Need = (weights: Weights | null, what: string) => Weights | null;

function vertexWeights({ monomial, rowId }: Term, rules: Rules, need: Need): Weights | null {
  let sum = zeroWeights(rules.parameters.length);
  const add = (weights: Weights | null, what: string, count: number): boolean => {
    if (count === 0) return true;
    const known = need(weights, what);
    if (known) sum = plus(sum, times(known, count));
    return known !== null;
  };
  const known = [
    add(rules.derivative, "derivatives", monomial.derivatives),
    add(rules.timeDerivative, "time derivatives", monomial.timeDerivatives),
  ];
  for (const { symbol, power } of monomial.coefficients) {
    const weights = rules.symbols.get(symbol) ?? rules.otherSymbols;
    if (weights) sum = plus(sum, times(weights, power));
  }
  const exception = rules.exceptions.get(rowId);
  if (exception) sum = plus(sum, exception);
  return known.every(Boolean) ? sum : null;
}

function fieldWeights({ monomial }: Term, rules: Rules, need: Need): Weights | null {
  let sum: Weights | null = zeroWeights(rules.parameters.length);
  for (const { symbol, count } of monomial.fields) {
    const weights = need(weightOfField(rules, symbol), `the field ${symbol}`);
    sum = sum && weights && plus(sum, times(weights, count));
  }
  return sum;
}

/**
 * A graph's order, computed line by line and from its vertices alone; throws if the two differ, which would be our own
 * mistake. Null when a rule for one of its parts is missing.
 */
export function orderOfGraph(
  { vertices, legs }: GraphParts,
  { lines, loops }: Degree,
  theory: Theory,
  rules: Rules,
  terms: readonly TermOrder[],
): GraphOrder | null {
  const { measure, loop, offset } = rules;
  const weights = theory.fields.map(({ symbol }) => weightOfField(rules, symbol));
  const parts = vertices.map(({ term, count }) => ({
    count,
    ...terms.find((one) => one.term.rowId === term.rowId),
  }));
  if (!measure || !loop) return null;
  const zero = zeroWeights(rules.parameters.length);
  const propagators = weights.map((weight) => (weight ? plus(times(weight, 2), measure) : zero));
  let byLines = times(loop, loops);
  let byVertices = plus(times(measure, -1), times(plus(loop, measure), loops));
  let wave = zero;
  for (const [f, weight] of weights.entries()) {
    const [internal, external] = [lines[f] ?? 0, countOf(legs, f)];
    if (internal + external === 0) continue;
    if (!weight) return null;
    byLines = plus(byLines, times(propagators[f] ?? zero, internal));
    wave = plus(wave, times(weight, external));
  }
  byVertices = minus(byVertices, wave);
  for (const { count, vertex, order } of parts) {
    if (!vertex || !order) return null;
    byLines = plus(byLines, times(vertex, count));
    byVertices = plus(byVertices, times(order, count));
  }
  if (!sameWeights(byLines, byVertices))
    throw new Error(`order of a graph: ${String(byLines)} by lines, ${String(byVertices)} by vertices`);
  const amplitude = plus(byLines, offset);
  return { amplitude, withLegs: plus(amplitude, wave), propagators };
}
