/** The derivation of what the block gives along x, with its numbers. */
import type { WorkingStep } from "../evaluation.ts";
import { floatText } from "../notation/float-text.ts";
import { unitText } from "../notation/unit-text.ts";
import type { CorrelatedValue, CurveValue, DrawnDensity } from "./curve-value.ts";
import { totals } from "./scalars-curve.ts";
import type { TruncationInputs } from "./shape.ts";
import type { PriorSettings } from "./value.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

function shown(value: number, digits = 5): string {
  return floatText(value, 0, { digits, style: "auto", markup: "latex" });
}
function withUnit(value: number, unit: string): string {
  return unit === "" ? shown(value) : shown(value) + unitText(unit, "latex");
}

export function describeSets({ low, high, sigma, terms }: PriorSettings): WorkingStep[] {
  const what =
    terms === null
      ? "the sum said in each line"
      : terms === 1
        ? "the first omitted term"
        : `${terms} omitted terms`;
  return [
    heading("Prior sets A, B and C"),
    prose(
      `Furnstahl, Klco, Phillips, Wesolowski 2015: in A and B each $c_n$ is uniform in $|c_n| \\le \\bar c$, in C it is Gaussian with width $\\bar c$; $\\ln\\bar c$ is uniform from $\\ln ${shown(low)}$ to $\\ln ${shown(high)}$ in A and C, and normal about 0 with width ${shown(sigma)} in B. Integrated numerically for ${what}.`,
    ),
    formula(
      "p = \\int d\\bar c\\; \\mathrm{pr}(\\bar c\\,|\\,c_0, \\dots, c_k)\\; P\\Big(\\Big|\\sum_n c_n Q^n\\Big| \\le d \\,\\Big|\\, \\bar c\\Big), \\qquad \\mathrm{pr}(\\bar c\\,|\\,c) \\propto \\mathrm{pr}(\\bar c) \\prod_n \\mathrm{pr}(c_n|\\bar c)",
    ),
  ];
}

export function describeAlong(curve: CurveValue, inputs: TruncationInputs): WorkingStep[] {
  const { variable, xUnit, at, count, correlated } = curve;
  const steps = [
    heading("Along x"),
    prose(
      `The data give ${count} points. The numbers above are at $${variable} = ${withUnit(at, xUnit)}$; the same methods are applied at every point with the Q there, each point on its own.`,
    ),
  ];
  if (curve.covered.length > 0) steps.push(heading("Measured values"), ...describeCovered(curve.covered));
  return correlated ? [...steps, ...describeCorrelated(curve, correlated, inputs)] : steps;
}

function describeCovered(covered: CurveValue["covered"]): WorkingStep[] {
  const lines = totals(covered).map(({ degree, inside, count }) => {
    const own = covered.filter((one) => one.degree === degree);
    const parts = own.map((one) => `${one.inside} of ${one.count} at order ${one.order}`);
    return prose(
      `In the ${degree} % intervals lie ${parts.join(", ")}: together ${Math.round((100 * inside) / count)} %.`,
    );
  });
  return [
    ...lines,
    prose(
      "A measured value counts as inside when it differs by less than the half-width, its own error at the same degree of belief added in quadrature. Neighbouring points are not independent, so the share of one curve may stray far from the degree of belief.",
    ),
  ];
}

function describeCorrelated(
  curve: CurveValue,
  model: CorrelatedValue,
  inputs: TruncationInputs,
): WorkingStep[] {
  const { variable, xUnit, orders, count } = curve;
  const used = orders.filter((one) => one.used).map(({ order }) => `$c_{${order}}$`);
  const { breakdown, lengthPosterior, points } = model;
  const steps = [
    heading("Correlated along x"),
    prose(
      `The coefficients ${used.join(", ")} are independent draws of one Gaussian process with mean 0, variance $\\bar c^2$ and the correlation below; $\\bar c^2$ has the scaled inverse $\\chi^2$ prior of the conjugate method (Melendez et al. 2019).`,
    ),
    formula(
      `r(${variable}, ${variable}'; \\ell) = e^{-(${variable} - ${variable}')^2/2\\ell^2}, \\qquad \\ell = ${withUnit(model.length, xUnit)}`,
    ),
    prose(
      `${points === count ? `All ${count} points are fitted` : `${points} of the ${count} points are fitted, evenly spread, ${shown(model.spacing, 3)} apart`}: between points much closer than $\\ell$ the kernel allows differences smaller than any data have digits. ${shown(model.nugget, 2)} is added to the diagonal of R, so that it can be factorised; its condition number is then at least ${shown(model.condition, 2)}.`,
    ),
    formula(
      `\\nu = \\nu_0 + n_c N = ${shown(model.nu)}, \\qquad \\tau^2 = \\frac{\\nu_0\\tau_0^2 + \\sum_n \\mathbf c_n^{T} R^{-1} \\mathbf c_n}{\\nu} = ${shown(model.tau2)}`,
    ),
    prose(
      "What is left out is then a Student-t process with this ν and the kernel below; its half-width at one point is a quantile of Student's t times the root of the kernel there.",
    ),
    formula(
      `\\tau^2\\, X_{\\mathrm{ref}} X_{\\mathrm{ref}}' \\frac{(Q Q')^{k+1}}{1 - Q Q'}\\; r(${variable}, ${variable}'; \\ell)`,
    ),
  ];
  if (lengthPosterior || breakdown)
    steps.push(
      heading("Posterior of the scales"),
      formula(
        "\\ln \\mathrm{pr}(\\Lambda_b, \\ell\\,|\\,\\mathrm{data}) = \\ln\\mathrm{pr}(\\Lambda_b, \\ell) - \\frac{\\nu}{2}\\ln\\tau^2 - \\frac{n_c}{2}\\ln|R| - \\sum_n n \\sum_i \\ln Q(x_i; \\Lambda_b)",
      ),
      prose(
        "The last term is the Jacobian from predictions to coefficients; without it the largest Q would always be the best. $\\ln\\ell$ is uniform between half the distance of the points and twice their range.",
      ),
    );
  if (lengthPosterior) steps.push(...describeDensity("\\ell", { ...lengthPosterior, unit: xUnit }));
  if (breakdown) {
    const { posterior, latex, stated, alone } = breakdown;
    const joint =
      alone.length > 1
        ? ` It is joint over ${alone.length} observables, each with its own $\\ell$ and $\\bar c$.`
        : "";
    steps.push(
      prose(
        `The prior of $${latex}$ is ${inputs.breakdownPrior}, from $${withUnit(posterior.grid[0] ?? NaN, posterior.unit)}$ to $${withUnit(posterior.grid.at(-1) ?? NaN, posterior.unit)}$ as drawn; stated is $${withUnit(stated, posterior.unit)}$, which the bands use.${joint}`,
      ),
      ...describeDensity(latex, posterior),
    );
  }
  steps.push(heading("Consistency checks"), ...model.findings.map(({ says }) => prose(says)));
  return steps;
}

function describeDensity(symbol: string, { mode, median, intervals, unit }: DrawnDensity): WorkingStep[] {
  const parts = intervals.map(
    ({ degree, low, high }) =>
      `${degree}\\%:\\; [${shown(low, 4)},\\, ${shown(high, 4)}]${unit === "" ? "" : unitText(unit, "latex")}`,
  );
  return [
    formula(
      `${symbol}:\\quad \\text{most probable } ${withUnit(mode, unit)}, \\quad \\text{median } ${withUnit(median, unit)}, \\quad ${parts.join(",\\quad ")}`,
    ),
  ];
}
