/** β functions, typeset. */
import type { Part } from "./polynomial.ts";
import type { GaugeCoefficients, GaugeGroup } from "./gauge.ts";
import { polynomialLatex } from "./polynomial-latex.ts";
import type { RunningContext } from "./evaluate.ts";
import type { BetaRow, RunningValue } from "./value.ts";

const factor = { 4: "16\\pi^2", 3: "(8\\pi)^2" } as const;

/** "16\pi^2\,\mu\frac{d\lambda}{d\mu}" on the left, the polynomial on the right. */
export function presentBetas({ model, betas, critical }: RunningContext): BetaRow[] {
  if (!betas) return [];
  return model.parameters.map(({ id, latex }, index) => ({
    id,
    latex,
    leftLatex: `${factor[critical]}\\,\\mu\\,${derivative(latex)}`,
    rightLatex: betas.slopes[index] ? polynomialLatex(betas.slopes[index], model.parameters) : "0",
  }));
}
function derivative(latex: string): string {
  return /^(\\?[A-Za-z]+)(_\{?[^{}^]*\}?)?$/.test(latex)
    ? `\\frac{d${spaced(latex)}}{d\\mu}`
    : `\\frac{d(${latex})}{d\\mu}`;
}
function spaced(latex: string): string {
  return latex.startsWith("\\") ? latex : ` ${latex}`;
}

/** α in any case: μ dα/dμ = −(α²/2π)(β₀ + …). */
export function presentGauge(
  groups: readonly GaugeGroup[],
  { beta0, beta1 }: GaugeCoefficients,
  loops: 1 | 2,
): BetaRow[] {
  return groups.map(({ rowId, latex, given }, i) => {
    const own = given === "alpha" ? latex : `\\alpha_{${latex}}`;
    const second = groups.flatMap((group, j) => {
      const value = beta1[i]?.[j];
      if (loops === 1 || !value || value.sign() === 0) return [];
      const other = group.given === "alpha" ? group.latex : `\\alpha_{${group.latex}}`;
      return [`${value.sign() < 0 ? "-" : "+"} ${value.absolute().toLatex()}\\,\\frac{${other}}{4\\pi}`];
    });
    const first = beta0[i]?.toLatex() ?? "0";
    const inner =
      second.length === 0 && !first.startsWith("-")
        ? first
        : `\\left(${[first, ...second].join(" ")}\\right)`;
    return {
      id: rowId,
      latex,
      leftLatex: `\\mu\\,${derivative(own)}`,
      rightLatex: `-\\frac{${own}^{2}}{2\\pi}\\,${inner}`,
    };
  });
}

/** Operators of fields only; a constant is the vacuum energy. */
export function presentGenerated({ model, betas, critical }: RunningContext): RunningValue["generated"] {
  return (betas?.generated ?? []).map(({ inner, rest }) => ({
    operatorLatex: operatorLatex(inner, model.scalars),
    slopeLatex: `\\frac{1}{${factor[critical]}}\\left(${polynomialLatex(rest, model.parameters)}\\right)`,
  }));
}

export function operatorLatex(
  { powers }: Part,
  scalars: readonly { readonly name: string; readonly latex: string }[],
): string {
  const factors = scalars.flatMap(({ name, latex }) => {
    const power = powers.get(name) ?? 0;
    if (power === 0) return [];
    if (power === 1) return [latex];
    return [latex.includes("^") ? `(${latex})^{${power}}` : `${latex}^{${power}}`];
  });
  return factors.length === 0 ? "1" : factors.join(" ");
}
