/** Evaluates Counting rules: the order of every term and of a graph, beside the order by dimension. */
import { roundFloat, type Evaluation, type Problem } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import { shown as shownExact } from "../exact/shown.ts";
import { productLatex } from "../divergence/legs.ts";
import { countOf } from "../divergence/half-edges.ts";
import { readGraph } from "../divergence/read-graph.ts";
import {
  number,
  power,
  shown,
  sigmaOf,
  times as timesQuantity,
  type Quantity,
} from "../notation/quantity.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import { presentEstimate } from "../premises/present-measured.ts";
import type { Measured } from "../premises/value.ts";
import type { Theory } from "../premises/theory.ts";
import { conventionsOf } from "./conventions.ts";
import type { CountingInputs } from "./inputs.ts";
import { orderOfGraph, ordersOfTerms, type GraphOrder, type TermOrder } from "./orders.ts";
import { readRules, type Rules } from "./read-rules.ts";
import { countingScalars } from "./scalars.ts";
import { compareSequences } from "./sequences.ts";
import type { CountedGraph, CountingValue, OrderVector } from "./value.ts";
import { asNumbers, type Weights } from "./weights.ts";
import { countingWorking } from "./working.ts";

/**
 * Problems: `premises-missing`, those of rules and orders, and of the graph. Notices: `kinetic-term-counts` (the weights do not
 * fit together), `sizes-need-numbers`, `pure-nucleon-states`.
 */
export function evaluateCounting(inputs: CountingInputs, theory: Theory | null): Evaluation<CountingValue> {
  if (!theory) {
    const problems = [{ code: "premises-missing", path: ["standsOn"], facts: {} }];
    return { value: null, problems, notices: [], scalars: [], working: [] };
  }
  const problems: Problem[] = [];
  const rules = readRules(inputs, theory, problems);
  const orders = ordersOfTerms(theory, rules, problems);
  const graph = inputs.vertices.some(({ term }) => term !== "")
    ? countGraph(inputs, theory, rules, orders, problems)
    : null;
  const compared = compareSequences(orders, rules);
  const value: CountingValue = {
    parameters: rules.parameters.map(({ id, symbol, latex, quantity }) => ({
      id,
      symbol,
      latex,
      size: quantity && shown(quantity).value,
      sigma: quantity && shown(quantity).sigma,
      shown: quantity && presentEstimate(quantity.value, sigmaOf(quantity)),
      spread: relativeSpread(quantity),
      follows: rules.follows.get(id) ?? null,
    })),
    terms: orders.map(({ term, order }, index) => ({
      termId: term.rowId,
      latex: term.latex,
      kinetic: term.kinetic,
      allowed: term.allowed,
      order: order && order.map((one) => one.toString()),
      orderLatex: order && vector(order),
      size: order && sizeOf(order, rules),
      byDimension: shownExact(term.coefficient.times(-1)),
      ...(compared.terms[index] ?? { place: null, placeByDimension: null, changes: 0 }),
    })),
    verdict: compared.verdict,
    changed: compared.terms.filter(({ changes }) => changes > 0).length,
    graph: graph && graph.value,
    loopWeight: vector(rules.loop ?? []),
    conventions: conventionsOf(inputs.preset),
    isEdited: rules.isEdited,
    proposal: rules.proposal,
  };
  return {
    value,
    problems,
    notices: [...incompletePremises(theory), ...cautions(orders, rules), ...iterated(graph, rules, theory)],
    scalars: countingScalars(value),
    working: countingWorking(theory, rules, orders, value, graph),
  };
}

export interface WorkedGraph {
  readonly order: GraphOrder;
  readonly value: CountedGraph;
  readonly nucleonLegs: number;
}

function countGraph(
  inputs: CountingInputs,
  theory: Theory,
  rules: Rules,
  orders: readonly TermOrder[],
  problems: Problem[],
): WorkedGraph | null {
  const read = readGraph(inputs, theory);
  if (!read.ok) {
    problems.push(...read.problems);
    return null;
  }
  const order = orderOfGraph(read.graph, read.degree, theory, rules, orders);
  if (!order) return null;
  const value = {
    legsLatex: productLatex(read.graph.legs, theory),
    loops: read.degree.loops,
    lines: theory.fields.flatMap(({ latex }, f) => {
      const count = read.degree.lines[f] ?? 0;
      return count === 0 ? [] : [{ latex, count, weight: vector(order.propagators[f] ?? []) }];
    }),
    order: vector(order.amplitude),
    withLegs: vector(order.withLegs),
    size: sizeOf(order.amplitude, rules),
  };
  const nucleonLegs = theory.fields.reduce(
    (sum, { statistics }, f) => sum + (statistics === "fermion" ? countOf(read.graph.legs, f) : 0),
    0,
  );
  return { order, value, nucleonLegs };
}

function relativeSpread(quantity: Quantity | null): Readonly<Record<string, number>> {
  return Object.fromEntries(
    [...(quantity?.spread ?? [])].map(([source, share]) => [
      source,
      roundFloat(share / (quantity?.value ?? 1)),
    ]),
  );
}

export function vector(weights: Weights): OrderVector {
  return weights.map((one) => shownExact(one));
}

/** ∏ λ_i^(order_i); null without numbers. */
function sizeOf(order: Weights, rules: Rules): Measured | null {
  const exponents = asNumbers(order);
  if (!exponents) return null;
  let size: Quantity = number(Rational.one);
  for (const [index, exponent] of exponents.entries()) {
    if (exponent.sign() === 0) continue;
    const quantity = rules.parameters[index]?.quantity;
    const raised = quantity && power(quantity, exponent);
    if (!raised || "code" in raised) return null;
    size = timesQuantity(size, raised);
  }
  return presentEstimate(size.value, sigmaOf(size));
}

/** Weinberg 1991: nothing but nucleons between two vertices is enhanced by m_N/Q, so the order is that of the rest. */
function iterated(graph: WorkedGraph | null, { preset }: Rules, { fields }: Theory): Problem[] {
  if (preset !== "chiral, with nucleons" || !graph) return [];
  const nucleons = fields.filter(({ statistics }) => statistics === "fermion").map(({ latex }) => latex);
  const inside = graph.value.lines.some(({ latex }) => nucleons.includes(latex));
  return inside && graph.nucleonLegs >= 4
    ? [{ code: "pure-nucleon-states", path: ["vertices"], facts: {} }]
    : [];
}

function cautions(orders: readonly TermOrder[], { parameters }: Rules): Problem[] {
  const unfit = orders.filter(
    ({ term, order }) => term.kinetic && order && !order.every((one) => one.equals(LinearForm.zero)),
  );
  const silent = parameters.filter(({ quantity }) => quantity === null).map(({ latex }) => latex);
  return [
    ...unfit.map(({ term, order }) => ({
      code: "kinetic-term-counts",
      path: ["rules"],
      facts: { term: term.latex, order: (order ?? []).map((one) => one.toString()).join(", ") },
    })),
    ...(silent.length > 0
      ? [{ code: "sizes-need-numbers", path: ["parameters"], facts: { symbols: silent.join(",\\,") } }]
      : []),
  ];
}
