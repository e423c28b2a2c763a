/** The counting argument: the rules, each term by its parts, and a graph both ways. */
import type { WorkingStep } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { operatorLatex } from "../notation/operator-latex.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import type { Theory } from "../premises/theory.ts";
import type { WorkedGraph } from "./evaluate.ts";
import { weightOfField, type TermOrder } from "./orders.ts";
import type { Rules } from "./read-rules.ts";
import type { CountingValue } from "./value.ts";
import type { Weights } from "./weights.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

/** "2", "(1,\, \tfrac12)". */
export function vectorLatex(weights: Weights): string {
  const parts = weights.map((one) => one.toLatex());
  return parts.length === 1 ? (parts[0] ?? "0") : `\\left(${parts.join(",\\,")}\\right)`;
}
function summand(weights: Weights): string {
  const text = vectorLatex(weights);
  return text.startsWith("-") || text.includes(" ") ? `\\left(${text}\\right)` : text;
}

export function countingWorking(
  theory: Theory,
  rules: Rules,
  orders: readonly TermOrder[],
  value: CountingValue,
  graph: WorkedGraph | null,
): WorkingStep[] {
  return [
    heading("Rules"),
    ...(value.conventions === "" ? [] : [prose(value.conventions)]),
    ...ruleSteps(theory, rules),
    heading("Terms"),
    prose(
      "A term counts its measure, fields, derivatives and couplings; kinetic terms count nothing when the weights fit together, so all orders are relative to them.",
    ),
    ...exceptionSteps(orders, rules),
    ...orders.flatMap((one) => termStep(one, theory, rules)),
    ...comparison(value),
    ...(graph ? graphSteps(graph, rules, theory) : []),
  ];
}

function ruleSteps(theory: Theory, rules: Rules): WorkingStep[] {
  const { parameters, measure, loop, derivative, timeDerivative } = rules;
  const isSplit = theory.spacetime.geometry === "anisotropic";
  const lines = [
    ...theory.fields.flatMap(({ symbol, latex }) => {
      const weight = weightOfField(rules, symbol);
      return weight ? [`${latex} &\\to ${vectorLatex(weight)}`] : [];
    }),
    ...(derivative ? [`\\partial &\\to ${vectorLatex(derivative)}`] : []),
    ...namedWeights(rules),
    ...(isSplit && timeDerivative ? [`\\partial_t &\\to ${vectorLatex(timeDerivative)}`] : []),
    ...(measure ? [`\\text{measure} &\\to ${vectorLatex(measure)}`] : []),
    ...(loop ? [`\\text{loop} &\\to ${vectorLatex(loop)}`] : []),
  ];
  const names = parameters.map(({ latex }) => `$${latex}$`).join(", ");
  return lines.length === 0
    ? []
    : [prose(`In powers of ${names}:`), formula(`\\begin{aligned} ${lines.join(" \\\\ ")} \\end{aligned}`)];
}

/** Couplings and scales that count. */
function namedWeights({ symbols }: Rules): string[] {
  return [...symbols].flatMap(([symbol, weight]) => {
    const read = readSymbol(symbol);
    return read.ok && weight.some((one) => !one.equals(LinearForm.zero))
      ? [`${read.value.latex} &\\to ${vectorLatex(weight)}`]
      : [];
  });
}

/** What a term counts by hand is no rule of the counting, so it is told apart. */
function exceptionSteps(orders: readonly TermOrder[], { exceptions }: Rules): WorkingStep[] {
  const told = orders.flatMap(({ term }) => {
    const weight = exceptions.get(term.rowId);
    return weight ? [`$${term.latex}$ counts $${vectorLatex(weight)}$ more`] : [];
  });
  return told.length === 0 ? [] : [prose(`By hand, ${told.join("; ")}.`)];
}

function termStep({ term, order, vertex }: TermOrder, theory: Theory, rules: Rules): WorkingStep[] {
  if (!order || !vertex || !rules.measure) return [];
  const parts = [
    vectorLatex(rules.measure),
    ...term.monomial.fields.flatMap(({ symbol, count }) => {
      const weight = weightOfField(rules, symbol);
      return weight ? [count === 1 ? summand(weight) : `${String(count)}\\cdot ${summand(weight)}`] : [];
    }),
    summand(vertex),
  ];
  const operator = operatorLatex(term.monomial, theory.fields, theory.spacetime.geometry);
  return [
    formula(`\\text{order}\\!\\left(${operator}\\right) = ${parts.join(" + ")} = ${vectorLatex(order)}`),
  ];
}

function comparison({ verdict, changed, terms }: CountingValue): WorkingStep[] {
  const said: Readonly<Record<CountingValue["verdict"], string>> = {
    "just by dimension":
      "Every order is the dimension of the operator above that of the measure, up to one common factor: this counting is dimensional analysis.",
    "same sequence":
      "The numbers differ from dimensions, but they put the terms in the same sequence: as far as these terms go, counting by dimension would keep and leave out the same.",
    "another sequence": `${String(changed)} of ${String(terms.length)} terms stand on another side of some other term than their dimensions would put them: this counting is not dimensional analysis.`,
    "not comparable":
      "The two sequences cannot be compared: several parameters need numbers, and the dimension of spacetime one, too.",
  };
  return [heading("Against dimensions"), prose(said[verdict])];
}

function graphSteps({ order, value }: WorkedGraph, rules: Rules, theory: Theory): WorkingStep[] {
  const { measure, loop } = rules;
  if (!measure || !loop) return [];
  const lines = value.lines
    .map(({ latex, count }) => {
      const index = theory.fields.findIndex((field) => field.latex === latex);
      return `${String(count)}\\cdot ${summand(order.propagators[index] ?? [])}`;
    })
    .join(" + ");
  return [
    heading("The graph"),
    prose(
      `With $2I_f + E_f = \\sum_i V_i n_{if}$ for every field and $L = \\sum_f I_f - \\sum_i V_i + 1 = ${String(value.loops)}$, a propagator counting twice its field and the measure,`,
    ),
    formula(
      `\\nu = ${summand(loop)}\\,L + ${lines === "" ? "0" : lines} + \\sum_i V_i\\,(\\text{derivatives and couplings}) = ${vectorLatex(order.amplitude)}`,
    ),
    prose("and from its vertices alone, which must be the same,"),
    formula(
      `\\nu = -${summand(measure)} - \\sum_f E_f w_f + \\left(${vectorLatex(loop)} + ${summand(measure)}\\right) L + \\sum_i V_i\\,\\Delta_i = ${vectorLatex(order.amplitude)}.`,
    ),
    prose(
      `With the wave functions of its external legs it counts $${vectorLatex(order.withLegs)}$.${rules.offset.some((one) => one.asRational()?.sign() !== 0) ? ` Both include the $${vectorLatex(rules.offset)}$ added for the normalisation.` : ""}`,
    ),
  ];
}
