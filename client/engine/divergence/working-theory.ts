/** The derivation behind a theory's list of divergent amplitudes and its verdict. */
import type { WorkingStep } from "../evaluation.ts";
import type { LinearForm } from "../exact/linear-form.ts";
import type { Theory } from "../premises/theory.ts";
import type { TheoryDivergence, TheoryVerdict } from "./value.ts";
import { bracketed } from "./formulas.ts";

const reasons: Record<TheoryVerdict, string> = {
  free: "No term has three or more fields: there are no loops beyond the free vacuum energy.",
  "super-renormalisable":
    "Every coupling has positive dimension, so each vertex lowers the degree: only finitely many graphs diverge.",
  renormalisable:
    "No coupling has negative dimension, so further vertices never raise the degree: finitely many amplitudes diverge, at every loop order.",
  "infinitely many divergent amplitudes":
    "A coupling is dimensionless and so is a field: legs cost nothing, infinitely many amplitudes diverge with bounded degree, and only a symmetry can relate their counterterms to finitely many constants.",
  "new terms at every order":
    "A coupling has negative dimension, so its vertices raise the degree: every amplitude diverges at some order, and each order in $1/\\Lambda$ needs new terms.",
};

/** " - 3/2 E": a product to be subtracted; nothing when it vanishes, no factor when that is 1. */
function minusTimes(factor: LinearForm, symbol: string): string {
  const number = factor.asRational();
  if (number?.sign() === 0) return "";
  if (number && number.sign() < 0) return ` + ${timesSymbol(factor.times(-1), symbol)}`;
  return ` - ${timesSymbol(factor, symbol)}`;
}
function timesSymbol(factor: LinearForm, symbol: string): string {
  return factor.toString() === "1" ? symbol : `${bracketed(factor)}\\,${symbol}`;
}

export function explainTheory(value: TheoryDivergence, theory: Theory): WorkingStep[] {
  const symbols = theory.fields.map((field) => minusTimes(field.weight, `E_{${field.latex}}`)).join("");
  const couplings = value.couplings.map(({ termRowId, latex }, index) => {
    const term = theory.terms.find(({ rowId }) => rowId === termRowId);
    return { latex, coefficient: term?.ultravioletCoefficient, name: `V_{${index + 1}}` };
  });
  const vertices = couplings
    .map(({ coefficient, name }) => (coefficient ? minusTimes(coefficient, name) : ""))
    .join("");
  return [
    { step: "heading", text: "Degree of every amplitude" },
    { step: "formula", latex: "\\omega = [\\text{measure}] - \\sum_f E_f \\delta_f - \\sum_i V_i [g_i]" },
    ...couplings.map(({ latex, coefficient, name }): WorkingStep => ({
      step: "formula",
      latex: `${name}:\\quad ${latex},\\qquad [g] = ${coefficient?.toLatex() ?? ""}`,
    })),
    { step: "formula", latex: `\\omega = ${theory.measure.toLatex()}${symbols}${vertices}` },
    { step: "heading", text: "Verdict" },
    ...verdictSteps(value),
    ...orderSteps(value, theory),
  ];
}

function verdictSteps({ verdict, ranges }: TheoryDivergence): WorkingStep[] {
  if (verdict)
    return [{ step: "prose", text: `${reasons[verdict]} (Peskin and Schroeder 1995, section 10.1.)` }];
  return ranges.map(({ from, to, verdict: here }): WorkingStep => {
    const place =
      from && to && from.text === to.text
        ? `at $${from.latex}$`
        : to
          ? `between $${from?.latex ?? "0"}$ and $${to.latex}$`
          : `above $${from?.latex ?? "0"}$`;
    return { step: "prose", text: `Dimension ${place}: ${here}. ${reasons[here]}` };
  });
}

/** The exact statement behind "renormalisable order by order". */
function orderSteps(
  { verdict, finitelyManyPerOrder, bounds }: TheoryDivergence,
  theory: Theory,
): WorkingStep[] {
  if (verdict !== "new terms at every order") return [];
  const measure = theory.measure.toLatex();
  const finite = finitelyManyPerOrder
    ? "as every field has positive weight, that is a finite list at each $n$: the theory is renormalisable order by order."
    : "but a field has weight zero or less, so that the list is infinite at each $n$ unless a symmetry orders it.";
  return [
    { step: "heading", text: "Order by order" },
    {
      step: "prose",
      text: `Let $n = \\sum_i V_i \\max(0, -[g_i])$ be the order in $1/\\Lambda$. Then $\\omega \\le ${measure} - \\sum_f E_f\\delta_f + n$, so divergences at order $n$ need no operator of dimension above $${measure} + n$; ${finite}`,
    },
    ...bounds.map(({ order, largestDimension }): WorkingStep => ({
      step: "formula",
      latex: `n = ${order.latex}:\\quad \\Delta \\le ${largestDimension.latex}`,
    })),
    {
      step: "prose",
      text: "In dimensional regularisation with mass-independent subtraction, and with every mass kept as a light parameter, counterterms of order $n$ are exactly of order $n$; a cutoff also renormalises operators of lower dimension.",
    },
  ];
}
